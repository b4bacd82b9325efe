using BarbuleOptics.Color;
using BarbuleOptics.Figures.Curves;
using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Figures.Layout;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Figures.Colors;

/// <summary>How a color moves over the angle of incidence: a line, with a dot an angle and the angles beside; of more than 18 angles every second, third ... one.</summary>
internal static class AngleTrack
{
    /// <summary>Role of the line.</summary>
    public const string Role = "track";

    /// <summary>Role of the rims of the dots.</summary>
    public const string DotRole = "dot";

    private const double DotPt = 2.1;
    private const int MostDots = 18;

    /// <summary>Draws a track.</summary>
    /// <param name="elements">Receives it.</param>
    /// <param name="room">Where labels may stand.</param>
    /// <param name="stops">Angle, place and fill of each dot, in any order of angle.</param>
    /// <param name="lines">What labels must not cross.</param>
    /// <param name="taken">What they must not cover.</param>
    /// <param name="mostLabels">About how many angles are written.</param>
    /// <returns>Whether every angle has its dot and is written.</returns>
    public static bool Draw(
        List<PageElement> elements, Box room, IReadOnlyList<(Angle Angle, Point At, SrgbColor Fill)> stops, IEnumerable<IReadOnlyList<Point>> lines, IEnumerable<Box> taken, int mostLabels)
    {
        if (stops.Count == 0)
            return true;
        (Angle Angle, Point At, SrgbColor Fill)[] ordered = [.. stops.OrderBy(stop => stop.Angle.Degrees)];
        Point[] path = [.. ordered.Select(stop => stop.At)];
        if (path.Length > 1)
            elements.Add(new StrokedShape(Shape.Polyline(path), new Stroke(Ink.Axis, Ink.LinePt), Role));
        (Angle Angle, Point At, SrgbColor Fill)[] shown = [.. Thinned(ordered, MostDots)];
        foreach ((_, Point at, SrgbColor fill) in shown)
        {
            elements.Add(new FilledShape(Shape.Circle(at, DotPt), fill));
            elements.Add(new StrokedShape(Shape.Circle(at, DotPt), new Stroke(Ink.Axis, Ink.LinePt), DotRole));
        }
        var labels = new PeakLabels(room, [.. lines.Append(path).SelectMany(Segments)], taken);
        foreach ((_, Point at, _) in shown)
            labels.KeepOff(at);
        (Angle Angle, Point At, SrgbColor Fill)[] named = [.. Thinned(shown, mostLabels)];
        bool all = named.Length == ordered.Length;
        // The ends first: they say where the track begins and which way it runs.
        foreach ((Angle angle, Point at, _) in named.OrderBy(stop => stop.Angle != ordered[0].Angle && stop.Angle != ordered[^1].Angle))
            all &= labels.TryWrite(elements, Degrees.Text(angle), at, Ink.Text);
        return all;
    }

    /// <summary>Every second, third ... one where there are too many, and the last.</summary>
    private static IEnumerable<T> Thinned<T>(T[] all, int most)
    {
        int every = (int)Math.Ceiling((double)all.Length / most);
        return all.Where((_, i) => i % every == 0 || i == all.Length - 1);
    }

    /// <summary>The pieces of a line, each from left to right as a curve over wavelength runs.</summary>
    private static IEnumerable<IReadOnlyList<Point>> Segments(IReadOnlyList<Point> line)
    {
        for (int i = 1; i < line.Count; i++)
            yield return line[i - 1].X <= line[i].X ? [line[i - 1], line[i]] : [line[i], line[i - 1]];
    }
}
