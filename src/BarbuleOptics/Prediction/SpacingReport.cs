using BarbuleOptics.Grating;
using BarbuleOptics.Grating.Joining;
using BarbuleOptics.Layering;
using BarbuleOptics.Materials;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Prediction;

/// <summary>What it means that layers of different spacing were solved at one period.</summary>
/// <param name="Moves">Which spacings were moved, and to what.</param>
/// <param name="PeriodNm">The common period, in nm.</param>
/// <param name="LongestNm">The longest wavelength at which they were, in nm.</param>
/// <param name="Change">Largest difference of R there between this period and the next choice.</param>
internal sealed record SpacingReport(ValueList<SpacingMove> Moves, double PeriodNm, double LongestNm, double Change)
{
    /// <summary>Wavelengths and angles at which the two choices are compared.</summary>
    private const int ProbeWavelengths = 5, ProbeAngles = 2;

    /// <summary>Accuracy of the comparison.</summary>
    private const double ProbeAccuracy = 1e-3;

    /// <summary>The report; null where every layer kept its spacing at every wavelength and angle.</summary>
    public static SpacingReport? Of(Section section, PredictionConditions conditions, IMaterialCatalog catalog, CancellationToken cancellation)
    {
        SpacingPlan plan = SpacingPlan.Of(section);
        if (plan.Neighbor is null || plan.Moves.Count == 0)
            return null;
        double[] movedNm = Moved(section, conditions, catalog);
        if (movedNm.Length == 0)
            return null;
        double[] probesNm = Spread(movedNm, ProbeWavelengths);
        Angle[] angles = Spread([.. conditions.Incidences.OrderBy(angle => angle.Degrees)], ProbeAngles);
        double[] chosen = Reflectances(plan.Nearest, probesNm, angles, catalog, cancellation), next = Reflectances(plan.Neighbor, probesNm, angles, catalog, cancellation);
        return new SpacingReport(plan.Moves, plan.PeriodNm!.Value, movedNm[^1], chosen.Zip(next, (one, other) => Math.Abs(one - other)).Max());
    }

    /// <summary>Wavelengths at which some angle needs a common period, by the solver's own measure.</summary>
    private static double[] Moved(Section section, PredictionConditions conditions, IMaterialCatalog catalog)
    {
        var permittivities = new SectionPermittivities(section, catalog, conditions.Wavelengths.Nanometres);
        StackPlan plan = StackPlan.Of(section);
        double most = Math.Max(SpacingJoin.MostError, conditions.Accuracy);
        var moved = new List<double>();
        for (int w = 0; w < conditions.Wavelengths.Count; w++)
        {
            if (conditions.Incidences.Any(incidence => SpacingJoin.Error(plan, LightOf(section, permittivities, w, incidence), permittivities.Inside(w)) > most))
                moved.Add(conditions.Wavelengths.Nanometres[w]);
        }
        return [.. moved];
    }

    private static PointLight LightOf(Section section, SectionPermittivities permittivities, int wavelength, Angle incidence)
    {
        (double across, double along) = IncidentDirection.Of(section, incidence);
        return new PointLight(
            permittivities.WavelengthsNm[wavelength], permittivities.SurroundIndex[wavelength], across, along, Math.Cos(incidence.Radians));
    }

    private static double[] Reflectances(Section section, double[] wavelengthsNm, Angle[] angles, IMaterialCatalog catalog, CancellationToken cancellation)
    {
        var solver = new GratingSolver(ProbeAccuracy);
        var permittivities = new SectionPermittivities(section, catalog, wavelengthsNm);
        GratingWorkspace workspace = solver.CreateWorkspace(permittivities);
        var all = new List<double>();
        var reflectance = new double[wavelengthsNm.Length];
        foreach (Angle angle in angles)
        {
            cancellation.ThrowIfCancellationRequested();
            solver.Solve(
                permittivities, new SolverRequest(0, wavelengthsNm.Length, angle, Polarizations.Unpolarized, SolverOutputs.Reflectance), workspace,
                new SolverResponse { Reflectance = reflectance });
            all.AddRange(reflectance);
        }
        return [.. all];
    }

    private static T[] Spread<T>(T[] all, int most)
        => all.Length <= most ? all : [.. Enumerable.Range(0, most).Select(i => all[i * (all.Length - 1) / (most - 1)])];
}
