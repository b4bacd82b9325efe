using BarbuleOptics.Quantities;

namespace BarbuleOptics.Ensembles;

/// <summary>How the reflectance scatters at each wavelength by itself.</summary>
/// <param name="Median">Half of the draws lie below.</param>
/// <param name="From50">The middle 50 % lie above.</param>
/// <param name="To50">The middle 50 % lie below.</param>
/// <param name="From95">The middle 95 % lie above.</param>
/// <param name="To95">The middle 95 % lie below.</param>
/// <param name="Mean">Mean of the intensities: what an instrument sees over many barbules, or over many places of disorder.</param>
/// <param name="MedianError">Largest standard error of the median over all wavelengths, from too few draws.</param>
/// <param name="EndError">The same of the ends of the 95 % band.</param>
public sealed record ReflectanceBands(
    Spectrum Median, Spectrum From50, Spectrum To50, Spectrum From95, Spectrum To95, Spectrum Mean, double MedianError, double EndError);
