using BarbuleOptics.Color;
using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Figures.Layout;

namespace BarbuleOptics.Figures.Sections;

/// <summary>Labels in a column right of the section, each with a leader.</summary>
internal static class LabelColumn
{
    private const double LinePt = Ink.SmallPt * FigureFont.LineHeight;
    private const double GapPt = 3;
    private const double KneePt = 8;

    /// <summary>Room between the section and the texts.</summary>
    public const double LeaderPt = KneePt + 3;

    /// <summary>Draws the labels; the bottom of the last.</summary>
    public static double Draw(List<PageElement> elements, IReadOnlyList<SectionLabel> labels, Box section, double right)
    {
        double left = section.Right + LeaderPt;
        (string Text, SrgbColor Color)[][] blocks = [.. labels.Select(label => Lines(label, right - left))];
        double[] heights = [.. blocks.Select(block => block.Length * LinePt + GapPt)];
        double[] middles = Middles(labels, heights, section.Top);
        double bottom = section.Top;
        for (int i = 0; i < labels.Count; i++)
        {
            double top = middles[i] - (heights[i] - GapPt) / 2;
            Leader(elements, labels[i].Target, section.Right, new Point(left - 2, top + LinePt / 2));
            for (int line = 0; line < blocks[i].Length; line++)
                elements.Add(TextRun.CenteredAt(blocks[i][line].Text, new(left, top + (line + 0.5) * LinePt), Ink.SmallPt, TextAlign.Start, blocks[i][line].Color));
            bottom = Math.Max(bottom, top + blocks[i].Length * LinePt);
        }
        return bottom;
    }

    /// <summary>The middles of the labels; the label of a core stays right under that of its body.</summary>
    private static double[] Middles(IReadOnlyList<SectionLabel> labels, double[] heights, double top)
    {
        int[] firsts = [.. Enumerable.Range(0, labels.Count).Where(i => !labels[i].IsCore)];
        int[][] groups = [.. firsts.Select((first, g) => Enumerable.Range(first, (g + 1 < firsts.Length ? firsts[g + 1] : labels.Count) - first).ToArray())];
        double[] groupMiddles = LabelSpread.Middles(
            [.. groups.Select(group => group.Average(i => labels[i].Target.Y))], [.. groups.Select(group => group.Sum(i => heights[i]))], top, double.MaxValue);
        double[] middles = new double[labels.Count];
        for (int g = 0; g < groups.Length; g++)
        {
            double reached = groupMiddles[g] - groups[g].Sum(i => heights[i]) / 2;
            foreach (int i in groups[g])
            {
                middles[i] = reached + heights[i] / 2;
                reached += heights[i];
            }
        }
        return middles;
    }

    private static (string Text, SrgbColor Color)[] Lines(SectionLabel label, double width)
        => [.. TextWrap.Lines(label.Name, Ink.SmallPt, width).Select(line => (line, Ink.Text)), .. TextWrap.Lines(label.Detail, Ink.SmallPt, width).Select(line => (line, Ink.Note))];

    /// <summary>A line on a white ground, so that it is seen on dark fills too.</summary>
    private static void Leader(List<PageElement> elements, Point target, double edge, Point end)
    {
        Shape line = Shape.Polyline([target, new(Math.Max(edge, target.X), target.Y), end]);
        if (target.X < edge)
        {
            elements.Add(new StrokedShape(Shape.Line(target, new(edge, target.Y)), new Stroke(Ink.White, 1.3)));
            elements.Add(new FilledShape(Shape.Circle(target, 1.6), Ink.White));
            elements.Add(new FilledShape(Shape.Circle(target, 1), Ink.Text));
        }
        elements.Add(new StrokedShape(line, new Stroke(Ink.Text, Ink.HairPt), "leader"));
    }
}
