using System.Globalization;
using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Figures.Sections;

/// <summary>Marks one cell of each spacing: what repeats along the surface.</summary>
internal static class CellMarks
{
    private const double RowPt = 10;
    private const double ArrowPt = 3;
    private const int MostMarks = 3;

    private static readonly Stroke Under = new(Ink.White, 1.6);
    private static readonly Stroke Dashed = new(Ink.Text, 0.7, [2.4, 1.6]);

    /// <summary>Draws the cells and their widths below the section; the bottom.</summary>
    public static double Draw(List<PageElement> elements, SectionLayout layout)
    {
        double bottom = layout.Box.Bottom + 2;
        foreach (IGrouping<double, SectionRun> runs in layout.Section.Runs.GroupBy(run => Math.Round(run.SpacingNm, 3)).Take(MostMarks))
        {
            double topNm = runs.Min(run => run.Rows[0].CentreNm + run.CellTopNm), bottomNm = runs.Max(run => run.Rows[^1].CentreNm + run.CellBottomNm);
            Point upper = layout.At(-runs.Key / 2, topNm), lower = layout.At(runs.Key / 2, bottomNm);
            Cell(elements, new Box(upper.X, upper.Y - 1.2, lower.X, lower.Y + 1.2), layout.Box);
            Width(elements, upper.X, lower.X, lower.Y + 1.2, bottom + RowPt / 2, runs.Key, layout.Box);
            bottom += RowPt;
        }
        return bottom;
    }

    private static void Cell(List<PageElement> elements, Box cell, Box window)
    {
        Shape outline = Shape.Rectangle(cell);
        elements.Add(new ClippedGroup(Shape.Rectangle(window), [new StrokedShape(outline, Under), new StrokedShape(outline, Dashed, "cell")]));
    }

    private static void Width(List<PageElement> elements, double left, double right, double from, double y, double spacingNm, Box window)
    {
        var guides = new Shape();
        foreach (double x in new[] { left, right })
            guides.AddLine(new(x, Math.Max(from, window.Top)), new(x, y + 2));
        elements.Add(new StrokedShape(guides, new Stroke(Ink.Text, Ink.HairPt)));
        string text = "period " + spacingNm.ToString("0.#", CultureInfo.InvariantCulture) + " nm";
        double length = FigureFont.WidthPt(text, Ink.SmallPt);
        bool inside = length + 4 * ArrowPt < right - left;
        double middle = (left + right) / 2;
        if (inside)
        {
            Arrow.Draw(elements, new(middle - length / 2 - 1.5, y), new(left, y), Ink.Text, Ink.HairPt, ArrowPt);
            Arrow.Draw(elements, new(middle + length / 2 + 1.5, y), new(right, y), Ink.Text, Ink.HairPt, ArrowPt);
            elements.Add(TextRun.CenteredAt(text, new(middle, y), Ink.SmallPt, TextAlign.Middle, Ink.Text));
            return;
        }
        Arrow.Draw(elements, new(left - 8, y), new(left, y), Ink.Text, Ink.HairPt, ArrowPt);
        Arrow.Draw(elements, new(right + 8, y), new(right, y), Ink.Text, Ink.HairPt, ArrowPt);
        elements.Add(TextRun.CenteredAt(text, new(right + 10, y), Ink.SmallPt, TextAlign.Start, Ink.Text));
    }
}
