namespace BarbuleOptics.Layering;

/// <summary>One body of a cell, placed within it.</summary>
/// <param name="Outer">Its outline.</param>
/// <param name="Core">The concentric core's outline; null when solid.</param>
/// <param name="Material">Number of its material in the section.</param>
/// <param name="CoreMaterial">Number of the core's material; that of the body when solid.</param>
/// <param name="XNm">Place of its center along the surface within the cell, in nm.</param>
/// <param name="ZNm">Depth of its center below the row's, in nm.</param>
public sealed record CellBody(Outline Outer, Outline? Core, int Material, int CoreMaterial, double XNm, double ZNm)
{
    /// <summary>Depth of its top below the row's center, in nm (negative above it).</summary>
    public double TopNm => ZNm - Outer.HalfHeightNm;

    /// <summary>Depth of its bottom below the row's center, in nm.</summary>
    public double BottomNm => ZNm + Outer.HalfHeightNm;
}
