namespace BarbuleOptics.Quantities;

/// <summary>A plane angle, held in degrees as users and files state it; always finite. The default value is zero.</summary>
public readonly record struct Angle
{
    private Angle(double degrees) => Degrees = degrees;

    /// <summary>The angle in degrees.</summary>
    public double Degrees { get; }

    /// <summary>The angle in radians.</summary>
    public double Radians => double.DegreesToRadians(Degrees);

    /// <summary>An angle given in degrees.</summary>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="degrees"/> is NaN or infinite.</exception>
    public static Angle FromDegrees(double degrees) => new(Guard.Finite(degrees));

    /// <summary>The number of degrees and the unit, in the invariant culture.</summary>
    public override string ToString() => FormattableString.Invariant($"{Degrees} deg");
}
