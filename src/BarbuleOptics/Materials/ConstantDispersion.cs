using BarbuleOptics.Quantities;

namespace BarbuleOptics.Materials;

/// <summary>The same value at every wavelength.</summary>
public sealed class ConstantDispersion(double value) : IDispersion
{
    /// <summary>The value.</summary>
    public double Value { get; } = Guard.NotNegative(value);

    /// <inheritdoc/>
    public bool Extrapolates => true;

    /// <inheritdoc/>
    public double At(double wavelengthNm) => Value;
}
