namespace BarbuleOptics.Spectra.Instruments;

/// <summary>Facet normals that send light from one cone into another, with their shares of all facets.</summary>
internal sealed class FacetNormals
{
    private const int Turns = 24;
    private const int MostPieces = 40;

    private static readonly (double[] Points, double[] Weights) Rule = GaussRule.Of(8);

    private readonly Direction _light;
    private readonly Direction _collector;
    private readonly double _least;
    private readonly double _most;
    private readonly List<(Direction Normal, double Weight)> _samples = [];

    /// <summary>Finds them.</summary>
    /// <param name="instrument">Cones and tilt.</param>
    /// <param name="light">Direction towards the light.</param>
    /// <param name="collector">Direction towards the collector.</param>
    /// <param name="acrossRods">Direction across the rods in the mean surface.</param>
    public FacetNormals(Instrument instrument, Direction light, Direction collector, Direction acrossRods)
    {
        (_light, _collector) = (light, collector);
        (_least, _most) = (Math.Abs(instrument.Light.Radians - instrument.Collection.Radians), instrument.Light.Radians + instrument.Collection.Radians);
        switch (instrument.Tilt.Kind)
        {
            case FacetTiltKind.Normal:
                AddNormal(instrument.Tilt.Width.Radians);
                break;
            case FacetTiltKind.Arc:
                AddArc(instrument.Tilt.Width.Radians, acrossRods);
                break;
            default:
                _samples.Add((Direction.Up, 1));
                break;
        }
    }

    /// <summary>Normals with the share of the facets that each stands for.</summary>
    public IReadOnlyList<(Direction Normal, double Weight)> Samples => _samples;

    private double Miss(Direction normal) => _light.AngleTo(_collector.MirroredBy(normal));

    // In polar coordinates about the normal that sends the middle of the one cone into the middle of the other, cut where one cone's image leaves the other.
    private void AddNormal(double deviation)
    {
        Direction center = _light.Halfway(_collector);
        // The integral of exp(-t^2/(2 sd^2)) over all normals that do not face down.
        double all = 2 * Math.PI * Integral(0, Math.PI / 2, Pieces(Math.PI / 2, deviation), t => Math.Sin(t) * Math.Exp(-t * t / (2 * deviation * deviation)));
        for (int j = 0; j < Turns; j++)
        {
            double azimuth = 2 * Math.PI * (j + 0.5) / Turns;
            double inner = Reach(center, azimuth, _least), outer = Reach(center, azimuth, _most);
            AddRay(center, azimuth, 0, inner, deviation, 1 / all);
            AddRay(center, azimuth, inner, outer, deviation, 1 / all);
        }
    }

    private void AddRay(Direction center, double azimuth, double from, double to, double deviation, double scale)
    {
        int pieces = Pieces(to - from, deviation);
        for (int piece = 0; piece < pieces && to > from; piece++)
        {
            double start = from + (to - from) * piece / pieces, width = (to - from) / pieces;
            for (int i = 0; i < Rule.Points.Length; i++)
            {
                // A scale that is slow at both ends, where what the cones share has a root.
                double s = Rule.Points[i], polar = start + width * s * s * (3 - 2 * s), stretch = width * 6 * s * (1 - s);
                Direction normal = center.Around(polar, azimuth);
                double tilt = normal.AngleTo(Direction.Up);
                if (tilt >= Math.PI / 2)
                    continue;
                double weight = scale * Math.Exp(-tilt * tilt / (2 * deviation * deviation)) * Math.Sin(polar) * stretch * Rule.Weights[i] * 2 * Math.PI / Turns;
                if (weight > 0)
                    _samples.Add((normal, weight));
            }
        }
    }

    private void AddArc(double half, Direction acrossRods)
    {
        // On an arc the miss grows away from its least value on both sides: cut where it crosses the two limits.
        const int Steps = 400;
        List<double> cuts = [-half];
        for (int i = 0; i < Steps; i++)
        {
            double a = half * (2.0 * i / Steps - 1), b = half * (2.0 * (i + 1) / Steps - 1);
            foreach (double limit in (ReadOnlySpan<double>)[_least, _most])
            {
                if ((Miss(At(a)) - limit) * (Miss(At(b)) - limit) < 0)
                    cuts.Add(Bisect(t => Miss(At(t)) - limit, a, b));
            }
        }
        cuts.Add(half);
        cuts.Sort();
        for (int i = 0; i + 1 < cuts.Count; i++)
        {
            for (int k = 0; k < Rule.Points.Length; k++)
            {
                double s = Rule.Points[k], width = cuts[i + 1] - cuts[i], tilt = cuts[i] + width * s * s * (3 - 2 * s);
                if (Miss(At(tilt)) < _most)
                    _samples.Add((At(tilt), width * 6 * s * (1 - s) * Rule.Weights[k] / (2 * half)));
            }
        }

        Direction At(double tilt) => new(Math.Sin(tilt) * acrossRods.X, Math.Sin(tilt) * acrossRods.Y, Math.Cos(tilt));
    }

    // How far a normal can lean from the center before the images of the cones are a limit apart.
    private double Reach(Direction center, double azimuth, double limit)
    {
        if (limit <= 0)
            return 0;
        const double Most = Math.PI / 2;
        return Miss(center.Around(Most, azimuth)) <= limit ? Most : Bisect(t => Miss(center.Around(t, azimuth)) - limit, 0, Most);
    }

    private static double Bisect(Func<double, double> function, double low, double high)
    {
        bool lowIsBelow = function(low) < 0;
        for (int i = 0; i < 60; i++)
        {
            double middle = 0.5 * (low + high);
            if (function(middle) < 0 == lowIsBelow)
                low = middle;
            else
                high = middle;
        }
        return 0.5 * (low + high);
    }

    private static int Pieces(double width, double deviation) => Math.Clamp((int)Math.Ceiling(width / (2 * deviation)), 1, MostPieces);

    private static double Integral(double from, double to, int pieces, Func<double, double> function)
    {
        double sum = 0, width = (to - from) / pieces;
        for (int piece = 0; piece < pieces; piece++)
        {
            for (int i = 0; i < Rule.Points.Length; i++)
                sum += width * Rule.Weights[i] * function(from + width * (piece + Rule.Points[i]));
        }
        return sum;
    }
}
