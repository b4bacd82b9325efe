using BarbuleOptics.Layering;
using BarbuleOptics.Materials;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Prediction;

/// <summary>A section as films, solved for all angles and polarizations.</summary>
/// <param name="Powers">Where the power goes.</param>
/// <param name="ErrorEstimate">Estimate of the largest error of R, T and A: slices and arithmetic, not the picture itself.</param>
/// <param name="FilmCount">Number of films.</param>
internal sealed record LayerModelResponses(PowerTable Powers, double ErrorEstimate, int FilmCount)
{
    /// <summary>Change of R on halving the slices that is allowed whatever accuracy is asked for.</summary>
    private const double MostSliceChange = 1e-5;

    /// <summary>The same where films are only compared with the rigorous solution.</summary>
    private const double MostComparedChange = 5e-4;

    /// <summary>Wavelengths at which the slices are judged then.</summary>
    private const int ComparedProbes = 9;

    /// <summary>The one place that names the solver of films.</summary>
    internal static readonly VectorFilmSolver Solver = new();

    /// <summary>Solves it.</summary>
    public static LayerModelResponses Solve(
        Section section, SolverPlan plan, PredictionConditions conditions, IMaterialCatalog catalog, IProgress<double>? progress, CancellationToken cancellation)
    {
        // Films have no direction, whatever the file says of one.
        Section turned = section.IsFilms ? section with { Axis = Angle.FromDegrees(0) } : section;
        LayerModel model = plan.IsRigorous ? Rough(turned, plan, conditions, catalog, cancellation) : Fine(turned, plan, conditions, catalog, cancellation);
        (PowerTable powers, double error) = FilmResponses.Solve(Solver, model, conditions, progress, cancellation);
        return new LayerModelResponses(powers, Math.Max(model.SliceError, error), model.FilmCount);
    }

    internal static LayerModel Fine(Section section, SolverPlan plan, PredictionConditions conditions, IMaterialCatalog catalog, CancellationToken cancellation)
    {
        // The estimate of the error is twice the change.
        double ofAny = conditions.Accuracy / 2, ofReflectance = Math.Min(MostSliceChange, ofAny);
        return LayerModel.Of(section, catalog, plan.Rule, conditions.Wavelengths, conditions.Incidences, ofReflectance, ofAny, Solver, cancellation);
    }

    /// <summary>Beside a rigorous result, at a cost that nobody notices.</summary>
    private static LayerModel Rough(Section section, SolverPlan plan, PredictionConditions conditions, IMaterialCatalog catalog, CancellationToken cancellation)
    {
        WavelengthGrid grid = conditions.Wavelengths;
        if (grid.Count > ComparedProbes)
        {
            double stepNm = (grid.StopNm - grid.StartNm) / (ComparedProbes - 1);
            grid = WavelengthGrid.FromRange(Length.FromNanometres(grid.StartNm), Length.FromNanometres(grid.StopNm), Length.FromNanometres(stepNm));
        }
        Angle[] ends = [.. ((Angle[])[conditions.Incidences.MinBy(angle => angle.Degrees), conditions.Incidences.MaxBy(angle => angle.Degrees)]).Distinct()];
        return LayerModel.Of(section, catalog, plan.Rule, grid, ends, MostComparedChange, ofAny: 1, Solver, cancellation);
    }
}
