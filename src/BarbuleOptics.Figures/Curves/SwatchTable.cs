using System.Globalization;
using BarbuleOptics.Color;
using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Figures.Layout;
using BarbuleOptics.Prediction;
using BarbuleOptics.Spectra;

namespace BarbuleOptics.Figures.Curves;

/// <summary>One column an angle: its color as computed and brightened, and its peak where the plot had no room for it.</summary>
internal sealed class SwatchTable
{
    private const double RowGapPt = 2.5;
    private const double SwatchPt = 10;
    private const double WidestPt = 34;
    private const double TextGapPt = 1.6;

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
        double widest = views.Max(view => FigureFont.WidthPt(Degrees.Text(view.Incidence), Ink.SmallPt));
        if (_column >= widest)
            return;
        // Numbers wider than their columns reach beyond the first and the last.
        _firstColumn += widest / 2;
        _column = (right - widest / 2 - _firstColumn) / views.Count;
    }

    private static string OtherText(string solver) => $"  by {(solver == "rigorous" ? "rigorous solver" : solver)}";

    private static string AsComputedText => "Color as computed";

    private static string BrightenedText => FormattableString.Invariant($"Brightened to L* {SrgbEncoder.BrightenedLightness}");

    /// <summary>Draws the table; its bottom.</summary>
    public static double Draw(
        List<PageElement> elements, IReadOnlyList<View> views, (string Solver, IReadOnlyList<LayerModelError?> Found)? others, Func<View, SpectralPeak?>? peak, double left, double right, double top)
    {
        var table = new SwatchTable(elements, views, left, right, top);
        bool withColors = views.Any(view => view.Color is not null);
        if (peak is null && !withColors)
            return top;
        List<(string Name, string[] Texts)> rows = [("Angle of incidence", [.. views.Select(view => Degrees.Text(view.Incidence))])];
        if (peak is not null)
            rows.Add(("Main peak (nm)", [.. views.Select(view => peak(view)?.WavelengthNm.ToString("0", CultureInfo.InvariantCulture) ?? "–")]));
        table.Texts(rows);
        if (withColors)
        {
            table.Swatches(AsComputedText, color => color.Srgb, others);
            table.Swatches(BrightenedText, color => color.SrgbBrightened, others);
        }
        return table._top - RowGapPt;
    }

    private void Texts(List<(string Name, string[] Texts)> rows)
    {
        // Columns too narrow for every number hold every second, third, … one, the same in all rows.
        double widest = rows.Max(row => row.Texts.Max(text => FigureFont.WidthPt(text, Ink.SmallPt)));
        int every = (int)Math.Ceiling((widest + TextGapPt) / _column);
        foreach ((string name, string[] texts) in rows)
        {
            double middle = _top + Ink.SmallPt / 2;
            Name(name, middle);
            for (int i = 0; i < texts.Length; i += every)
                _elements.Add(TextRun.CenteredAt(texts[i], new(Middle(i), middle), Ink.SmallPt, TextAlign.Middle, Ink.Text));
            _top += Ink.SmallPt + RowGapPt;
        }
    }

    private void Swatches(string name, Func<CieColor, SrgbColor> color, (string Solver, IReadOnlyList<LayerModelError?> Found)? others)
    {
        Swatches(name, color, [.. _views.Select(view => view.Color)]);
        if (others is var (solver, found))
            Swatches(OtherText(solver), color, [.. found.Select(other => other?.OtherColor)]);
    }

    private void Swatches(string name, Func<CieColor, SrgbColor> color, CieColor?[] colors)
    {
        Name(name, _top + SwatchPt / 2);
        double gap = _column > 8 ? 2 : 0;
        var outlines = new Shape();
        for (int i = 0; i < _views.Count; i++)
        {
            if (colors[i] is not CieColor found)
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
