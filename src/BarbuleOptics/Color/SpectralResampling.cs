using BarbuleOptics.Quantities;

namespace BarbuleOptics.Color;

/// <summary>The value of a spectrum at a whole nanometre as weights of its samples.</summary>
/// <remarks>
/// Steps of 1 nm and more: Sprague's interpolation (the value itself where the grid has the wavelength); steps below 1 nm: the mean of all values
/// nearer than 1 nm, weighted 1 - distance/1 nm, so that every value counts and noise is not picked out; outside the grid: its end value.
/// </remarks>
internal static class SpectralResampling
{
    /// <summary>Adds to <paramref name="samples"/>, all zero, the weights that give the value at <paramref name="wavelengthNm"/>.</summary>
    public static void AddWeights(WavelengthGrid grid, int wavelengthNm, Span<double> samples)
    {
        if (wavelengthNm <= grid.StartNm)
            samples[0] = 1;
        else if (wavelengthNm >= grid.StopNm)
            samples[^1] = 1;
        else if (grid.StepNm >= 1)
            SpragueInterpolation.AddWeights(Math.Min((wavelengthNm - grid.StartNm) / grid.StepNm, grid.Count - 1), 1, samples);
        else
            Average(grid, wavelengthNm, samples);
    }

    private static void Average(WavelengthGrid grid, int wavelengthNm, Span<double> samples)
    {
        ReadOnlySpan<double> wavelengthsNm = grid.Nanometres;
        int first = Math.Max(0, (int)((wavelengthNm - 1 - grid.StartNm) / grid.StepNm));
        double sum = 0;
        for (int j = first; j < samples.Length && wavelengthsNm[j] < wavelengthNm + 1; j++)
        {
            samples[j] = Math.Max(0, 1 - Math.Abs(wavelengthsNm[j] - wavelengthNm));
            sum += samples[j];
        }

        for (int j = first; j < samples.Length && wavelengthsNm[j] < wavelengthNm + 1; j++)
            samples[j] /= sum;
    }
}
