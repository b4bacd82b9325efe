using BarbuleOptics.Quantities;

namespace BarbuleOptics.Color;

/// <summary>CIE chromaticity coordinates, x = X/(X+Y+Z), y = Y/(X+Y+Z). Always finite.</summary>
/// <param name="X">x.</param>
/// <param name="Y">y.</param>
/// <exception cref="ArgumentOutOfRangeException">A value is NaN or infinite.</exception>
public readonly record struct Chromaticity(double X, double Y)
{
    /// <summary>x.</summary>
    public double X { get; } = Guard.Finite(X);

    /// <summary>y.</summary>
    public double Y { get; } = Guard.Finite(Y);
}
