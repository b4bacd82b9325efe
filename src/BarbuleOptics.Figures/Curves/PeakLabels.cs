using BarbuleOptics.Color;
using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Figures.Plots;

namespace BarbuleOptics.Figures.Curves;

/// <summary>Writes the wavelength at each main peak where it covers neither a curve nor another label.</summary>
internal sealed class PeakLabels(Box plot, IReadOnlyList<IReadOnlyList<Point>> curves, IEnumerable<Box> taken)
{
    private const double MarkerPt = PlotPeak.RadiusPt;
    private const double ClearPt = 1.2;
    private const double NearPt = 8;

    // From the most wanted place on: straight above, then aside, then farther off with a leader.
    private static readonly double[] Distances = [2.5, 6, 10, 15, 21, 28];
    private static readonly double[] Directions = [0, -35, 35, -70, 70, -105, 105, -145, 145, 180];

    private readonly List<(Point From, Point To)> _leaders = [];
    private readonly List<Box> _taken = [.. taken];

    /// <summary>Keeps labels off a marker; call it for all peaks before the first label.</summary>
    public void KeepOff(Point peak) => _taken.Add(Box.Around(peak, 2 * MarkerPt, 2 * MarkerPt));

    /// <summary>False when no place was found.</summary>
    public bool TryWrite(List<PageElement> elements, string text, Point peak, SrgbColor color)
    {
        var run = TextRun.CenteredAt(text, default, Ink.SmallPt, TextAlign.Middle, color);
        foreach (double distance in Distances)
        {
            foreach (double direction in Directions)
            {
                (double sin, double cos) = Math.SinCos(double.DegreesToRadians(direction));
                double reach = MarkerPt + distance;
                // The box touches the circle of that reach from outside.
                var middle = new Point(peak.X + sin * (reach + run.Box.Width / 2), peak.Y - cos * (reach + run.Box.Height / 2));
                Box box = Box.Around(middle, run.Box.Width, run.Box.Height);
                bool withLeader = distance > NearPt;
                var start = new Point(peak.X + sin * MarkerPt, peak.Y - cos * MarkerPt);
                if (!IsFree(box.Grown(ClearPt)) || (withLeader && _taken.Any(other => other.Grown(ClearPt / 2).Meets(start, Nearest(box, peak)) && !other.Grown(0.01).Overlaps(Box.Around(peak, 0, 0).Grown(0.01)))))
                    continue;
                if (withLeader)
                {
                    _leaders.Add((start, Nearest(box, peak)));
                    elements.Add(new StrokedShape(Shape.Line(start, Nearest(box, peak)), new Stroke(Ink.Outline, Ink.HairPt)));
                }
                elements.Add(run with { At = new Point(box.Center.X, box.Bottom - FigureFont.Descent * Ink.SmallPt) });
                _taken.Add(box);
                return true;
            }
        }
        return false;
    }

    private bool IsFree(Box box)
        => plot.Holds(box) && !_taken.Any(box.Overlaps) && !_leaders.Any(leader => box.Meets(leader.From, leader.To)) && !curves.Any(curve => Crosses(curve, box));

    /// <summary>Whether a curve runs through a box.</summary>
    public static bool Crosses(IReadOnlyList<Point> curve, Box box)
    {
        for (int i = 1; i < curve.Count; i++)
        {
            if (curve[i].X >= box.Left && curve[i - 1].X <= box.Right && box.Meets(curve[i - 1], curve[i]))
                return true;
        }
        return false;
    }

    private static Point Nearest(Box box, Point to) => new(Math.Clamp(to.X, box.Left, box.Right), Math.Clamp(to.Y, box.Top, box.Bottom));
}
