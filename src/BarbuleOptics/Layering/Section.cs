using BarbuleOptics.Anatomy;
using BarbuleOptics.Materials;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Layering;

/// <summary>The section of a barbule in numbers: what lies where, down to the backing. Infinite along x and along the rods.</summary>
/// <param name="Surround">Where the light comes from.</param>
/// <param name="Backing">What lies below <paramref name="DepthNm"/>.</param>
/// <param name="Axis">Direction of the rods, 0 (across the plane of incidence) to 90 degrees (along it).</param>
/// <param name="Materials">All materials inside; number <see cref="Matrix"/> is the matrix.</param>
/// <param name="CortexNm">Thickness of the cortex, in nm.</param>
/// <param name="DepthNm">Depth of the backing's top below the surface, in nm.</param>
/// <param name="Runs">Rows of bodies.</param>
/// <param name="Films">Continuous films.</param>
/// <param name="Back">Where the backing ends; null for a half-space.</param>
public sealed record Section(
    MaterialReference Surround, MaterialReference Backing, Angle Axis, ValueList<SectionMaterial> Materials,
    double CortexNm, double DepthNm, ValueList<SectionRun> Runs, ValueList<SectionFilm> Films, Back? Back)
{
    /// <summary>Number of the matrix among <see cref="Materials"/>.</summary>
    public const int Matrix = 0;

    /// <summary>Whether the rods lie across the plane of incidence, where films and planar solvers need no rotation.</summary>
    public bool IsAcross => Axis.Degrees == 0;

    /// <summary>Whether the rods lie along the plane of incidence.</summary>
    public bool IsAlong => Axis.Degrees == 90;

    /// <summary>Whether all of it is films, so that the multilayer solver is exact and the direction of the rods means nothing.</summary>
    public bool IsFilms => Runs.All(run => run.IsFilm);

    /// <summary>The period of the whole section along the surface, in nm; null without rows, or where the spacings have no common
    /// period of at most six cells of each.</summary>
    public double? PeriodNm => Runs.Count == 0 ? null : CommonPeriod.Of([.. Runs.Select(run => run.SpacingNm)]);
}
