using BarbuleOptics.Quantities;

namespace BarbuleOptics.Color;

/// <summary>CIE 1976 chromaticity coordinates u', v', in which equal distances look more nearly equal than in x, y. Always finite.</summary>
/// <param name="U">u'.</param>
/// <param name="V">v'.</param>
/// <exception cref="ArgumentOutOfRangeException">A value is NaN or infinite.</exception>
public readonly record struct UniformChromaticity(double U, double V)
{
    /// <summary>u'.</summary>
    public double U { get; } = Guard.Finite(U);

    /// <summary>v'.</summary>
    public double V { get; } = Guard.Finite(V);

    /// <summary>That of <paramref name="color"/>, or of <paramref name="white"/> where X + Y + Z is zero but for rounding, since black has none.</summary>
    /// <exception cref="ArgumentOutOfRangeException">X + 15Y + 3Z of <paramref name="white"/> is not above zero.</exception>
    public static UniformChromaticity Of(Tristimulus color, Tristimulus white)
    {
        double divisor = color.X + 15 * color.Y + 3 * color.Z;
        if (divisor > Tristimulus.LeastY)
            return new UniformChromaticity(4 * color.X / divisor, 9 * color.Y / divisor);
        double whiteDivisor = Guard.Positive(white.X + 15 * white.Y + 3 * white.Z, nameof(white));
        return new UniformChromaticity(4 * white.X / whiteDivisor, 9 * white.Y / whiteDivisor);
    }

    /// <summary>u' = 4x/(-2x + 12y + 3), v' = 9y/(-2x + 12y + 3).</summary>
    public static UniformChromaticity Of(Chromaticity place)
    {
        double divisor = -2 * place.X + 12 * place.Y + 3;
        return new UniformChromaticity(4 * place.X / divisor, 9 * place.Y / divisor);
    }
}
