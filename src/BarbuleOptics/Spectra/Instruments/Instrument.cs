using BarbuleOptics.Quantities;

namespace BarbuleOptics.Spectra.Instruments;

/// <summary>What stands between the reflectance of a flat section at one angle and what is measured: cones of light, tilted facets, arms.</summary>
/// <remarks>
/// The signal is the integral over directions of light and facet normals of (share of facets) x R(direction as the facet sees it), over those
/// whose beam falls into the collection cone: a tilted facet sends its beam elsewhere, so that tilt is no average of R over angles. Radiance is
/// even over the cone of light, and all that enters the collection cone counts alike.
/// </remarks>
public sealed record Instrument
{
    /// <summary>Largest half angle of a cone, in degrees.</summary>
    public const double MostHalfAngleDegrees = 75;

    /// <summary>Half angle of the cone of light, 0 to 75 degrees.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Outside that range.</exception>
    public Angle Light { get; init => field = HalfAngle(value); }

    /// <summary>Half angle of the cone of collection, 0 to 75 degrees.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Outside that range.</exception>
    public Angle Collection { get; init => field = HalfAngle(value); }

    /// <summary>How the facets are tilted.</summary>
    public FacetTilt Tilt { get; init; }

    /// <summary>Standard deviation of the direction of the rods within their facet, 0 to 60 degrees.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Outside that range.</exception>
    public Angle RodSpread
    {
        get;
        init => field = value.Degrees is >= 0 and <= FacetTilt.MostNormalDegrees
            ? value : throw new ArgumentOutOfRangeException(nameof(value), value.Degrees, "Must be 0 to 60 degrees.");
    }

    /// <summary>Where light and collector are.</summary>
    public ArmGeometry Arms { get; init; }

    /// <summary>What the signal is divided by.</summary>
    public SignalReference Reference { get; init; }

    /// <summary>Half angle of a cone of numerical aperture <paramref name="aperture"/> in the surround: asin(NA/n).</summary>
    /// <exception cref="ArgumentOutOfRangeException">The aperture is not within 0 to the index.</exception>
    public static Angle FromAperture(double aperture, double surroundIndex = 1)
        => aperture >= 0 && aperture <= surroundIndex
            ? Angle.FromDegrees(double.RadiansToDegrees(Math.Asin(aperture / surroundIndex)))
            : throw new ArgumentOutOfRangeException(nameof(aperture), aperture, "Must lie between 0 and the index of the surround.");

    /// <summary>Signal of the perfect mirror over that of the perfect matt white: what a signal against the one is multiplied with to be against the other.</summary>
    /// <param name="angle">The angle that is asked for.</param>
    /// <remarks>Of cones of solid angles W = 2 pi (1 - cos): the mirror gives the smaller of the two, white gives W_light W_collection cos(collector)/pi
    /// on average, the cosine of the mean surface.</remarks>
    public double WhiteFactor(Angle angle)
    {
        (_, Direction collector) = Arms.At(angle);
        double larger = Math.Max(Light.Radians, Collection.Radians);
        return Math.PI / (SolidAngle(larger) * AverageCosine(collector, Math.Max(Collection.Radians, 1e-6)));
    }

    private static double SolidAngle(double halfAngle) => 4 * Math.PI * Math.Pow(Math.Sin(halfAngle / 2), 2);

    // The mean cosine over a cap that stays above the surface: cos(axis) cos^2(half/2).
    private static double AverageCosine(Direction axis, double halfAngle) => axis.Z * Math.Pow(Math.Cos(halfAngle / 2), 2);

    private static Angle HalfAngle(Angle value)
        => value.Degrees is >= 0 and <= MostHalfAngleDegrees
            ? value : throw new ArgumentOutOfRangeException(nameof(value), value.Degrees, FormattableString.Invariant($"Must be 0 to {MostHalfAngleDegrees} degrees."));
}
