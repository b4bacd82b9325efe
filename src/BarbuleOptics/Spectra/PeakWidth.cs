using BarbuleOptics.Quantities;

namespace BarbuleOptics.Spectra;

/// <summary>Measures how wide a peak is at a level below its top.</summary>
internal static class PeakWidth
{
    /// <summary>Distance in nm of the first crossings of a level on both sides of a summit, by linear interpolation.</summary>
    /// <param name="level">Below the summit's height.</param>
    /// <param name="summit">The peak's top.</param>
    /// <param name="left">Last sample of the next peak on the left, or 0: the valley lies between, and the search ends there.</param>
    /// <param name="right">First sample of the next peak on the right, or the last sample.</param>
    /// <param name="spectrum">The spectrum.</param>
    /// <returns>Null where a side does not fall to the level before it rises to the next peak or the grid ends.</returns>
    public static double? At(double level, Summit summit, int left, int right, Spectrum spectrum)
        => Crossing(level, summit, right, spectrum) - Crossing(level, summit, left, spectrum);

    private static double? Crossing(double level, Summit summit, int limit, Spectrum spectrum)
    {
        int step = limit < summit.First ? -1 : 1;
        ReadOnlySpan<double> wavelengthsNm = spectrum.Grid.Nanometres;
        double x = summit.WavelengthNm, y = summit.Height;
        for (int i = step < 0 ? summit.First : summit.Last; i != limit + step; i += step)
        {
            if ((wavelengthsNm[i] - x) * step <= 0)
                continue; // The vertex lies beyond this sample.
            if (spectrum[i] <= level)
                return x + (wavelengthsNm[i] - x) * (y - level) / (y - spectrum[i]);
            (x, y) = (wavelengthsNm[i], spectrum[i]);
        }
        return null;
    }
}
