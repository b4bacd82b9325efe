using BarbuleOptics.Quantities;

namespace BarbuleOptics.Vision;

/// <summary>What cornea, lens and vitreous body let through, as a smooth cut-off.</summary>
/// <param name="HalfNm">Wavelength in nm at which half of the light passes.</param>
/// <param name="WidthNm">Width of the edge in nm, above 0: the transmittance rises from 0.27 to 0.73 over two widths.</param>
/// <remarks>T = 1/(1 + exp((half - l)/width)), a shape of this program's own; half transmissions are published, edges seldom are.</remarks>
/// <exception cref="ArgumentOutOfRangeException">A value is not above 0.</exception>
public sealed record OcularMedia(double HalfNm, double WidthNm)
{
    /// <summary>Wavelength of half transmission, in nm.</summary>
    public double HalfNm { get; } = Guard.Positive(HalfNm);

    /// <summary>Width of the edge, in nm.</summary>
    public double WidthNm { get; } = Guard.Positive(WidthNm);

    /// <summary>The share of light that passes at <paramref name="wavelengthNm"/>, 0 to 1.</summary>
    public double Transmittance(double wavelengthNm) => 1 / (1 + Math.Exp((HalfNm - wavelengthNm) / WidthNm));
}
