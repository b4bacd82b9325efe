using BarbuleOptics.Quantities;

namespace BarbuleOptics.Color;

/// <summary>CIE 1976 L*a*b*. Always finite; the default value is black.</summary>
/// <param name="L">Lightness L*, 0 black to 100 the white.</param>
/// <param name="A">a*, red positive, green negative.</param>
/// <param name="B">b*, yellow positive, blue negative.</param>
/// <remarks>Source: ISO/CIE 11664-4, with the exact constants 216/24389 and 24389/27 in place of the rounded 0.008856 and 903.3.</remarks>
/// <exception cref="ArgumentOutOfRangeException">A value is NaN or infinite.</exception>
public readonly record struct CieLab(double L, double A, double B)
{
    private const double Knee = 216.0 / 24389;
    private const double Slope = 24389.0 / 27;

    /// <summary>Lightness L*, 0 black to 100 the white.</summary>
    public double L { get; } = Guard.Finite(L);

    /// <summary>a*, red positive, green negative.</summary>
    public double A { get; } = Guard.Finite(A);

    /// <summary>b*, yellow positive, blue negative.</summary>
    public double B { get; } = Guard.Finite(B);

    /// <summary>C*ab, the distance from the gray axis.</summary>
    public double Chroma => Math.Sqrt(A * A + B * B);

    /// <summary>The hue angle h_ab in degrees, at least 0 and below 360; 0 where the chroma is 0.</summary>
    public double HueDegrees
    {
        get
        {
            double degrees = double.RadiansToDegrees(Math.Atan2(B, A));
            if (A == 0 && B == 0)
                return 0;
            // A hair below the positive a* axis, 360 less that hair rounds to 360 itself.
            return degrees >= 0 ? degrees : degrees + 360 < 360 ? degrees + 360 : 0;
        }
    }

    /// <summary>L*a*b* of <paramref name="color"/> relative to <paramref name="white"/>.</summary>
    /// <exception cref="ArgumentOutOfRangeException">A value of <paramref name="white"/> is not above zero.</exception>
    public static CieLab FromTristimulus(Tristimulus color, Tristimulus white)
    {
        double fx = Compress(color.X / Guard.Positive(white.X, nameof(white)));
        double fy = Compress(color.Y / Guard.Positive(white.Y, nameof(white)));
        double fz = Compress(color.Z / Guard.Positive(white.Z, nameof(white)));
        return new CieLab(116 * fy - 16, 500 * (fx - fy), 200 * (fy - fz));
    }

    /// <summary>The tristimulus values that have this L*a*b* relative to <paramref name="white"/>.</summary>
    /// <exception cref="ArgumentOutOfRangeException">A value of <paramref name="white"/> is not above zero.</exception>
    public Tristimulus ToTristimulus(Tristimulus white)
    {
        double fy = (L + 16) / 116;
        return new Tristimulus(
            Guard.Positive(white.X, nameof(white)) * Expand(fy + A / 500),
            Guard.Positive(white.Y, nameof(white)) * Expand(fy),
            Guard.Positive(white.Z, nameof(white)) * Expand(fy - B / 200));
    }

    // The straight part also carries the slightly negative values that measured spectra bring.
    private static double Compress(double ratio) => ratio > Knee ? Math.Cbrt(ratio) : (Slope * ratio + 16) / 116;

    private static double Expand(double f) => f > 6.0 / 29 ? f * f * f : (116 * f - 16) / Slope;
}
