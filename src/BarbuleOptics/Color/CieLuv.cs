using BarbuleOptics.Quantities;

namespace BarbuleOptics.Color;

/// <summary>CIE 1976 L*u*v*. Always finite; the default value is black.</summary>
/// <param name="L">Lightness L*, 0 black to 100 the white; that of L*a*b*.</param>
/// <param name="U">u*, red positive, green negative.</param>
/// <param name="V">v*, yellow positive, blue negative.</param>
/// <remarks>Source: ISO/CIE 11664-5. u* = 13 L* (u' - u'n), v* = 13 L* (v' - v'n), u' = 4X/(X + 15Y + 3Z), v' = 9Y/(X + 15Y + 3Z).</remarks>
/// <exception cref="ArgumentOutOfRangeException">A value is NaN or infinite.</exception>
public readonly record struct CieLuv(double L, double U, double V)
{
    /// <summary>Lightness L*, 0 black to 100 the white.</summary>
    public double L { get; } = Guard.Finite(L);

    /// <summary>u*, red positive, green negative.</summary>
    public double U { get; } = Guard.Finite(U);

    /// <summary>v*, yellow positive, blue negative.</summary>
    public double V { get; } = Guard.Finite(V);

    /// <summary>C*uv, the distance from the gray axis.</summary>
    public double Chroma => Math.Sqrt(U * U + V * V);

    /// <summary>The saturation s_uv = C*uv/L* = 13 times the distance of u', v' from the white's; 0 for black.</summary>
    public double Saturation => L > 0 ? Chroma / L : 0;

    /// <summary>L*u*v* of <paramref name="color"/> relative to <paramref name="white"/>.</summary>
    /// <exception cref="ArgumentOutOfRangeException">A value of <paramref name="white"/> is not above zero.</exception>
    public static CieLuv FromTristimulus(Tristimulus color, Tristimulus white)
    {
        double lightness = CieLab.FromTristimulus(color, white).L;
        UniformChromaticity place = UniformChromaticity.Of(color, white), center = UniformChromaticity.Of(white, white);
        return new CieLuv(lightness, 13 * lightness * (place.U - center.U), 13 * lightness * (place.V - center.V));
    }
}
