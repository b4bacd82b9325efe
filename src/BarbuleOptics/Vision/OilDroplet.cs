using BarbuleOptics.Quantities;

namespace BarbuleOptics.Vision;

/// <summary>The colored oil droplet in front of a cone, which keeps short wavelengths out.</summary>
/// <param name="CutNm">Cut-off wavelength in nm, at which a twentieth passes: where the tangent to the measured absorbance at half of its greatest value meets that greatest value.</param>
/// <param name="MidNm">Wavelength in nm at which half passes; above <paramref name="CutNm"/>.</param>
/// <remarks>
/// T = exp(-exp(-2.89 b (l - cut) + 1.08)), b = 0.5/(mid - cut). Source: Hart and Vorobyev 2005, J. Comp. Physiol. A 191:381,
/// 10.1007/s00359-004-0595-3 (formula from memory).
/// </remarks>
/// <exception cref="ArgumentOutOfRangeException">A wavelength is not above 0, or the middle not above the cut-off.</exception>
public sealed record OilDroplet(double CutNm, double MidNm)
{
    /// <summary>Cut-off wavelength, in nm.</summary>
    public double CutNm { get; } = Guard.Positive(CutNm);

    /// <summary>Wavelength of half transmission, in nm.</summary>
    public double MidNm { get; } = MidNm > CutNm
        ? Guard.Positive(MidNm) : throw new ArgumentOutOfRangeException(nameof(MidNm), MidNm, "Must lie above the cut-off.");

    /// <summary>The share of light that passes at <paramref name="wavelengthNm"/>, 0 to 1.</summary>
    public double Transmittance(double wavelengthNm)
    {
        double b = 0.5 / (MidNm - CutNm);
        return Math.Exp(-Math.Exp(-2.89 * b * (wavelengthNm - CutNm) + 1.08));
    }
}
