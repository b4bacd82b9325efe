using BarbuleOptics.Quantities;

namespace BarbuleOptics.Spectra.Instruments;

/// <summary>Facets of a spot and the rods on them, with their shares, whether or not they send light anywhere.</summary>
/// <param name="Normal">The facet's normal.</param>
/// <param name="Across">Direction across the rods, in the facet.</param>
/// <param name="Weight">Share of all facets.</param>
internal readonly record struct FacetFrame(Direction Normal, Direction Across, double Weight)
{
    private const int Turns = 16;
    private const double Reach = 4;

    /// <summary>The facets that an instrument's tilt and spread describe, for rods of an axis.</summary>
    public static List<FacetFrame> All(Instrument instrument, Angle rodAxis)
    {
        (double sine, double cosine) = Math.SinCos(rodAxis.Radians);
        Direction across = new(cosine, -sine, 0);
        var frames = new List<FacetFrame>();
        foreach ((Direction normal, double share) in Normals(instrument.Tilt, across))
        {
            foreach ((double turn, double part) in RodTurns.Of(instrument.RodSpread.Radians))
            {
                (double s, double c) = Math.SinCos(turn);
                frames.Add(new FacetFrame(normal, new Direction(across.X * c - across.Y * s, across.X * s + across.Y * c, 0).TurnedWith(normal), share * part));
            }
        }
        return frames;
    }

    private static IEnumerable<(Direction Normal, double Share)> Normals(FacetTilt tilt, Direction across)
    {
        double width = tilt.Width.Radians;
        if (tilt.Kind == FacetTiltKind.Flat)
            return [(Direction.Up, 1)];
        (double[] points, double[] weights) = GaussRule.Of(24);
        if (tilt.Kind == FacetTiltKind.Arc)
        {
            return points.Zip(weights, (point, weight) => (width * (2 * point - 1), weight)).Select(at =>
                (new Direction(Math.Sin(at.Item1) * across.X, Math.Sin(at.Item1) * across.Y, Math.Cos(at.Item1)), at.weight));
        }
        double most = Math.Min(Math.PI / 2, Reach * width);
        double[] densities = [.. points.Zip(weights, (point, weight) => weight * Math.Sin(most * point) * Math.Exp(-most * point * most * point / (2 * width * width)))];
        double sum = densities.Sum();
        return Enumerable.Range(0, points.Length * Turns).Select(i =>
            (Direction.Up.Around(most * points[i / Turns], 2 * Math.PI * (i % Turns + 0.5) / Turns), densities[i / Turns] / sum / Turns));
    }
}
