using BarbuleOptics.Quantities;

namespace BarbuleOptics.Materials;

/// <summary>Exponential fall towards the red, value = A exp(-lambda / B), as melanin's absorption is fitted.</summary>
/// <param name="amplitude">A, 0 or above.</param>
/// <param name="decayNm">B, in nanometres, above 0.</param>
public sealed class ExponentialAbsorption(double amplitude, double decayNm) : IDispersion
{
    /// <summary>A.</summary>
    public double Amplitude { get; } = Guard.NotNegative(amplitude);

    /// <summary>B, in nanometres.</summary>
    public double DecayNm { get; } = Guard.Positive(decayNm);

    /// <inheritdoc/>
    public bool Extrapolates => true;

    /// <inheritdoc/>
    public double At(double wavelengthNm) => Amplitude * Math.Exp(-wavelengthNm / DecayNm);
}
