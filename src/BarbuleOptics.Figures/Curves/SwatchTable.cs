using System.Globalization;
using BarbuleOptics.Color;
using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Figures.Layout;
using BarbuleOptics.Prediction;

namespace BarbuleOptics.Figures.Curves;

/// <summary>One column an angle: its color as computed and brightened, and its peak where the plot had no room for it.</summary>
internal sealed class SwatchTable
{
    private const double RowGapPt = 2.5;
    private const double SwatchPt = 10;
    private const double WidestPt = 34;
    private const double TextGapPt = 3;

    private readonly List<PageElement> _elements;
    private readonly IReadOnlyList<View> _views;
    private readonly double _left;
    private readonly double _firstColumn;
    private readonly double _column;
    private double _top;

    private SwatchTable(List<PageElement> elements, IReadOnlyList<View> views, double left, double right, double top)
    {
        (_elements, _views, _left, _top) = (elements, views, left, top);
        _firstColumn = left + new[] { BrightenedText, AsComputedText }.Max(text => FigureFont.WidthPt(text, Ink.SmallPt)) + 6;
        _column = Math.Min(WidestPt, (right - _firstColumn) / views.Count);
    }

    private static string AsComputedText => "Color as computed";

    private static string BrightenedText => FormattableString.Invariant($"Brightened to L* {SrgbEncoder.BrightenedLightness}");

    /// <summary>Draws the table; its bottom.</summary>
    public static double Draw(List<PageElement> elements, IReadOnlyList<View> views, bool withPeaks, double left, double right, double top)
    {
        var table = new SwatchTable(elements, views, left, right, top);
        table.Texts("Angle of incidence", view => Degrees.Text(view.Incidence));
        if (withPeaks)
            table.Texts("Main peak (nm)", view => view.Features.MainPeak?.WavelengthNm.ToString("0", CultureInfo.InvariantCulture) ?? "–");
        if (views.Any(view => view.Color is not null))
        {
            table.Swatches(AsComputedText, color => color.Srgb);
            table.Swatches(BrightenedText, color => color.SrgbBrightened);
        }
        return table._top - RowGapPt;
    }

    private void Texts(string name, Func<View, string> text)
    {
        double middle = _top + Ink.SmallPt / 2;
        Name(name, middle);
        // Columns too narrow for every number hold every second, third, … one.
        double widest = _views.Max(view => FigureFont.WidthPt(text(view), Ink.SmallPt));
        int every = (int)Math.Ceiling((widest + TextGapPt) / _column);
        for (int i = 0; i < _views.Count; i += every)
        {
            double x = every == 1 ? Middle(i) : Math.Max(Middle(i), _firstColumn + widest / 2);
            _elements.Add(TextRun.CenteredAt(text(_views[i]), new(x, middle), Ink.SmallPt, TextAlign.Middle, Ink.Text));
        }
        _top += Ink.SmallPt + RowGapPt;
    }

    private void Swatches(string name, Func<CieColor, SrgbColor> color)
    {
        Name(name, _top + SwatchPt / 2);
        double gap = _column > 8 ? 2 : 0;
        var outlines = new Shape();
        for (int i = 0; i < _views.Count; i++)
        {
            if (_views[i].Color is not CieColor found)
                continue;
            var box = new Box(_firstColumn + i * _column + gap / 2, _top, _firstColumn + (i + 1) * _column - gap / 2, _top + SwatchPt);
            _elements.Add(new FilledShape(Shape.Rectangle(box), color(found)));
            if (gap > 0)
                outlines.AddRectangle(box);
        }
        if (gap == 0)
            outlines.AddRectangle(new Box(_firstColumn, _top, _firstColumn + _views.Count * _column, _top + SwatchPt));
        _elements.Add(new StrokedShape(outlines, new Stroke(Ink.Outline, Ink.LinePt), "swatches"));
        _top += SwatchPt + RowGapPt;
    }

    private void Name(string text, double middle) => _elements.Add(TextRun.CenteredAt(text, new(_left, middle), Ink.SmallPt, TextAlign.Start, Ink.Text));

    private double Middle(int column) => _firstColumn + (column + 0.5) * _column;
}
