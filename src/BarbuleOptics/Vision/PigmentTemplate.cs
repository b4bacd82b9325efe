using BarbuleOptics.Quantities;

namespace BarbuleOptics.Vision;

/// <summary>Absorbance of a visual pigment with vitamin A1 from the wavelength of its peak alone.</summary>
/// <remarks>
/// Source: Govardovskii, Fyhrquist, Reuter, Kuzmin and Donner 2000, Visual Neuroscience 17:509, 10.1017/S0952523800174036, equations 1 and 2
/// (alpha band), 4 and 5 (beta band); coefficients and numbers of equations from memory. With x = peak/l:
/// alpha = 1/(exp(69.7 (a - x)) + exp(28 (0.922 - x)) + exp(-14.9 (1.104 - x)) + 0.674), a = 0.8795 + 0.0459 exp(-(peak - 300)^2/11940);
/// beta = 0.26 exp(-((l - m)/b)^2), m = 189 + 0.315 peak, b = -40.5 + 0.195 peak, all in nm. Relative to the alpha peak, within 0.2 %.
/// Measured for peaks of 357 to 620 nm. The limit of a thin receptor: absorptance, which self-screening widens, is not formed.
/// </remarks>
public static class PigmentTemplate
{
    /// <summary>Least peak allowed, in nm.</summary>
    public const double LeastPeakNm = 320;

    /// <summary>Greatest peak allowed, in nm.</summary>
    public const double MostPeakNm = 650;

    /// <summary>Both bands at <paramref name="wavelengthNm"/>, about 1 at the peak.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The peak lies outside 320 to 650 nm, or the wavelength is not above 0.</exception>
    public static double Absorbance(double peakNm, double wavelengthNm) => Alpha(peakNm, wavelengthNm) + Beta(peakNm, wavelengthNm);

    /// <summary>The main band.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The peak lies outside 320 to 650 nm, or the wavelength is not above 0.</exception>
    public static double Alpha(double peakNm, double wavelengthNm)
    {
        double x = Guard.Within(peakNm, LeastPeakNm, MostPeakNm) / Guard.Positive(wavelengthNm);
        double a = 0.8795 + 0.0459 * Math.Exp(-(peakNm - 300) * (peakNm - 300) / 11940);
        return 1 / (Math.Exp(69.7 * (a - x)) + Math.Exp(28 * (0.922 - x)) + Math.Exp(-14.9 * (1.104 - x)) + 0.674);
    }

    /// <summary>The side band at shorter wavelengths.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The peak lies outside 320 to 650 nm, or the wavelength is not above 0.</exception>
    public static double Beta(double peakNm, double wavelengthNm)
    {
        double middleNm = 189 + 0.315 * Guard.Within(peakNm, LeastPeakNm, MostPeakNm), widthNm = -40.5 + 0.195 * peakNm;
        double u = (Guard.Positive(wavelengthNm) - middleNm) / widthNm;
        return 0.26 * Math.Exp(-u * u);
    }
}
