using BarbuleOptics.Grating.Multipoles;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Joining;

/// <summary>One rod of a cell solved by multipoles.</summary>
/// <param name="Place">Its place along the surface, in parts of the period from the first rod's.</param>
/// <param name="Outer">Its outline.</param>
/// <param name="Core">Outline of its concentric core; null when solid.</param>
/// <param name="Material">Number of its material.</param>
/// <param name="CoreMaterial">Number of its core's material.</param>
internal sealed record CellRod(int Place, Outline Outer, Outline? Core, int Material, int CoreMaterial)
{
    /// <summary>Whether all its outlines are circles.</summary>
    public bool IsRound => Outer.HalfWidthNm == Outer.HalfHeightNm && (Core is not Outline core || core.HalfWidthNm == core.HalfHeightNm);

    /// <summary>The rod as a row takes it.</summary>
    public RowMember Create(SharedAnswers shared) => new(
        IsRound ? new RodScatterer(Outer.HalfHeightNm, Core?.HalfHeightNm ?? 0, Material, CoreMaterial) : shared.Of(this),
        Place, Core is not null, Material, CoreMaterial);
}
