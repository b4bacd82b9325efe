using BarbuleOptics.Quantities;

namespace BarbuleOptics.Spectra.Instruments;

/// <summary>Where light comes from and where it is collected, for each angle that is asked for.</summary>
/// <param name="Kind">Which arms turn.</param>
/// <param name="Span">Angle between two fixed arms, 0 to below 170 degrees; 0 for the others.</param>
public readonly record struct ArmGeometry(ArmGeometryKind Kind, Angle Span)
{
    /// <summary>Largest angle between fixed arms, in degrees.</summary>
    public const double MostSpanDegrees = 170;

    /// <summary>Both arms turn: light at the angle asked for, collected where a mirror in the mean surface sends it.</summary>
    public static ArmGeometry TurningArms => default;

    /// <summary>Light and collection share one line, at the angle asked for.</summary>
    public static ArmGeometry OneLine => new(ArmGeometryKind.OneLine, default);

    /// <summary>Two arms that stand <paramref name="span"/> apart; the line half way between them is at the angle asked for, as when the specimen is turned.</summary>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="span"/> lies outside 0 to below 170 degrees.</exception>
    public static ArmGeometry FixedArms(Angle span)
        => span.Degrees is >= 0 and < MostSpanDegrees
            ? new(ArmGeometryKind.FixedArms, span)
            : throw new ArgumentOutOfRangeException(nameof(span), span.Degrees, FormattableString.Invariant($"Must be 0 to below {MostSpanDegrees} degrees."));

    /// <summary>Directions from the specimen towards the light and towards the collector.</summary>
    internal (Direction Light, Direction Collector) At(Angle angle) => Kind switch
    {
        ArmGeometryKind.OneLine => (Direction.InPlane(angle.Radians), Direction.InPlane(angle.Radians)),
        ArmGeometryKind.FixedArms => (Direction.InPlane(angle.Radians + Span.Radians / 2), Direction.InPlane(angle.Radians - Span.Radians / 2)),
        _ => (Direction.InPlane(angle.Radians), Direction.InPlane(-angle.Radians)),
    };
}
