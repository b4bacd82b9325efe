using BarbuleOptics.Quantities;

namespace BarbuleOptics.Spectra;

/// <summary>What a reader of a reflectance spectrum names first: its peaks, its brightness, its contrast, its ultraviolet.</summary>
/// <param name="Peaks">From the highest reflectance down; equals from the shortest wavelength up. Empty where nothing peaks inside the grid.</param>
/// <param name="RisesAtStart">Whether the spectrum still rises towards the first wavelength of its grid, so that a peak may lie beyond:
/// the end stands above the lowest point before higher ground by at least 1 % of the highest reflectance.</param>
/// <param name="RisesAtStop">The same at the last wavelength.</param>
/// <param name="MeanReflectance">Mean over 300-700 nm or the part of it that the grid covers; null where it covers none.</param>
/// <param name="Contrast">(Greatest - least)/mean over the same wavelengths; null where the mean is not above 0.</param>
/// <param name="UltravioletShare">Reflectance summed over 300-400 nm, as a share of 300-700 nm; null where the grid does not cover all
/// of 300-700 nm (a share of a part could not be compared), or the sum is not above 0.</param>
public sealed record SpectrumFeatures(
    ValueList<SpectralPeak> Peaks, bool RisesAtStart, bool RisesAtStop, double? MeanReflectance, double? Contrast, double? UltravioletShare)
{
    /// <summary>Start of the ultraviolet that birds see, in nm.</summary>
    public const double UltravioletStartNm = 300;

    /// <summary>End of the ultraviolet and start of the light that people see, in nm.</summary>
    public const double VisibleStartNm = 400;

    /// <summary>End of the light that birds see, in nm.</summary>
    public const double VisibleEndNm = 700;

    /// <summary>Whether the spectrum still rises at an end of its grid.</summary>
    public bool AtEdge => RisesAtStart || RisesAtStop;

    /// <summary>The peak with the highest reflectance; null where there is none.</summary>
    public SpectralPeak? MainPeak => Peaks.Count > 0 ? Peaks[0] : null;

    /// <summary>The features of <paramref name="reflectance"/>, a fraction at each wavelength.</summary>
    /// <remarks>
    /// Peaks are interior maxima whose prominence is at least 1 % of the highest one's reflectance. On smooth spectra sampled at 1 nm a
    /// peak lies within 0.05 nm of where samples at 0.01 nm put it, as long as it is at least 5 nm wide at half its height (0.03 nm for a Lorentzian of that width).
    /// A top of three or more equal samples lies at its middle. Integrals are trapezoids, with straight lines to 300, 400 and 700 nm.
    /// </remarks>
    public static SpectrumFeatures Of(Spectrum reflectance)
    {
        ArgumentNullException.ThrowIfNull(reflectance);
        SpectralBand? seen = SpectralBand.Covered(reflectance, UltravioletStartNm, VisibleEndNm);
        double? mean = seen?.Mean;
        double? contrast = seen is not null && mean > 0 ? (seen.Greatest - seen.Least) / mean : null;
        (bool risesAtStart, bool risesAtStop) = PeakFinder.RisesAtEnds(reflectance.Values);
        return new SpectrumFeatures(
            [.. PeakFinder.Find(reflectance)], risesAtStart, risesAtStop, mean, contrast, ShareOfUltraviolet(reflectance));
    }

    private static double? ShareOfUltraviolet(Spectrum reflectance)
    {
        if (reflectance.Grid.StartNm > UltravioletStartNm || reflectance.Grid.StopNm < VisibleEndNm)
            return null;
        double? whole = SpectralBand.Covered(reflectance, UltravioletStartNm, VisibleEndNm)?.Integral;
        double? ultraviolet = SpectralBand.Covered(reflectance, UltravioletStartNm, VisibleStartNm)?.Integral;
        return whole > 0 ? ultraviolet / whole : null;
    }
}
