using BarbuleOptics.Color;
using BarbuleOptics.Figures.Drawing;

namespace BarbuleOptics.Figures.Sections;

/// <summary>A line with a head at its end.</summary>
internal static class Arrow
{
    public static void Draw(List<PageElement> elements, Point from, Point to, SrgbColor color, double widthPt, double headPt, string? role = null)
    {
        double length = Math.Sqrt((to.X - from.X) * (to.X - from.X) + (to.Y - from.Y) * (to.Y - from.Y));
        if (length == 0)
            return;
        (double ux, double uy) = ((to.X - from.X) / length, (to.Y - from.Y) / length);
        double head = Math.Min(headPt, length);
        elements.Add(new StrokedShape(Shape.Line(from, new(to.X - ux * head, to.Y - uy * head)), new Stroke(color, widthPt), role));
        Head(elements, to, ux, uy, color, head);
    }

    /// <summary>A line from end to end with a head on its way.</summary>
    public static void DrawThrough(List<PageElement> elements, Point from, Point to, double headShare, SrgbColor color, double widthPt, double headPt, string? role = null)
    {
        elements.Add(new StrokedShape(Shape.Line(from, to), new Stroke(color, widthPt), role));
        double length = Math.Sqrt((to.X - from.X) * (to.X - from.X) + (to.Y - from.Y) * (to.Y - from.Y));
        if (length > 0)
            Head(elements, new(from.X + headShare * (to.X - from.X), from.Y + headShare * (to.Y - from.Y)), (to.X - from.X) / length, (to.Y - from.Y) / length, color, headPt);
    }

    private static void Head(List<PageElement> elements, Point tip, double ux, double uy, SrgbColor color, double lengthPt)
    {
        var neck = new Point(tip.X - ux * lengthPt, tip.Y - uy * lengthPt);
        double half = lengthPt * 0.32;
        elements.Add(new FilledShape(Shape.Polyline([tip, new(neck.X - uy * half, neck.Y + ux * half), new(neck.X + uy * half, neck.Y - ux * half)], closed: true), color));
    }
}
