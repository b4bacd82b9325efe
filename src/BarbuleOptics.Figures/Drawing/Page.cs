using BarbuleOptics.Figures.Plots;

namespace BarbuleOptics.Figures.Drawing;

/// <summary>What a figure consists of, in drawing order, before any format.</summary>
internal sealed class Page(string title, double widthPt, double heightPt, IReadOnlyList<PageElement> elements)
{
    private const double MmInPt = 25.4 / 72;

    /// <summary>What the file says it shows; read by programs, so that it may hold characters that the font lacks.</summary>
    public string Title { get; } = FigureFont.OneLine(title);

    public double WidthPt { get; } = widthPt;

    public double HeightPt { get; } = heightPt;

    public double WidthMm => WidthPt * MmInPt;

    public double HeightMm => HeightPt * MmInPt;

    public Box Box => new(0, 0, WidthPt, HeightPt);

    public IReadOnlyList<PageElement> Elements { get; } = elements;

    /// <summary>All texts.</summary>
    public IEnumerable<TextRun> Texts => Flat(Elements).OfType<TextRun>();

    /// <summary>All lines.</summary>
    public IEnumerable<StrokedShape> Lines => Flat(Elements).OfType<StrokedShape>();

    /// <summary>All plots.</summary>
    public IEnumerable<PlotPanel> Plots => Flat(Elements).OfType<PlotPanel>();

    private static IEnumerable<PageElement> Flat(IEnumerable<PageElement> elements)
        => elements.SelectMany(element => element is ClippedGroup group ? Flat(group.Elements) : [element]);
}
