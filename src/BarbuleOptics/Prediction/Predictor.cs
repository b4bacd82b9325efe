using System.Diagnostics.CodeAnalysis;
using BarbuleOptics.Anatomy;
using BarbuleOptics.Color;
using BarbuleOptics.Layering;
using BarbuleOptics.Materials;
using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra;
using BarbuleOptics.Vision;

namespace BarbuleOptics.Prediction;

/// <summary>The main job: from a measured structure to spectra, color and hue, with what they lean on.</summary>
public static class Predictor
{
    /// <summary>Predicts what <paramref name="barbule"/> does to light.</summary>
    /// <param name="barbule">The structure; its central measurements are used.</param>
    /// <param name="conditions">How it is looked at, and by which solver.</param>
    /// <param name="catalog">Where its materials are.</param>
    /// <param name="prediction">The prediction; null when there are problems.</param>
    /// <param name="problems">Everything that forbids one, each with the key at fault.</param>
    /// <param name="progress">Told the share of the work that is done, 0 to 1, from any thread; null for nobody.</param>
    /// <param name="cancellation">Ends the work early with an <see cref="OperationCanceledException"/>.</param>
    /// <exception cref="ArgumentException">A mixing rule is named beside <see cref="SolverChoice.Grating"/>.</exception>
    public static bool TryPredict(
        Barbule barbule, PredictionConditions conditions, IMaterialCatalog catalog, [NotNullWhen(true)] out StructurePrediction? prediction,
        out IReadOnlyList<AnatomyProblem> problems, IProgress<double>? progress = null, CancellationToken cancellation = default)
    {
        ArgumentNullException.ThrowIfNull(barbule);
        ArgumentNullException.ThrowIfNull(conditions);
        ArgumentNullException.ThrowIfNull(catalog);
        if (conditions is { Solver: SolverChoice.Grating, Mixing: not null })
            throw new ArgumentException("The grating solver averages nothing, so that no mixing rule can be named beside it.", nameof(conditions));
        prediction = null;
        if (Checked(barbule, conditions, catalog, out problems) is not Section section)
            return false;
        try
        {
            prediction = Predict(barbule, section, SolverPlan.Of(section, conditions), conditions, catalog, progress, cancellation);
            return true;
        }
        catch (Exception fault) when (UnsolvedIn(fault) is Exception unsolved)
        {
            problems = [new AnatomyProblem(SpacingKey(section), $"{unsolved.Message.TrimEnd('.')}; ask for the layer model with --solver multilayer")];
            return false;
        }
    }

    /// <summary>The section of a structure that can be solved under some conditions; null, with everything that forbids it, where it cannot.</summary>
    internal static Section? Checked(Barbule barbule, PredictionConditions conditions, IMaterialCatalog catalog, out IReadOnlyList<AnatomyProblem> problems)
    {
        if (!SectionBuilder.TryBuild(barbule, out Section? section, out problems))
            return null;
        SolverPlan plan = SolverPlan.Of(section, conditions);
        problems = [.. AxisProblems(section, plan), .. PeriodProblems(section, plan, conditions), .. MaterialCheck.Find(MaterialUse.Of(barbule, section), conditions.Wavelengths, catalog)];
        return problems.Count > 0 ? null : section;
    }

    /// <summary>What the grating solver throws where it finds no solution, alone or from several threads; null for any other fault.</summary>
    private static Exception? UnsolvedIn(Exception fault)
    {
        IEnumerable<Exception> faults = fault is AggregateException several ? several.InnerExceptions : [fault];
        return faults.FirstOrDefault(one => one.GetType() == typeof(ArithmeticException));
    }

    private static string Unreliable(GratingResponses rigorous, PredictionConditions conditions)
    {
        (Angle incidence, double wavelengthNm, double error) = rigorous.Worst;
        string closer = conditions.Accuracy > GratingResponses.MostError ? ", ask for a smaller --accuracy" : "";
        return FormattableString.Invariant(
            $"the rigorous solution may be off by {error:0.00} at {wavelengthNm:0.###} nm and {incidence.Degrees:0.##} degrees, more than the {GratingResponses.MostError} an answer may{closer}; try longer --wavelengths");
    }

    private static IEnumerable<AnatomyProblem> PeriodProblems(Section section, SolverPlan plan, PredictionConditions conditions)
    {
        if (plan.IsRigorous && SolverPlan.PeriodBeyondNm(section, conditions) is double periodNm)
        {
            double mostNm = SolverPlan.MostPeriods * conditions.Wavelengths.StartNm;
            yield return new AnatomyProblem(SpacingKey(section), FormattableString.Invariant(
                $"found rows that repeat after {periodNm:0.##} nm; the grating solver allows up to {SolverPlan.MostPeriods} wavelengths, {mostNm:0.##} nm: ask for the layer model with --solver multilayer, or for longer --wavelengths"));
        }
    }

    /// <summary>The longest spacing.</summary>
    private static string SpacingKey(Section section)
        => section.Runs.Count == 0 ? "barbule.matrix" : FormattableString.Invariant($"layer{section.Runs.MaxBy(run => run.SpacingNm)!.LayerNumber}.spacing");

    private static IEnumerable<AnatomyProblem> AxisProblems(Section section, SolverPlan plan)
    {
        if (!plan.IsRigorous && !SolverPlan.HasLayerModel(section))
        {
            yield return new AnatomyProblem("barbule.axis", FormattableString.Invariant(
                $"found {section.Axis.Degrees} degrees; the layer model allows across (0) or along (90) only, the grating solver any angle: leave --mixing and --solver multilayer out"));
        }
    }

    private static StructurePrediction Predict(
        Barbule barbule, Section section, SolverPlan plan, PredictionConditions conditions, IMaterialCatalog catalog, IProgress<double>? progress,
        CancellationToken cancellation)
    {
        bool thinBack = HoldsNoFringe(section, conditions.Wavelengths, catalog);
        if (thinBack)
            section = section with { Back = section.Back! with { Coherent = true } };
        GratingResponses? rigorous = plan.SolvesSection ? GratingResponses.Solve(section, conditions, catalog, progress, cancellation) : null;
        if (plan.IsRigorous && rigorous!.IsUnreliable)
            throw new ArithmeticException(Unreliable(rigorous, conditions));
        LayerModelResponses? films = plan.SolvesFilms ? LayerModelResponses.Solve(section, plan, conditions, catalog, plan.SolvesSection ? null : progress, cancellation) : null;
        double error = plan.IsRigorous ? rigorous!.ErrorEstimate : films!.ErrorEstimate;

        List<Material> materials = [.. MaterialUse.Of(barbule, section).Select(use => Find(catalog, use.Reference)).Distinct()];
        Material surround = Find(catalog, section.Surround);
        var warnings = new WarningCollector(barbule, section, conditions, plan.IsRigorous);
        warnings.AboutStructure(materials);
        if (thinBack)
            warnings.AboutThinBack();
        warnings.AboutOrders(surround, Find(catalog, barbule.Matrix));
        SpacingReport? spacings = rigorous is { } && (plan.IsRigorous || !rigorous.IsUnreliable) ? SpacingReport.Of(section, conditions, catalog, cancellation) : null;
        if (plan.IsRigorous)
        {
            warnings.AboutSpacings(spacings);
            warnings.AboutAccuracy(rigorous!);
        }
        else
        {
            warnings.AboutSlices(error);
            warnings.AboutReference(rigorous, spacings);
            if (rigorous is { IsUnreliable: true })
                rigorous = null;
        }

        var colorimeter = new Colorimeter(conditions.Wavelengths, conditions.Illuminant, conditions.Observer, conditions.Summation);
        BirdEye[] eyes = CatchMatrix.CanCatch(conditions.Wavelengths)
            ? [.. conditions.Eyes.Select(system => new BirdEye(conditions.Wavelengths, system, conditions.Illuminant, conditions.Background?.Reflectance))] : [];
        warnings.AboutCoverage(colorimeter.CanMeasure, colorimeter.CoversObserver);
        warnings.AboutEyes(CatchMatrix.CanCatch(conditions.Wavelengths));
        View[] views = [.. ViewsOf(plan.IsRigorous ? rigorous!.Powers : films!.Powers, colorimeter, eyes)];
        if (rigorous is not null && films is not null)
            views = Compared(views, [.. ViewsOf(plan.IsRigorous ? films.Powers : rigorous.Powers, colorimeter, [])], plan);
        PeakTrack track = TrackOf(views, surround);
        InstrumentSignal[]? signals = conditions.Instrument is null ? null : InstrumentSignals.Solve(section, plan, conditions, catalog, progress, cancellation);
        if (signals is not null)
        {
            views = [.. views.Zip(signals, (view, signal) => ReadWith(view, signal, colorimeter, eyes))];
            warnings.AboutSignals(signals);
        }
        foreach (View view in views)
            warnings.AboutView(view);
        warnings.AboutLayerModel(views);

        return new StructurePrediction
        {
            Barbule = barbule,
            Section = section,
            Conditions = conditions,
            Solver = plan.IsRigorous ? SolverNames.Grating : SolverNames.Multilayer,
            Mixing = plan.IsRigorous || section.IsFilms ? null : plan.Rule.Name,
            CoreMixing = section.Materials.Any(material => material.IsAveraged) ? PorousCore.Name : null,
            ErrorEstimate = error,
            FilmCount = plan.IsRigorous ? null : films!.FilmCount,
            Materials = [.. materials],
            Responses = [.. (plan.IsRigorous ? rigorous!.Powers : films!.Powers).All],
            Orders = plan.IsRigorous ? [.. rigorous!.Orders] : [],
            Losses = plan.IsRigorous ? [.. rigorous!.Losses] : [],
            MovedSpacings = plan.IsRigorous && spacings is not null ? spacings.Moves : [],
            MovedUpToNm = plan.IsRigorous ? spacings?.LongestNm : null,
            Views = [.. views],
            Track = track,
            Warnings = warnings.All,
        };
    }

    private static IEnumerable<View> ViewsOf(PowerTable powers, Colorimeter colorimeter, BirdEye[] eyes)
        => powers.Seen.Select(response => new View(
            response.Incidence, response.Polarization, response.Reflectance, SpectrumFeatures.Of(response.Reflectance),
            colorimeter.CanMeasure ? colorimeter.Measure(response.Reflectance) : null)
        {
            Powers = PowerSummary.Of(response),
            Birds = [.. eyes.Select(eye => eye.Look(response.Reflectance))],
        });

    /// <summary>A view through an instrument: what is seen is its signal; where the power goes is still told for the flat section.</summary>
    private static View ReadWith(View view, InstrumentSignal signal, Colorimeter colorimeter, BirdEye[] eyes) => view with
    {
        Reflectance = signal.Signal,
        Features = SpectrumFeatures.Of(signal.Signal),
        Color = colorimeter.CanMeasure ? colorimeter.Measure(signal.Signal) : null,
        Birds = [.. eyes.Select(eye => eye.Look(signal.Signal))],
        Signal = signal,
    };

    private static View[] Compared(View[] views, View[] others, SolverPlan plan)
        => [.. views.Zip(others, (view, other) => view with
        {
            LayerModelError = plan.IsRigorous
                ? LayerModelError.Between(plan.Rule.Name, layerModel: other, rigorous: view, showsLayerModel: false)
                : LayerModelError.Between(plan.Rule.Name, layerModel: view, rigorous: other, showsLayerModel: true),
        })];

    /// <summary>Whether the backing is to be averaged over thickness but is thinner than half a wave somewhere in the spectrum: no such
    /// thickness varies by a fringe. Decided once for the whole spectrum, so that it has no step.</summary>
    internal static bool HoldsNoFringe(Section section, WavelengthGrid grid, IMaterialCatalog catalog)
        => section.Back is { Coherent: false } back
            && back.Thickness.CentralNm < grid.StopNm / (2 * Find(catalog, section.Backing).N.At(grid.StopNm));

    /// <summary>The peak followed from the smallest angle up, in whatever order the angles were asked for.</summary>
    private static PeakTrack TrackOf(IEnumerable<View> views, Material surround)
    {
        View[] ordered = [.. views.OrderBy(view => view.Incidence.Degrees)];
        double peakNm = ordered[0].Features.MainPeak?.WavelengthNm ?? ordered[0].Reflectance.Grid.StartNm;
        return PeakTrack.Follow([.. ordered.Select(view => (view.Incidence, view.Features))], surround.N.At(peakNm));
    }

    private static Material Find(IMaterialCatalog catalog, MaterialReference reference)
        => catalog.TryFind(reference, out Material? material) ? material : throw new ArgumentException($"No material '{reference}'.", nameof(reference));
}
