using BarbuleOptics.Quantities;

namespace BarbuleOptics.Spectra.Instruments;

/// <summary>How the normals of the facets that a spot holds are spread about the normal of the mean surface.</summary>
/// <remarks>Facets are counted by the area that they show to the light.</remarks>
/// <param name="Kind">The shape of the distribution.</param>
/// <param name="Width">Normal: standard deviation of the tilt about each of two axes, above 0 to 60 degrees. Arc: largest tilt to either side, above 0 to 80
/// degrees. Flat: 0.</param>
public readonly record struct FacetTilt(FacetTiltKind Kind, Angle Width)
{
    /// <summary>Largest standard deviation of a normal distribution, in degrees.</summary>
    public const double MostNormalDegrees = 60;

    /// <summary>Largest half width of an arc, in degrees.</summary>
    public const double MostArcDegrees = 80;

    /// <summary>All facets lie in the mean surface.</summary>
    public static FacetTilt Flat => default;

    /// <summary>Tilts about both axes are normally distributed: the density of normals falls as exp(-angle^2/(2 sd^2)).</summary>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="deviation"/> lies outside above 0 to 60 degrees.</exception>
    public static FacetTilt Normal(Angle deviation) => new(FacetTiltKind.Normal, Checked(deviation, MostNormalDegrees));

    /// <summary>Normals lie evenly on an arc across the rods, as on a barbule that is curved about its length.</summary>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="half"/> lies outside above 0 to 80 degrees.</exception>
    public static FacetTilt Arc(Angle half) => new(FacetTiltKind.Arc, Checked(half, MostArcDegrees));

    private static Angle Checked(Angle width, double most)
        => width.Degrees > 0 && width.Degrees <= most
            ? width : throw new ArgumentOutOfRangeException(nameof(width), width.Degrees, FormattableString.Invariant($"Must be above 0 to {most} degrees."));
}
