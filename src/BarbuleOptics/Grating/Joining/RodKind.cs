using BarbuleOptics.Grating.Multipoles;

namespace BarbuleOptics.Grating.Joining;

/// <summary>A row of round rods, its planes equally far from the centers.</summary>
/// <param name="PeriodNm">Center-to-center distance, in nm.</param>
/// <param name="RadiusNm">Radius, in nm.</param>
/// <param name="CoreRadiusNm">Radius of the concentric core, in nm; 0 when solid.</param>
/// <param name="Material">Number of the material.</param>
/// <param name="CoreMaterial">Number of the core's material.</param>
/// <param name="ReachNm">Distance of each plane from the centers, in nm. A plane may cut the rods: the waves that leave a row hold up to its line
/// of centers.</param>
internal sealed record RodKind(double PeriodNm, double RadiusNm, double CoreRadiusNm, int Material, int CoreMaterial, double ReachNm)
    : ElementKind(PeriodNm, 2 * ReachNm, IsCut: false)
{
    /// <inheritdoc/>
    public override IGratingElement Create(LatticeSums sums)
        => new RodRow(RadiusNm, CoreRadiusNm, Material, CoreMaterial, 0, ReachNm, ReachNm, sums);
}
