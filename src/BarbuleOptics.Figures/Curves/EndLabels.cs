using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Figures.Layout;

namespace BarbuleOptics.Figures.Curves;

/// <summary>The angles, written beside the right ends of their curves.</summary>
internal static class EndLabels
{
    private const double KneePt = 6;
    private const double SamplePt = 15;
    private const double GapPt = 2;
    private const double HeightPt = Ink.SmallPt * 1.25;

    /// <summary>Room that the labels take right of the plot.</summary>
    public static double RoomPt(IEnumerable<string> texts) => KneePt + SamplePt + GapPt + texts.Max(text => FigureFont.WidthPt(text, Ink.SmallPt));

    /// <summary>How many labels fit beside a plot.</summary>
    public static int Capacity(double plotHeightPt) => (int)(plotHeightPt / HeightPt);

    public static void Draw(List<PageElement> elements, Box plot, IReadOnlyList<(string Text, Point End, Stroke Stroke)> curves)
    {
        double[] heights = [.. curves.Select(_ => HeightPt)];
        double[] middles = LabelSpread.Middles([.. curves.Select(curve => curve.End.Y)], heights, plot.Top, plot.Bottom + HeightPt / 2);
        for (int i = 0; i < curves.Count; i++)
        {
            (string text, Point end, Stroke stroke) = curves[i];
            var knee = new Point(plot.Right + KneePt, middles[i]);
            var start = new Point(knee.X + SamplePt, middles[i]);
            if (end.X < plot.Right)
                elements.Add(new StrokedShape(Shape.Line(end, new(plot.Right, end.Y)), new Stroke(Ink.Outline, Ink.HairPt)));
            elements.Add(new StrokedShape(Shape.Line(new(plot.Right, end.Y), knee), new Stroke(Ink.Outline, Ink.HairPt)));
            elements.Add(new StrokedShape(Shape.Line(knee, start), stroke));
            elements.Add(TextRun.CenteredAt(text, start with { X = start.X + GapPt }, Ink.SmallPt, TextAlign.Start, Ink.Text));
        }
    }
}
