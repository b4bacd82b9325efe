using System.Globalization;
using BarbuleOptics.Color;
using BarbuleOptics.Ensembles;
using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Figures.Layout;

namespace BarbuleOptics.Figures.Ensembles;

/// <summary>Variance shares as bars: of each outcome a bar a measurement, dark for the first-order share, light on to the total one.</summary>
internal sealed class SensitivityFigure
{
    private const double MarginPt = 4, RowPt = 11, BarPt = 6.5, HeadPt = 13, GapPt = 5;

    /// <summary>Angles shown; of more the first, the middle and the last.</summary>
    private const int MostAngles = 3;

    /// <summary>Measurements shown of each outcome; the rest have less.</summary>
    private const int MostInputs = 10;

    private static readonly SrgbColor Dark = new(0x3b, 0x5b, 0x7c), Light = new(0xb9, 0xc8, 0xd6);

    private static readonly Dictionary<string, string> Titles = new() { ["peak_nm"] = "Peak wavelength", ["h_deg"] = "Hue angle", ["C"] = "Chroma" };

    private readonly SensitivityResult _result;
    private readonly string _name;
    private readonly double _widthPt;
    private readonly double _left;
    private readonly double _right;
    private readonly List<PageElement> _elements = [];

    private SensitivityFigure(SensitivityResult result, string name, FigureSize size)
    {
        (_result, _name, _widthPt) = (result, name, size.WidthPt);
        IEnumerable<string> keys = result.Views.SelectMany(view => view.Outcomes).SelectMany(outcome => outcome.Inputs).Select(input => input.Key);
        double labels = keys.Select(key => FigureFont.WidthPt(key, Ink.SmallPt)).DefaultIfEmpty(0).Max();
        _left = MarginPt + Math.Min(labels, 0.45 * _widthPt) + 4;
        _right = _widthPt - MarginPt - FigureFont.WidthPt("100 %", Ink.SmallPt) - 4;
    }

    /// <summary>Lays the figure out.</summary>
    public static Figure Draw(SensitivityResult result, string name, FigureSize size) => new(new SensitivityFigure(result, name, size).Compose());

    private Page Compose()
    {
        int count = _result.Views.Count;
        int[] shown = count <= MostAngles ? [.. Enumerable.Range(0, count)] : [0, count / 2, count - 1];
        double top = MarginPt;
        foreach (SensitivityView view in shown.Select(angle => _result.Views[angle]))
        {
            foreach (OutcomeShares outcome in view.Outcomes)
                top = AddOutcome(view, outcome, top) + GapPt;
        }
        double bottom = NoteBlock.Add(_elements, Notes(shown.Length), MarginPt, _widthPt - MarginPt, top);
        return new Page($"What decides the color of {_name}", _widthPt, bottom + MarginPt, _elements);
    }

    private double AddOutcome(SensitivityView view, OutcomeShares outcome, double top)
    {
        string title = Titles.GetValueOrDefault(outcome.Name, outcome.Name) + (_result.Views.Count > 1 ? ", " + Degrees.Text(view.Incidence) : "");
        _elements.Add(TextRun.CenteredAt(title, new(_left, top + HeadPt / 2), Ink.LabelPt, TextAlign.Start, Ink.Text));
        top += HeadPt;
        double first = top;
        foreach (InputShare input in outcome.Inputs.Take(MostInputs))
        {
            double middle = top + RowPt / 2, total = X(input.Total);
            string key = TextWrap.Lines(input.Key, Ink.SmallPt, _left - MarginPt - 4)[0];
            _elements.Add(TextRun.CenteredAt(key, new(_left - 4, middle), Ink.SmallPt, TextAlign.End, Ink.Text));
            AddBar(_left, total, middle, Light);
            AddBar(_left, Math.Min(X(input.First), total), middle, Dark);
            _elements.Add(TextRun.CenteredAt(Percent(input.Total), new(Math.Max(_left, total) + 3, middle), Ink.SmallPt, TextAlign.Start, Ink.Note));
            top += RowPt;
        }
        _elements.Add(new StrokedShape(Shape.Line(new(_left, first), new(_left, top)), new Stroke(Ink.Axis, Ink.LinePt)));
        return top;
    }

    private void AddBar(double from, double to, double middle, SrgbColor color)
    {
        if (to > from)
            _elements.Add(new FilledShape(Shape.Rectangle(new Box(from, middle - BarPt / 2, to, middle + BarPt / 2)), color));
    }

    private double X(double share) => _left + Math.Clamp(share, 0, 1) * (_right - _left);

    private IEnumerable<string> Notes(int shown)
    {
        string spread = _result.Options.Spread switch
        {
            Spread.Mean => "of the mean",
            Spread.Between => "between barbules",
            _ => "within a section",
        };
        yield return $"Share of the variance (spread {spread}) that each measurement explains: dark, by itself; with light, together with others (percent).";
        if (shown < _result.Views.Count)
            yield return string.Create(CultureInfo.InvariantCulture, $"{shown} of {_result.Views.Count} angles are shown.");
    }

    private static string Percent(double share) => string.Create(CultureInfo.InvariantCulture, $"{100 * Math.Clamp(share, 0, 1):0} %");
}
