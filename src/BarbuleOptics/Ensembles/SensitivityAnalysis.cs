using System.Diagnostics.CodeAnalysis;
using BarbuleOptics.Anatomy;
using BarbuleOptics.Ensembles.Draws;
using BarbuleOptics.Ensembles.Sensitivity;
using BarbuleOptics.Ensembles.Spreads;
using BarbuleOptics.Ensembles.Statistics;
using BarbuleOptics.Materials;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Ensembles;

/// <summary>Tells which measurement decides peak, hue and chroma: where to measure better, and where not to bother.</summary>
/// <remarks>Correlated measurements (replicates of the same units) stand together as one input, for their shares cannot be told apart.</remarks>
public static class SensitivityAnalysis
{
    /// <summary>Fewest base points.</summary>
    private const int LeastPoints = 16;

    /// <summary>Points of an outcome below which its shares are not given.</summary>
    private const double LeastKept = 0.5;

    /// <summary>Computes the shares.</summary>
    /// <param name="barbule">The structure with its spreads.</param>
    /// <param name="conditions">How it is looked at.</param>
    /// <param name="options">How many draws in all, of which spread.</param>
    /// <param name="catalog">Where its materials are.</param>
    /// <param name="result">The shares; null when there are problems.</param>
    /// <param name="problems">Everything that forbids them, each with the key at fault.</param>
    /// <param name="progress">Told the share of the work that is done, 0 to 1, from any thread; null for nobody.</param>
    /// <param name="cancellation">Ends the work early with an <see cref="OperationCanceledException"/>.</param>
    public static bool TryAnalyze(
        Barbule barbule, PredictionConditions conditions, DrawOptions options, IMaterialCatalog catalog, [NotNullWhen(true)] out SensitivityResult? result,
        out IReadOnlyList<AnatomyProblem> problems, IProgress<double>? progress = null, CancellationToken cancellation = default)
    {
        ArgumentNullException.ThrowIfNull(barbule);
        ArgumentNullException.ThrowIfNull(conditions);
        ArgumentNullException.ThrowIfNull(options);
        ArgumentNullException.ThrowIfNull(catalog);
        result = null;
        if (Predictor.Checked(barbule, conditions, catalog, out problems) is null)
            return false;
        DrawPlan? plan = DrawPlanner.Plan(barbule, options.Spread, conditions, out problems, out IReadOnlyList<PredictionWarning> warnings);
        if (plan is null)
            return false;
        if (!DrawSetup.TryMake(plan, conditions, catalog, shares: false, out DrawSetup? setup, out problems, cancellation))
            return false;
        (string Key, int[] Dimensions)[] inputs = [.. setup.Plan.Inputs()];
        int points = Math.Max(LeastPoints, options.Draws / (inputs.Length + 2));
        var run = new SensitivityRun(setup, conditions, [.. inputs.Select(input => input.Dimensions)], points, (ulong)options.Seed);
        run.Run(progress, cancellation);
        result = new SensitivityResult
        {
            Options = options,
            Solver = setup.Solver.Plan.IsRigorous ? SolverNames.Grating : SolverNames.Multilayer,
            Points = points,
            Replicates = run.Replicates,
            Lengths = [.. setup.Plan.Drawn.Order().GroupBy(slot => setup.Plan.Slots[slot].Key).Select(slots => setup.Plan.Described(slots.First(), 0, 0))],
            Views = [.. conditions.Incidences.Select((incidence, angle) => ViewOf(incidence, run.Shares[angle], run, inputs))],
            Warnings = [.. warnings],
        };
        return true;
    }

    private static SensitivityView ViewOf(Angle incidence, VarianceShares[][] shares, SensitivityRun run, (string Key, int[] Dimensions)[] inputs)
    {
        var outcomes = new List<OutcomeShares>();
        for (int outcome = 0; outcome < OutcomeKinds.All.Count; outcome++)
        {
            VarianceShares all = shares[outcome][^1];
            VarianceShares[] replicates = [.. shares[outcome].SkipLast(1).Where(one => one.Variance > 0)];
            if (all.Count < LeastKept * run.Points || !(all.Variance > 0))
                continue;
            IEnumerable<InputShare> found = inputs.Select((input, i) => new InputShare(
                input.Key, all.First(i), ReplicateError.Of(replicates.Select(one => one.First(i))), all.Total(i), ReplicateError.Of(replicates.Select(one => one.Total(i)))));
            double deviation = Math.Sqrt(all.Variance);
            outcomes.Add(new OutcomeShares(
                OutcomeKinds.All[outcome].Name, OutcomeKinds.All[outcome].IsAngle ? double.RadiansToDegrees(deviation) : deviation,
                [.. found.OrderByDescending(share => share.Total).ThenBy(share => share.Key, StringComparer.Ordinal)]));
        }
        return new SensitivityView(incidence, [.. outcomes], (double)shares[0][^1].Count / run.Points);
    }
}
