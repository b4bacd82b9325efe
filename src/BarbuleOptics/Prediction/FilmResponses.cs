using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;

namespace BarbuleOptics.Prediction;

/// <summary>R, T and A of a stack for all angles and polarizations, solved on several threads.</summary>
internal static class FilmResponses
{
    /// <summary>Wavelengths a piece of work has; the pieces do not depend on the number of threads.</summary>
    private const int Block = 32;

    /// <summary>Solves all beams.</summary>
    /// <returns>The powers, and the largest error estimate of the solver.</returns>
    public static (PowerTable Powers, double ErrorEstimate) Solve<TWorkspace>(
        ISpectralSolver<FilmStack, TWorkspace> solver, LayerModel model, PredictionConditions conditions, IProgress<double>? progress, CancellationToken cancellation)
    {
        var powers = new PowerTable(conditions);
        var errors = new double[(conditions.Wavelengths.Count + Block - 1) / Block];
        int done = 0;
        var options = new ParallelOptions { MaxDegreeOfParallelism = conditions.Threads, CancellationToken = cancellation };
        Parallel.For(0, errors.Length, options, block =>
        {
            errors[block] = SolveBlock(solver, model, conditions, powers, block * Block, cancellation);
            progress?.Report((double)Interlocked.Increment(ref done) / errors.Length);
        });
        return (powers, errors.Max());
    }

    private static double SolveBlock<TWorkspace>(
        ISpectralSolver<FilmStack, TWorkspace> solver, LayerModel model, PredictionConditions conditions, PowerTable powers, int first, CancellationToken cancellation)
    {
        int length = Math.Min(Block, conditions.Wavelengths.Count - first);
        FilmStack films = model.FilmsAt(conditions.Wavelengths.Nanometres.Slice(first, length));
        TWorkspace workspace = solver.CreateWorkspace(films);
        double error = 0;
        for (int angle = 0; angle < conditions.Incidences.Count; angle++)
        {
            foreach (Polarizations polarization in PowerTable.Solved(conditions))
            {
                cancellation.ThrowIfCancellationRequested();
                var request = new SolverRequest(0, length, conditions.Incidences[angle], polarization, SolverOutputs.Transmittance | SolverOutputs.Absorptance);
                error = Math.Max(error, solver.Solve(films, request, workspace, powers.Block(angle, polarization, first, length)));
            }
        }
        return error;
    }
}
