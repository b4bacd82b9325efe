using BarbuleOptics.Quantities;

namespace BarbuleOptics.Anatomy;

/// <summary>Rows of one kind, or films of one kind, at one pitch.</summary>
/// <param name="Bodies">What each cell of a row holds, at least one; a film stands alone.</param>
/// <param name="Lateral">Distance of neighboring cells along the surface; null for films.</param>
/// <param name="Rows">Number of rows.</param>
/// <param name="Depth">Distance of neighboring rows in depth; null where there is one row.</param>
/// <param name="Stacking">How rows lie above each other.</param>
/// <param name="ShiftShare">Sideways shift of the first row, as a share of the spacing, -1 to 1.</param>
/// <param name="Gap">Matrix between the bottom of the last row and the next layer or the backing; negative where rows nest.</param>
public sealed record BarbuleLayer(
    ValueList<Body> Bodies, Packing? Lateral, RowCount Rows, Packing? Depth, Stacking Stacking, double ShiftShare, MeasuredLength Gap)
{
    /// <summary>Whether the layer is of continuous films.</summary>
    public bool IsFilm => Bodies[0].Form is MelanosomeForm.Film;
}
