using BarbuleOptics.Color;
using BarbuleOptics.Figures.Drawing;

namespace BarbuleOptics.Figures.Sections;

/// <summary>How a material is filled.</summary>
/// <param name="Color">Its ground.</param>
/// <param name="Hatch">Lines over the ground.</param>
/// <param name="Line">Color of the lines.</param>
internal sealed record MaterialFill(SrgbColor Color, Hatch Hatch, SrgbColor Line)
{
    private const double DistancePt = 3.2;

    /// <summary>Fills an outline that lies within <paramref name="around"/>.</summary>
    public IEnumerable<PageElement> Fill(Shape shape, Box around)
    {
        if (shape.IsEmpty)
            yield break;
        yield return new FilledShape(shape, Color);
        if (Hatch != Hatch.None)
            yield return new ClippedGroup(shape, [new StrokedShape(Lines(around), new Stroke(Line, Ink.HairPt))]);
    }

    private Shape Lines(Box around)
    {
        var lines = new Shape();
        // Lines start at whole distances on the page, so that neighbors continue each other.
        if (Hatch == Hatch.Level)
        {
            for (double y = Whole(around.Top); y < around.Bottom; y += DistancePt)
                lines.AddLine(new(around.Left, y), new(around.Right, y));
        }
        double step = DistancePt * Math.Sqrt(2);
        if (Hatch is Hatch.Rising or Hatch.Crossed)
        {
            for (double sum = Math.Ceiling((around.Left + around.Top) / step) * step; sum < around.Right + around.Bottom; sum += step)
                lines.AddLine(new(sum - around.Bottom, around.Bottom), new(sum - around.Top, around.Top));
        }
        if (Hatch is Hatch.Falling or Hatch.Crossed)
        {
            for (double sum = Math.Ceiling((around.Left - around.Bottom) / step) * step; sum < around.Right - around.Top; sum += step)
                lines.AddLine(new(sum + around.Top, around.Top), new(sum + around.Bottom, around.Bottom));
        }
        return lines;
    }

    private static double Whole(double from) => Math.Ceiling(from / DistancePt) * DistancePt;
}
