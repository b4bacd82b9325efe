using BarbuleOptics.Quantities;

namespace BarbuleOptics.Spectra.Instruments;

/// <summary>How the facets of a spot see the light that an instrument collects from them, in the mirror direction of each facet.</summary>
/// <remarks>
/// A direction is held by the squares of the sine of its angle and of the cosine of its azimuth from across the rods, in which the unpolarized reflectance is
/// smooth: it is the same for either sign of both shares of the direction, by the mirror along the rods and by reciprocity. Weights are shares
/// of what a perfect mirror turned to face the arms would send.
/// </remarks>
internal sealed class LocalDirections
{
    private const double LeastHalfAngle = 1e-5;

    private readonly List<LocalDirection> _samples = [];

    /// <summary>Finds the directions.</summary>
    /// <param name="instrument">The instrument.</param>
    /// <param name="angle">The angle that its arms are asked to stand at.</param>
    /// <param name="rodAxis">Angle of the rods' axis from the normal of the plane of incidence: 0 across, 90 degrees along it.</param>
    public LocalDirections(Instrument instrument, Angle angle, Angle rodAxis)
    {
        HasNoCones = instrument.Light.Degrees == 0 && instrument.Collection.Degrees == 0;
        double light = Math.Max(instrument.Light.Radians, LeastHalfAngle), collection = Math.Max(instrument.Collection.Radians, LeastHalfAngle);
        instrument = instrument with { Light = Angle.FromDegrees(double.RadiansToDegrees(light)), Collection = Angle.FromDegrees(double.RadiansToDegrees(collection)) };
        (Direction towardsLight, Direction towardsCollector) = instrument.Arms.At(angle);
        (double sine, double cosine) = Math.SinCos(rodAxis.Radians);
        Direction across = new(cosine, -sine, 0);
        (double Turn, double Share)[] turns = RodTurns.Of(instrument.RodSpread.Radians);
        var overlap = new CapOverlap();
        double mirror = 4 * Math.PI * Math.Pow(Math.Sin(Math.Min(light, collection) / 2), 2), sum = 0, incidence = 0;
        foreach ((Direction normal, double share) in new FacetNormals(instrument, towardsLight, towardsCollector, across).Samples)
        {
            overlap.Set(towardsLight, light, towardsCollector.MirroredBy(normal), collection);
            foreach ((Direction at, double weight) in overlap.Samples)
            {
                // Light that comes from behind a facet does not reach it.
                if (at.Dot(normal) <= 0)
                    continue;
                double part = share * weight / mirror;
                sum += part;
                incidence += part * at.AngleTo(normal);
                Add(at, normal, across, turns, part);
            }
        }
        Share = sum;
        MeanIncidence = Angle.FromDegrees(sum > 0 ? double.RadiansToDegrees(incidence / sum) : 0);
    }

    /// <summary>The directions.</summary>
    public IReadOnlyList<LocalDirection> Samples => _samples;

    /// <summary>What a perfect mirror in place of each facet would give, as a share of one perfect mirror that faces the arms: 0 to 1.</summary>
    public double Share { get; }

    /// <summary>Whether both cones are thin lines, for which the share is nothing but the shape of the signal still has a limit.</summary>
    public bool HasNoCones { get; }

    /// <summary>Mean angle of incidence on the facets that count.</summary>
    public Angle MeanIncidence { get; }

    private void Add(Direction at, Direction normal, Direction across, ReadOnlySpan<(double Turn, double Share)> turns, double weight)
    {
        foreach ((double turn, double share) in turns)
        {
            (double sine, double cosine) = Math.SinCos(turn);
            Direction local = new Direction(across.X * cosine - across.Y * sine, across.X * sine + across.Y * cosine, 0).TurnedWith(normal);
            // The part of the direction in the facet: the sine keeps its digits where the cosine is 1.
            Direction other = new Direction(local.Y * normal.Z - local.Z * normal.Y, local.Z * normal.X - local.X * normal.Z, local.X * normal.Y - local.Y * normal.X);
            double u = at.Dot(local), v = at.Dot(other), square = u * u + v * v;
            _samples.Add(new LocalDirection(square, square > 0 ? u * u / square : 1, weight * share));
        }
    }
}
