using System.Numerics;
using BarbuleOptics.Color;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Vision;

/// <summary>The 5 by L matrix that turns L reflectances on one grid into the adapted photon catches of an eye: four single cones, from the shortest, and the
/// double cones.</summary>
/// <remarks>
/// <para>q = Q/Q(background), Q = integral over 300 to 700 nm of R I l S (l: photons for power), so that the background itself catches 1 in every cone
/// (von Kries adaptation). Trapezoid at 1 nm; R at whole nanometres by <see cref="SpectralResampling"/>, folded into the matrix. A spectrum that is flat
/// catches its level in all cones when the background is flat and 1.</para>
/// <para>Immutable and safe to share between threads; products allocate nothing.</para>
/// </remarks>
public sealed class CatchMatrix
{
    /// <summary>Number of rows: four single cones and the double cones.</summary>
    public const int RowCount = VisualSystem.SingleCount + 1;

    /// <summary>Row of the double cones.</summary>
    public const int DoubleRow = VisualSystem.SingleCount;

    /// <summary>Coarsest step, in nm, from which catches are computed.</summary>
    public const double CoarsestStepNm = 20;

    private readonly double[][] _rows;

    /// <summary>Prepares the products.</summary>
    /// <param name="grid">Wavelengths of the spectra; see <see cref="CanCatch"/>.</param>
    /// <param name="system">The eye. Where it has no double cones their catch is 0.</param>
    /// <param name="light">The light.</param>
    /// <param name="background">Reflectance of what the eye is adapted to, on a grid that <see cref="CanCatch"/> allows; a perfect mirror where null.</param>
    /// <exception cref="ArgumentException">A grid does not allow it, or the background is black to a cone.</exception>
    public CatchMatrix(WavelengthGrid grid, VisualSystem system, Illuminant light, Spectrum? background = null)
    {
        ArgumentNullException.ThrowIfNull(system);
        ArgumentNullException.ThrowIfNull(light);
        if (!CanCatch(grid))
            throw new ArgumentException(Allowed, nameof(grid));
        if (background is not null && !CanCatch(background.Grid))
            throw new ArgumentException(Allowed, nameof(background));
        (Grid, System, Light) = (grid, system, light);
        _rows = [.. Enumerable.Range(0, RowCount).Select(_ => new double[grid.Count])];
        var adapting = new double[RowCount];
        double[][] backgroundRows = background is null ? [] : [.. _rows.Select(_ => new double[background.Grid.Count])];
        Fill(grid, _rows, adapting);
        if (background is not null)
        {
            Fill(background.Grid, backgroundRows, adapting);
            for (int row = 0; row < RowCount; row++)
                adapting[row] = Product(backgroundRows[row], background.Values);
        }
        Adapt(adapting);
    }

    private static string Allowed => FormattableString.Invariant(
        $"Must cover {VisualSystem.StartNm} to {VisualSystem.StopNm} nm with a step of at most {CoarsestStepNm} nm.");

    /// <summary>The wavelengths of the spectra.</summary>
    public WavelengthGrid Grid { get; }

    /// <summary>The eye.</summary>
    public VisualSystem System { get; }

    /// <summary>The light.</summary>
    public Illuminant Light { get; }

    /// <summary>Whether spectra on <paramref name="grid"/> have catches: it covers 300 to 700 nm in steps of at most 20 nm. Nothing is guessed beyond its ends.</summary>
    public static bool CanCatch(WavelengthGrid grid)
    {
        ArgumentNullException.ThrowIfNull(grid);
        return grid.StartNm <= VisualSystem.StartNm && grid.StopNm >= VisualSystem.StopNm && grid.StepNm <= CoarsestStepNm;
    }

    /// <summary>The weights of one cone, one a wavelength.</summary>
    public ReadOnlySpan<double> Row(int row) => _rows[row];

    /// <summary>The adapted catches of one spectrum.</summary>
    /// <param name="reflectance">One value a wavelength.</param>
    /// <param name="catches">Receives five: the single cones from the shortest, then the double cones.</param>
    /// <exception cref="ArgumentException">A length differs.</exception>
    public void Multiply(ReadOnlySpan<double> reflectance, Span<double> catches)
    {
        Guard.SameLength(Grid.Count, reflectance.Length, nameof(reflectance));
        Guard.SameLength(RowCount, catches.Length, nameof(catches));
        for (int row = 0; row < RowCount; row++)
            catches[row] = Product(_rows[row], reflectance);
    }

    /// <summary>The adapted catches of many spectra.</summary>
    /// <param name="reflectances">Spectrum after spectrum, each one value a wavelength.</param>
    /// <param name="catches">Receives five a spectrum, spectrum after spectrum.</param>
    /// <exception cref="ArgumentException">A length differs.</exception>
    public void MultiplyAll(ReadOnlySpan<double> reflectances, Span<double> catches)
    {
        int count = reflectances.Length / Grid.Count;
        Guard.SameLength(count * Grid.Count, reflectances.Length, nameof(reflectances));
        Guard.SameLength(count * RowCount, catches.Length, nameof(catches));
        for (int i = 0; i < count; i++)
            Multiply(reflectances.Slice(i * Grid.Count, Grid.Count), catches.Slice(i * RowCount, RowCount));
    }

    /// <summary>Adds the weights of all cones, and their catches of a perfect mirror.</summary>
    private void Fill(WavelengthGrid grid, double[][] rows, double[] ofMirror)
    {
        var samples = new double[grid.Count];
        for (int nm = VisualSystem.StartNm; nm <= VisualSystem.StopNm; nm++)
        {
            double share = nm is VisualSystem.StartNm or VisualSystem.StopNm ? 0.5 : 1;
            double photons = share * nm * Light.RelativePower(Length.FromNanometres(nm));
            Array.Clear(samples);
            SpectralResampling.AddWeights(grid, nm, samples);
            for (int row = 0; row < RowCount; row++)
            {
                Cone? cone = row == DoubleRow ? System.DoubleCone : System.SingleCones[row];
                double weight = cone is null ? 0 : photons * cone.Sensitivity(System.Media, nm);
                ofMirror[row] += weight;
                for (int i = 0; i < samples.Length; i++)
                    rows[row][i] += weight * samples[i];
            }
        }
    }

    private void Adapt(double[] adapting)
    {
        for (int row = 0; row < RowCount; row++)
        {
            if (row == DoubleRow && System.DoubleCone is null)
                continue;
            if (!(adapting[row] > 0))
                throw new ArgumentException("The light on the background must reach every cone.", nameof(adapting));
            for (int i = 0; i < _rows[row].Length; i++)
                _rows[row][i] /= adapting[row];
        }
    }

    private static double Product(ReadOnlySpan<double> weights, ReadOnlySpan<double> values)
    {
        Vector<double> lanes = default;
        int i = 0;
        for (; i <= weights.Length - Vector<double>.Count; i += Vector<double>.Count)
            lanes += new Vector<double>(weights[i..]) * new Vector<double>(values[i..]);
        double sum = Vector.Sum(lanes);
        for (; i < weights.Length; i++)
            sum += weights[i] * values[i];
        return sum;
    }
}
