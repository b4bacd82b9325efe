using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Figures.Sections;

/// <summary>Marks one cell of each spacing: what repeats along the surface.</summary>
internal static class CellMarks
{
    private const double RowPt = 10;
    private const double ArrowPt = 3;
    private const double OutsidePt = 8;
    private const double AsidePt = 1.2;
    private const int MostMarks = 3;

    private static readonly Stroke Under = new(Ink.White, 1.6);
    private static readonly Stroke Dashed = new(Ink.Text, 0.7, [2.4, 1.6]);
    private static readonly Stroke Hair = new(Ink.Text, Ink.HairPt);

    /// <summary>Draws the cells and their widths below the section; the bottom.</summary>
    public static double Draw(List<PageElement> elements, SectionLayout layout)
    {
        double bottom = layout.Box.Bottom + 2;
        var widths = new List<PageElement>();
        // Narrow ones first, so that the guides of the wide ones pass outside.
        foreach (IGrouping<double, SectionRun> runs in layout.Section.Runs.GroupBy(run => Math.Round(run.SpacingNm, 3)).OrderBy(runs => runs.Key).Take(MostMarks))
        {
            double topNm = runs.Min(run => run.Rows[0].CenterNm + run.CellTopNm), bottomNm = runs.Max(run => run.Rows[^1].CenterNm + run.CellBottomNm);
            Point upper = layout.At(-runs.Key / 2, topNm), lower = layout.At(runs.Key / 2, bottomNm);
            var cell = new Box(upper.X, upper.Y - AsidePt, lower.X, lower.Y + AsidePt);
            Guides(elements, cell, bottom + RowPt / 2, layout.Box);
            Cell(elements, cell, layout.Box);
            bottom += Width(widths, cell, bottom + RowPt / 2, runs.Key, layout.Box);
        }
        elements.AddRange(widths);
        return bottom;
    }

    private static void Cell(List<PageElement> elements, Box cell, Box window)
    {
        Shape outline = Shape.Rectangle(cell);
        elements.Add(new ClippedGroup(Shape.Rectangle(window), [new StrokedShape(outline, Under), new StrokedShape(outline, Dashed, "cell")]));
    }

    private static void Guides(List<PageElement> elements, Box cell, double y, Box window)
    {
        // White beside the lines, so that they are seen on dark fills too; not on the frame of the section.
        elements.Add(new StrokedShape(Both(window.Bottom - Ink.LinePt), Under));
        elements.Add(new StrokedShape(Both(y + 2), Hair, "guides"));

        Shape Both(double end) => new Shape().AddLine(new(cell.Left, cell.Bottom), new(cell.Left, end)).AddLine(new(cell.Right, cell.Bottom), new(cell.Right, end));
    }

    /// <summary>Draws the width of a cell; the height that it takes.</summary>
    private static double Width(List<PageElement> elements, Box cell, double y, double spacingNm, Box window)
    {
        string words = "period " + LengthText.Of(spacingNm);
        double length = FigureFont.WidthPt(words, Ink.SmallPt), middle = cell.Center.X;
        if (length + 4 * ArrowPt < cell.Width)
        {
            Dimension(elements, middle - length / 2 - 1.5, cell.Left, y);
            Dimension(elements, middle + length / 2 + 1.5, cell.Right, y);
            Words(elements, words, new(middle, y));
            return RowPt;
        }
        // Too narrow: arrows from outside, and the words below, within the width of the drawing.
        Dimension(elements, cell.Left - OutsidePt, cell.Left, y);
        Dimension(elements, cell.Right + OutsidePt, cell.Right, y);
        double least = window.Left + length / 2;
        Words(elements, words, new(Math.Clamp(middle, least, Math.Max(least, window.Right - length / 2)), y + RowPt - 1));
        return 2 * RowPt - 1;
    }

    private static void Dimension(List<PageElement> elements, double from, double to, double y) => Arrow.Draw(elements, new(from, y), new(to, y), Ink.Text, Ink.HairPt, ArrowPt);

    /// <summary>Words on a white ground, where the guides of wider cells may pass.</summary>
    private static void Words(List<PageElement> elements, string words, Point at)
    {
        var text = TextRun.CenteredAt(words, at, Ink.SmallPt, TextAlign.Middle, Ink.Text);
        elements.Add(new FilledShape(Shape.Rectangle(text.Box.Grown(0.8)), Ink.White));
        elements.Add(text);
    }
}
