using BarbuleOptics.Quantities;

namespace BarbuleOptics.Color;

/// <summary>CIE tristimulus values; a perfect mirror (reflectance 1 everywhere) has Y = 100. Always finite; the default value is black.</summary>
/// <param name="X">X.</param>
/// <param name="Y">Y, the luminous reflectance in percent.</param>
/// <param name="Z">Z.</param>
/// <exception cref="ArgumentOutOfRangeException">A value is NaN or infinite.</exception>
public readonly record struct Tristimulus(double X, double Y, double Z)
{
    /// <summary>Y of a reflectance of 1e-9: below lies the rounding of a solver, and nothing has a color.</summary>
    internal const double LeastY = 1e-7;

    /// <summary>X.</summary>
    public double X { get; } = Guard.Finite(X);

    /// <summary>Y, the luminous reflectance in percent.</summary>
    public double Y { get; } = Guard.Finite(Y);

    /// <summary>Z.</summary>
    public double Z { get; } = Guard.Finite(Z);

    /// <summary>All three times <paramref name="factor"/>: the same chromaticity, lighter or darker.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The result is NaN or infinite.</exception>
    public Tristimulus Scale(double factor) => new(factor * X, factor * Y, factor * Z);

    /// <summary>The chromaticity; that of <paramref name="white"/> where X + Y + Z is zero but for rounding (below 1e-7), since black has none.</summary>
    /// <param name="white">What stands in for black; its own sum must be above zero.</param>
    /// <exception cref="ArgumentOutOfRangeException">The sum of <paramref name="white"/> is not above zero.</exception>
    public Chromaticity ChromaticityOr(Tristimulus white)
    {
        double whiteSum = Guard.Positive(white.X + white.Y + white.Z, nameof(white));
        double sum = X + Y + Z;
        return sum > LeastY ? new Chromaticity(X / sum, Y / sum) : new Chromaticity(white.X / whiteSum, white.Y / whiteSum);
    }
}
