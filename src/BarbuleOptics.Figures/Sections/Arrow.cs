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
        var neck = new Point(to.X - ux * head, to.Y - uy * head);
        double half = head * 0.32;
        elements.Add(new StrokedShape(Shape.Line(from, neck), new Stroke(color, widthPt), role));
        elements.Add(new FilledShape(Shape.Polyline([to, new(neck.X - uy * half, neck.Y + ux * half), new(neck.X + uy * half, neck.Y - ux * half)], closed: true), color));
    }
}
