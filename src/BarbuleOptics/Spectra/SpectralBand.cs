using BarbuleOptics.Quantities;

namespace BarbuleOptics.Spectra;

/// <summary>What a spectrum, its samples joined by straight lines, amounts to between two wavelengths.</summary>
/// <param name="Integral">Trapezoid sum, in units of the spectrum times nm; 0 for a band of one wavelength.</param>
/// <param name="Mean">Integral over width; the value itself for a band of one wavelength.</param>
/// <param name="Least">Least value.</param>
/// <param name="Greatest">Greatest value.</param>
internal sealed record SpectralBand(double Integral, double Mean, double Least, double Greatest)
{
    /// <summary>The part of the band that the grid covers; null when it covers none.</summary>
    public static SpectralBand? Covered(Spectrum spectrum, double startNm, double endNm)
    {
        double from = Math.Max(startNm, spectrum.Grid.StartNm);
        double to = Math.Min(endNm, spectrum.Grid.StopNm);
        if (from > to)
            return null;

        double x = from, y = ValueAt(spectrum, from);
        double integral = 0, least = y, greatest = y;
        ReadOnlySpan<double> wavelengthsNm = spectrum.Grid.Nanometres;
        for (int i = FirstAbove(wavelengthsNm, from); x < to; i++)
        {
            bool last = wavelengthsNm[i] >= to;
            double nextX = last ? to : wavelengthsNm[i];
            double nextY = last ? ValueAt(spectrum, to) : spectrum[i];
            integral += (nextX - x) * (y + nextY) / 2;
            least = Math.Min(least, nextY);
            greatest = Math.Max(greatest, nextY);
            (x, y) = (nextX, nextY);
        }
        return new SpectralBand(integral, to > from ? integral / (to - from) : y, least, greatest);
    }

    private static double ValueAt(Spectrum spectrum, double wavelengthNm)
    {
        ReadOnlySpan<double> wavelengthsNm = spectrum.Grid.Nanometres;
        int upper = FirstAbove(wavelengthsNm, wavelengthNm);
        if (upper == wavelengthsNm.Length)
            return spectrum[upper - 1];
        double share = (wavelengthNm - wavelengthsNm[upper - 1]) / (wavelengthsNm[upper] - wavelengthsNm[upper - 1]);
        return double.Lerp(spectrum[upper - 1], spectrum[upper], share);
    }

    private static int FirstAbove(ReadOnlySpan<double> wavelengthsNm, double wavelengthNm)
    {
        int found = wavelengthsNm.BinarySearch(wavelengthNm);
        return found >= 0 ? found + 1 : ~found;
    }
}
