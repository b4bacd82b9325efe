using System.Diagnostics.CodeAnalysis;
using BarbuleOptics.Anatomy;
using BarbuleOptics.Color;
using BarbuleOptics.Ensembles.Draws;
using BarbuleOptics.Ensembles.Spreads;
using BarbuleOptics.Ensembles.Statistics;
using BarbuleOptics.Materials;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra;

namespace BarbuleOptics.Ensembles;

/// <summary>Carries the spread of the measurements into spectra, peaks, colors and hue terms.</summary>
public static class EnsemblePredictor
{
    /// <summary>Draws made under each further set of melanin constants, at most.</summary>
    private const int MostMelaninDraws = 2048;

    /// <summary>Share of truncated draws above which their bias is warned of.</summary>
    private const double MostTruncated = 0.05;

    /// <summary>Share of draws without the peak above which is warned.</summary>
    private const double MostLost = 0.01;

    /// <summary>Draws and solves.</summary>
    /// <param name="barbule">The structure with its spreads.</param>
    /// <param name="conditions">How it is looked at.</param>
    /// <param name="options">How many draws, of which spread.</param>
    /// <param name="catalog">Where its materials are.</param>
    /// <param name="ensemble">The result; null when there are problems.</param>
    /// <param name="problems">Everything that forbids one, each with the key at fault.</param>
    /// <param name="progress">Told the share of the work that is done, 0 to 1, from any thread; null for nobody.</param>
    /// <param name="cancellation">Ends the work early with an <see cref="OperationCanceledException"/>.</param>
    public static bool TryPredict(
        Barbule barbule, PredictionConditions conditions, DrawOptions options, IMaterialCatalog catalog, [NotNullWhen(true)] out EnsemblePrediction? ensemble,
        out IReadOnlyList<AnatomyProblem> problems, IProgress<double>? progress = null, CancellationToken cancellation = default)
    {
        ArgumentNullException.ThrowIfNull(barbule);
        ArgumentNullException.ThrowIfNull(conditions);
        ArgumentNullException.ThrowIfNull(options);
        ArgumentNullException.ThrowIfNull(catalog);
        ensemble = null;
        if (Predictor.Checked(barbule, conditions, catalog, out problems) is null)
            return false;
        DrawPlan? plan = DrawPlanner.Plan(barbule, options.Spread, conditions, out problems, out IReadOnlyList<PredictionWarning> warnings);
        if (plan is null)
            return false;
        var parts = new DrawProgress(progress, options.Draws, MelaninDraws(barbule, options));
        if (!DrawSetup.TryMake(plan, conditions, catalog, shares: true, out DrawSetup? setup, out problems, cancellation))
            return false;
        DrawRun run = Run(setup, setup.Plan, setup.Solver, conditions, options.Draws, options.Seed, parts.Next(options.Draws), cancellation);
        if (run.Views[0].Solved == 0)
        {
            problems = [new AnatomyProblem(plan.Slots[plan.Drawn.Count > 0 ? plan.Drawn[0] : 0].Key, "none of the draws could be solved; ask for the layer model with --solver multilayer")];
            return false;
        }
        DrawnView[] views = [.. run.Views.Select((view, angle) => ViewOf(view, angle, run, setup, conditions))];
        if (options.ComparesMelanins && setup.Reader.HasColor && MelaninSets.AreIn(barbule))
            views = WithMelanins(views, setup, conditions, options, catalog, parts, cancellation);
        ValueList<DrawnLength> lengths = [.. LengthsOf(setup.Plan, run)];
        ensemble = new EnsemblePrediction
        {
            Options = options,
            Solver = setup.Solver.Plan.IsRigorous ? SolverNames.Grating : SolverNames.Multilayer,
            Replicates = run.Replicates,
            EffectiveDegrees = double.IsFinite(setup.Plan.EffectiveDegrees) ? setup.Plan.EffectiveDegrees : null,
            Solved = run.Views[0].Solved,
            ErrorEstimate = run.LargestError,
            Lengths = lengths,
            Views = [.. views],
            Warnings = [.. warnings, .. WarningsOf(lengths, run, views)],
        };
        return true;
    }

    private static DrawRun Run(
        DrawSetup setup, DrawPlan plan, DrawSolver solver, PredictionConditions conditions, int draws, long seed, IProgress<double>? progress, CancellationToken cancellation)
    {
        var run = new DrawRun(plan, solver, setup.Reader, setup.Followers, conditions, draws, (ulong)seed);
        run.Run(progress, cancellation);
        return run;
    }

    private static int MelaninDraws(Barbule barbule, DrawOptions options)
        => options.ComparesMelanins && MelaninSets.AreIn(barbule) ? Math.Min(MostMelaninDraws, options.Draws) : 0;

    /// <summary>Draws again under each set of melanin constants: the same lengths, so that differences are the constants' own.</summary>
    private static DrawnView[] WithMelanins(
        DrawnView[] views, DrawSetup setup, PredictionConditions conditions, DrawOptions options, IMaterialCatalog catalog, DrawProgress parts, CancellationToken cancellation)
    {
        int draws = MelaninDraws(setup.Plan.Barbule, options);
        var melanins = views.Select(_ => new List<MelaninTerms>()).ToArray();
        foreach (string name in MelaninSets.Names)
        {
            IProgress<double>? part = parts.Next(draws);
            if (!catalog.TryFind(new MaterialReference.Named(name), out Material? material) || (!material.Extrapolates && !material.Covers(conditions.Wavelengths)))
                continue;
            DrawPlan plan = setup.Plan.Of(MelaninSets.Replace(setup.Plan.Barbule, name));
            DrawRun run = Run(setup, plan, setup.Solver.For(plan, cancellation), conditions, draws, options.Seed, part, cancellation);
            for (int angle = 0; angle < views.Length; angle++)
                melanins[angle].Add(new MelaninTerms(name, draws, TermsOf(run.Views[angle]), run.Views[angle].Outcome(OutcomeReader.Hue)?.Median));
        }
        return [.. views.Select((view, angle) => view with { Melanins = [.. melanins[angle]] })];
    }

    private static DrawnView ViewOf(ViewColumns columns, int angle, DrawRun run, DrawSetup setup, PredictionConditions conditions)
    {
        WavelengthGrid grid = conditions.Wavelengths;
        DrawnValue[] values = [.. Enumerable.Range(0, grid.Count).Select(wavelength => columns.Reflectance(wavelength)!)];
        var mean = new Spectrum(grid, [.. values.Select(value => value.Mean)]);
        return new DrawnView
        {
            Incidence = conditions.Incidences[angle],
            Polarization = conditions.Polarization,
            Bands = new ReflectanceBands(
                Of(value => value.Median), Of(value => value.From50), Of(value => value.To50), Of(value => value.From95), Of(value => value.To95), mean,
                values.Max(value => value.MedianError), values.Max(value => Math.Max(value.From95Error, value.To95Error))),
            MeanFeatures = SpectrumFeatures.Of(mean),
            MeanColor = setup.Reader.Colorimeter.TryMeasure(mean, out CieColor? color) ? color : null,
            Values = [.. setup.Reader.Outcomes.Select((outcome, i) => (outcome.Name, columns.Outcome(i)!)).Where(value => value.Item2 is not null)],
            Terms = TermsOf(columns),
            FollowedPeakNm = setup.Followers[angle].HasPeak ? setup.Followers[angle].PeakNm : null,
            PeakLostShare = (double)columns.Lost / run.Draws,
            OtherPeakShare = (double)columns.OtherHighest / run.Draws,
        };

        Spectrum Of(Func<DrawnValue, double> part) => new(grid, [.. values.Select(part)]);
    }

    private static ValueList<TermShare> TermsOf(ViewColumns columns)
        => [.. columns.Terms().OrderByDescending(term => term.Share).Select(term => new TermShare(term.Term, term.Share, term.Error))];

    /// <summary>One entry a measurement; where rows are drawn by themselves it stands for all of them.</summary>
    private static IEnumerable<DrawnLength> LengthsOf(DrawPlan plan, DrawRun run)
        => plan.Drawn.Order().GroupBy(slot => plan.Slots[slot].Key).Select(slots => plan.Described(
            slots.First(), slots.Average(one => (double)run.Moved(one).Count / run.Draws), slots.Average(one => run.Moved(one).BiasNm)));

    private static IEnumerable<PredictionWarning> WarningsOf(IEnumerable<DrawnLength> lengths, DrawRun run, DrawnView[] views)
    {
        foreach (DrawnLength length in lengths.Where(length => length.TruncatedShare > MostTruncated))
        {
            string instead = length.Key.EndsWith("spacing", StringComparison.Ordinal) ? "; measured as separation (surface to surface) it cannot overlap"
                : length.Key.EndsWith("pitch", StringComparison.Ordinal) ? "; measured as row_separation (surface to surface) it cannot overlap" : "";
            yield return new PredictionWarning(WarningCodes.DrawsTruncated, FormattableString.Invariant(
                $"{100 * length.TruncatedShare:0} % of the draws of {length.Key} could not be (below 0, or overlapping) and took the nearest length that can; their mean is off by {length.Bias:+0.##;-0.##} {(length.Unit.Length > 0 ? length.Unit + " " : "")}by that{instead}"));
        }
        long failed = run.Draws - run.Views[0].Solved;
        if (failed > 0)
            yield return new PredictionWarning(WarningCodes.DrawsFailed, FormattableString.Invariant($"{failed} of {run.Draws} draws could not be solved to an error of {GratingResponses.MostError} and were left out"));
        foreach (DrawnView view in views.Where(view => view.PeakLostShare > MostLost))
        {
            yield return new PredictionWarning(WarningCodes.PeakLost, FormattableString.Invariant(
                $"the peak at {view.FollowedPeakNm:0.#} nm is not found again in {100 * view.PeakLostShare:0.#} % of the draws (it leaves the wavelengths, fades, or passes into another); its intervals are those of the rest"), view.Incidence);
        }
    }
}
