using BarbuleOptics.Quantities;

namespace BarbuleOptics.Materials;

/// <summary>Sellmeier's equation, n^2 = A + sum B_i lambda^2 / (lambda^2 - C_i), lambda in micrometres.</summary>
/// <remarks>A is 1 in the usual form. Within a resonance n^2 may fall below zero; <see cref="At"/> is NaN there, so a range ends before it.</remarks>
public sealed class SellmeierDispersion : IDispersion
{
    private readonly double[] _strengths;
    private readonly double[] _resonancesUm2;

    /// <summary>From the constant term, the strengths B_i and the squared resonance wavelengths C_i in um^2.</summary>
    /// <exception cref="ArgumentException">The numbers of B and C differ.</exception>
    public SellmeierDispersion(double constantTerm, ReadOnlySpan<double> strengths, ReadOnlySpan<double> resonancesUm2)
    {
        Guard.SameLength(strengths.Length, resonancesUm2.Length, nameof(resonancesUm2));
        ConstantTerm = Guard.Finite(constantTerm);
        _strengths = strengths.ToArray();
        _resonancesUm2 = resonancesUm2.ToArray();
    }

    /// <summary>A, 1 in the usual form.</summary>
    public double ConstantTerm { get; }

    /// <summary>B_i.</summary>
    public ReadOnlySpan<double> Strengths => _strengths;

    /// <summary>C_i, in um^2.</summary>
    public ReadOnlySpan<double> ResonancesUm2 => _resonancesUm2;

    /// <inheritdoc/>
    public bool Extrapolates => true;

    /// <inheritdoc/>
    public double At(double wavelengthNm)
    {
        double lambda2 = wavelengthNm * wavelengthNm * 1e-6;
        double square = ConstantTerm;
        for (int i = 0; i < _strengths.Length; i++)
            square += _strengths[i] * lambda2 / (lambda2 - _resonancesUm2[i]);
        return Math.Sqrt(square);
    }
}
