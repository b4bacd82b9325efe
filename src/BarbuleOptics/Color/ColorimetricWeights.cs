using BarbuleOptics.Quantities;

namespace BarbuleOptics.Color;

/// <summary>The 3 by L matrix that turns L reflectances on one grid into X, Y and Z under one illuminant for one observer.</summary>
/// <remarks>
/// X = 100 sum S x R / sum S y, and so on, over 360, 361 ... 780 nm or over every fifth of them (CIE 015). R at those wavelengths is linear in the
/// values on the grid, so that <see cref="SpectralResampling"/> is folded into the matrix.
/// </remarks>
internal sealed class ColorimetricWeights
{
    private readonly double[] _x;
    private readonly double[] _y;
    private readonly double[] _z;

    public ColorimetricWeights(WavelengthGrid grid, Illuminant illuminant, StandardObserver observer, int stepNm)
    {
        _x = new double[grid.Count];
        _y = new double[grid.Count];
        _z = new double[grid.Count];
        ColorMatchingFunctions functions = ColorMatchingFunctions.Of(observer);
        var power = new double[ColorMatchingFunctions.Count];
        double luminance = 0;
        for (int i = 0; i < power.Length; i += stepNm)
        {
            power[i] = illuminant.RelativePower(Length.FromNanometres(ColorMatchingFunctions.FirstNm + i));
            luminance += power[i] * functions.Y[i];
        }

        var samples = new double[grid.Count];
        for (int i = 0; i < power.Length; i += stepNm)
        {
            Array.Clear(samples);
            SpectralResampling.AddWeights(grid, ColorMatchingFunctions.FirstNm + i, samples);
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
}
