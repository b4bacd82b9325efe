using BarbuleOptics.Grating;
using BarbuleOptics.Layering;
using BarbuleOptics.Layering.Mixing;

namespace BarbuleOptics.Prediction;

/// <summary>What is solved for a section under stated conditions.</summary>
/// <param name="IsRigorous">Whether the result is that of the grating solver.</param>
/// <param name="SolvesFilms">Whether the layer model is solved, as the result or beside it.</param>
/// <param name="SolvesSection">Whether the grating solver is, as the result or beside it.</param>
/// <param name="Rule">How rows are averaged into films.</param>
internal sealed record SolverPlan(bool IsRigorous, bool SolvesFilms, bool SolvesSection, IMixingRule Rule)
{
    /// <summary>Longest period that the grating solver is given, in wavelengths: orders grow with the period, and their cube is the work.</summary>
    public const double MostPeriods = 100;

    /// <summary>The plan.</summary>
    public static SolverPlan Of(Section section, PredictionConditions conditions)
    {
        bool isRigorous = conditions.Solver switch
        {
            SolverChoice.Grating => true,
            SolverChoice.Multilayer => false,
            _ => conditions.Mixing is null && !section.IsFilms,
        };
        // Films are exact for films, and there is no layer model of rods at an angle.
        bool compares = conditions.ComparesSolvers && !section.IsFilms && HasLayerModel(section);
        return new SolverPlan(
            isRigorous, SolvesFilms: !isRigorous || compares, SolvesSection: isRigorous || (compares && conditions.Mixing is not null && PeriodBeyondNm(section, conditions) is null),
            conditions.Mixing ?? MixingRules.Default);
    }

    /// <summary>The period, in nm, of a section that is too much for the grating solver; null where it is not.</summary>
    public static double? PeriodBeyondNm(Section section, PredictionConditions conditions)
        => SpacingPlan.Of(section).PeriodNm is double periodNm && periodNm > MostPeriods * conditions.Wavelengths.StartNm ? periodNm : null;

    /// <summary>Whether films can stand for a section.</summary>
    public static bool HasLayerModel(Section section) => section.IsAcross || section.IsAlong || section.IsFilms;
}
