using System.Diagnostics.CodeAnalysis;
using BarbuleOptics.Anatomy;
using BarbuleOptics.Color;
using BarbuleOptics.Layering;
using BarbuleOptics.Materials;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra;

namespace BarbuleOptics.Prediction;

/// <summary>The main job: from a measured structure to spectra, color and hue, with what they lean on.</summary>
public static class Predictor
{
    /// <summary>Change of R on halving the slices that is allowed whatever accuracy is asked for.</summary>
    private const double MostSliceChange = 1e-5;

    /// <summary>The one place that names the solver of films.</summary>
    private static readonly ReferenceFilmSolver Solver = new();

    /// <summary>Predicts what <paramref name="barbule"/> does to light, by the multilayer solver.</summary>
    /// <param name="barbule">The structure; its central measurements are used.</param>
    /// <param name="conditions">How it is looked at.</param>
    /// <param name="catalog">Where its materials are.</param>
    /// <param name="prediction">The prediction; null when there are problems.</param>
    /// <param name="problems">Everything that forbids one, each with the key at fault.</param>
    /// <param name="cancellation">Ends the work early with an <see cref="OperationCanceledException"/>.</param>
    public static bool TryPredict(
        Barbule barbule, PredictionConditions conditions, IMaterialCatalog catalog, [NotNullWhen(true)] out StructurePrediction? prediction,
        out IReadOnlyList<AnatomyProblem> problems, CancellationToken cancellation = default)
    {
        ArgumentNullException.ThrowIfNull(barbule);
        ArgumentNullException.ThrowIfNull(conditions);
        ArgumentNullException.ThrowIfNull(catalog);
        prediction = null;
        if (!SectionBuilder.TryBuild(barbule, out Section? section, out problems))
            return false;
        problems = [.. FilmProblems(section), .. MaterialCheck.Find(MaterialUse.Of(barbule, section), conditions.Wavelengths, catalog)];
        if (problems.Count > 0)
            return false;
        prediction = Predict(barbule, section, conditions, catalog, cancellation);
        return true;
    }

    private static IEnumerable<AnatomyProblem> FilmProblems(Section section)
    {
        if (!section.IsAcross && !section.IsAlong)
        {
            yield return new AnatomyProblem("barbule.axis", FormattableString.Invariant(
                $"found {section.Axis.Degrees} degrees; the multilayer solver allows across (0) or along (90) only"));
        }
    }

    private static StructurePrediction Predict(
        Barbule barbule, Section section, PredictionConditions conditions, IMaterialCatalog catalog, CancellationToken cancellation)
    {
        // The estimate of the error is twice the change.
        bool thinBack = HoldsNoFringe(section, conditions.Wavelengths, catalog);
        if (thinBack)
            section = section with { Back = section.Back! with { Coherent = true } };
        double ofAny = conditions.Accuracy / 2, ofReflectance = Math.Min(MostSliceChange, ofAny);
        LayerModel model = LayerModel.Of(section, catalog, conditions.Mixing, conditions.Wavelengths, conditions.Incidences, ofReflectance, ofAny, Solver, cancellation);
        FilmResponses responses = FilmResponses.Solve(Solver, model, conditions, cancellation);

        List<Material> materials = [.. MaterialUse.Of(barbule, section).Select(use => Find(catalog, use.Reference)).Distinct()];
        var warnings = new WarningCollector(barbule, section, conditions);
        warnings.AboutStructure(materials);
        if (thinBack)
            warnings.AboutThinBack();
        Material surround = Find(catalog, section.Surround);
        warnings.AboutSpacing(surround, Find(catalog, barbule.Matrix));
        double error = Math.Max(model.SliceError, responses.ErrorEstimate);
        warnings.AboutAccuracy(error, conditions.Accuracy);

        var colorimeter = new Colorimeter(conditions.Wavelengths, conditions.Illuminant, conditions.Observer);
        warnings.AboutCoverage(colorimeter.CanMeasure, colorimeter.CoversObserver);
        var views = new List<View>();
        foreach (SpectralResponse response in responses.Of(conditions.Polarization))
        {
            CieColor? color = colorimeter.CanMeasure ? colorimeter.Measure(response.Reflectance) : null;
            var view = new View(response.Incidence, response.Polarization, response.Reflectance, SpectrumFeatures.Of(response.Reflectance), color);
            views.Add(view);
            warnings.AboutView(view);
        }

        return new StructurePrediction
        {
            Barbule = barbule,
            Section = section,
            Conditions = conditions,
            Solver = StructurePrediction.MultilayerSolver,
            Mixing = section.Runs.Count > 0 ? conditions.Mixing.Name : null,
            CoreMixing = section.Materials.Any(material => material.IsAveraged) ? PorousCore.Name : null,
            ErrorEstimate = error,
            FilmCount = model.FilmCount,
            Materials = [.. materials],
            Responses = [.. conditions.AllPolarizations ? responses.All : responses.Of(conditions.Polarization)],
            Views = [.. views],
            Track = TrackOf(views, surround),
            Warnings = warnings.All,
        };
    }

    /// <summary>Whether the backing is to be averaged over thickness but is thinner than half a wave somewhere in the spectrum: no such
    /// thickness varies by a fringe. Decided once for the whole spectrum, so that it has no step.</summary>
    private static bool HoldsNoFringe(Section section, WavelengthGrid grid, IMaterialCatalog catalog)
        => section.Back is { Coherent: false } back
            && back.Thickness.CentralNm < grid.StopNm / (2 * Find(catalog, section.Backing).N.At(grid.StopNm));

    /// <summary>The peak followed from the smallest angle up, in whatever order the angles were asked for.</summary>
    private static PeakTrack TrackOf(List<View> views, Material surround)
    {
        View[] ordered = [.. views.OrderBy(view => view.Incidence.Degrees)];
        double peakNm = ordered[0].Features.MainPeak?.WavelengthNm ?? ordered[0].Reflectance.Grid.StartNm;
        return PeakTrack.Follow([.. ordered.Select(view => (view.Incidence, view.Features))], surround.N.At(peakNm));
    }

    private static Material Find(IMaterialCatalog catalog, MaterialReference reference)
        => catalog.TryFind(reference, out Material? material) ? material : throw new ArgumentException($"No material '{reference}'.", nameof(reference));
}
