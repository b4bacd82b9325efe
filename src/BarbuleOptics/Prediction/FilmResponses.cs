using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Prediction;

/// <summary>R, T and A of a stack for all angles and both polarizations, solved on several threads.</summary>
internal sealed class FilmResponses
{
    /// <summary>Wavelengths a piece of work has; the pieces do not depend on the number of threads.</summary>
    private const int Block = 32;

    private readonly PredictionConditions _conditions;
    private readonly double[][] _values;

    private FilmResponses(PredictionConditions conditions, double[][] values, double errorEstimate)
    {
        _conditions = conditions;
        _values = values;
        ErrorEstimate = errorEstimate;
    }

    public double ErrorEstimate { get; }

    /// <summary>For each angle s, p and their mean.</summary>
    public IEnumerable<SpectralResponse> All
    {
        get
        {
            foreach (int angle in Enumerable.Range(0, _conditions.Incidences.Count))
            {
                yield return Of(angle, Polarizations.S);
                yield return Of(angle, Polarizations.P);
                yield return Of(angle, Polarizations.Unpolarized);
            }
        }
    }

    /// <summary>For each angle the one polarization.</summary>
    public IEnumerable<SpectralResponse> Of(Polarizations polarization)
        => Enumerable.Range(0, _conditions.Incidences.Count).Select(angle => Of(angle, polarization));

    public static FilmResponses Solve<TWorkspace>(ISpectralSolver<FilmStack, TWorkspace> solver, LayerModel model, PredictionConditions conditions, CancellationToken cancellation)
    {
        int count = conditions.Wavelengths.Count, angles = conditions.Incidences.Count;
        double[][] values = [.. Enumerable.Range(0, 6 * angles).Select(_ => new double[count])];
        var errors = new double[(count + Block - 1) / Block];
        var options = new ParallelOptions { MaxDegreeOfParallelism = conditions.Threads, CancellationToken = cancellation };
        Parallel.For(0, errors.Length, options, block => errors[block] = SolveBlock(solver, model, conditions, values, block * Block, cancellation));
        return new FilmResponses(conditions, values, errors.Max());
    }

    private static double SolveBlock<TWorkspace>(
        ISpectralSolver<FilmStack, TWorkspace> solver, LayerModel model, PredictionConditions conditions, double[][] values, int first, CancellationToken cancellation)
    {
        int length = Math.Min(Block, conditions.Wavelengths.Count - first);
        FilmStack films = model.FilmsAt(conditions.Wavelengths.Nanometres.Slice(first, length));
        TWorkspace workspace = solver.CreateWorkspace(films);
        double error = 0;
        for (int beam = 0; beam < 2 * conditions.Incidences.Count; beam++)
        {
            cancellation.ThrowIfCancellationRequested();
            var request = new SolverRequest(
                0, length, conditions.Incidences[beam / 2], beam % 2 == 0 ? Polarizations.S : Polarizations.P,
                SolverOutputs.Transmittance | SolverOutputs.Absorptance);
            error = Math.Max(error, solver.Solve(films, request, workspace, new SolverResponse
            {
                Reflectance = values[3 * beam].AsSpan(first, length),
                Transmittance = values[3 * beam + 1].AsSpan(first, length),
                Absorptance = values[3 * beam + 2].AsSpan(first, length),
            }));
        }
        return error;
    }

    private SpectralResponse Of(int angle, Polarizations polarization)
    {
        WavelengthGrid grid = _conditions.Wavelengths;
        return new SpectralResponse(
            _conditions.Incidences[angle], polarization, Part(0), Part(1), Part(2), new Spectrum(grid, new double[grid.Count]));

        Spectrum Part(int quantity)
        {
            double[] s = _values[6 * angle + quantity], p = _values[6 * angle + 3 + quantity];
            return polarization switch
            {
                Polarizations.S => new Spectrum(grid, s),
                Polarizations.P => new Spectrum(grid, p),
                _ => new Spectrum(grid, [.. s.Zip(p, (one, other) => (one + other) / 2)]),
            };
        }
    }
}
