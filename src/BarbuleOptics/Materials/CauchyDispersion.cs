using BarbuleOptics.Quantities;

namespace BarbuleOptics.Materials;

/// <summary>Cauchy's equation, value = A + B / lambda^2 + C / lambda^4, lambda in nanometres.</summary>
/// <param name="a">A, without unit.</param>
/// <param name="bNm2">B, in nm^2.</param>
/// <param name="cNm4">C, in nm^4; 0 when absent.</param>
public sealed class CauchyDispersion(double a, double bNm2, double cNm4 = 0) : IDispersion
{
    /// <summary>A, without unit.</summary>
    public double A { get; } = Guard.Finite(a);

    /// <summary>B, in nm^2.</summary>
    public double BNm2 { get; } = Guard.Finite(bNm2);

    /// <summary>C, in nm^4.</summary>
    public double CNm4 { get; } = Guard.Finite(cNm4);

    /// <inheritdoc/>
    public bool Extrapolates => true;

    /// <inheritdoc/>
    public double At(double wavelengthNm)
    {
        double inverseSquare = 1 / (wavelengthNm * wavelengthNm);
        return A + inverseSquare * (BNm2 + inverseSquare * CNm4);
    }
}
