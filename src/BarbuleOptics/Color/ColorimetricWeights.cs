using BarbuleOptics.Quantities;

namespace BarbuleOptics.Color;

/// <summary>The 3 by L matrix that turns L reflectances on one grid into X, Y and Z under one illuminant for one observer.</summary>
/// <remarks>
/// <para>X = 100 sum S x R / sum S y, and so on, over 360, 361 ... 780 nm (CIE 015). R at those wavelengths is linear in the values on the grid,
/// so that the interpolation is folded into the matrix:</para>
/// <para>steps of 1 nm and more: Sprague's interpolation (the value itself where the grid has the wavelength);
/// steps below 1 nm: the mean of all values nearer than 1 nm, weighted 1 - distance/1 nm, so that every value counts and noise is not
/// picked out; outside the grid: its end value.</para>
/// </remarks>
internal sealed class ColorimetricWeights
{
    private readonly double[] _x;
    private readonly double[] _y;
    private readonly double[] _z;

    public ColorimetricWeights(WavelengthGrid grid, Illuminant illuminant, StandardObserver observer)
    {
        _x = new double[grid.Count];
        _y = new double[grid.Count];
        _z = new double[grid.Count];
        ColorMatchingFunctions functions = ColorMatchingFunctions.Of(observer);
        var power = new double[ColorMatchingFunctions.Count];
        double luminance = 0;
        for (int i = 0; i < power.Length; i++)
        {
            power[i] = illuminant.RelativePower(Length.FromNanometres(ColorMatchingFunctions.FirstNm + i));
            luminance += power[i] * functions.Y[i];
        }

        var samples = new double[grid.Count];
        for (int i = 0; i < power.Length; i++)
        {
            Array.Clear(samples);
            Resample(grid, ColorMatchingFunctions.FirstNm + i, samples);
            double factor = 100 * power[i] / luminance;
            for (int j = 0; j < samples.Length; j++)
            {
                _x[j] += factor * functions.X[i] * samples[j];
                _y[j] += factor * functions.Y[i] * samples[j];
                _z[j] += factor * functions.Z[i] * samples[j];
            }
        }
    }

    /// <summary>The product with <paramref name="reflectance"/>, one value for each wavelength of the grid. Allocates nothing.</summary>
    public Tristimulus Apply(ReadOnlySpan<double> reflectance)
    {
        Guard.SameLength(_x.Length, reflectance.Length, nameof(reflectance));
        double x = 0, y = 0, z = 0;
        for (int i = 0; i < reflectance.Length; i++)
        {
            x += _x[i] * reflectance[i];
            y += _y[i] * reflectance[i];
            z += _z[i] * reflectance[i];
        }

        return new Tristimulus(x, y, z);
    }

    /// <summary>Adds to <paramref name="samples"/> the weights that give the reflectance at <paramref name="wavelengthNm"/>.</summary>
    private static void Resample(WavelengthGrid grid, int wavelengthNm, Span<double> samples)
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
