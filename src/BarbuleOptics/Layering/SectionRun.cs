using BarbuleOptics.Quantities;

namespace BarbuleOptics.Layering;

/// <summary>Rows that repeat one cell.</summary>
/// <param name="LayerNumber">The layer of the structure it came from, counted from 1.</param>
/// <param name="SpacingNm">Center-to-center distance of cells along the surface, in nm.</param>
/// <param name="PitchNm">Center-to-center distance of rows in depth, in nm; 0 with one row.</param>
/// <param name="Cell">What each cell holds.</param>
/// <param name="Rows">Where the rows lie, from the outside in.</param>
public sealed record SectionRun(int LayerNumber, double SpacingNm, double PitchNm, ValueList<CellBody> Cell, ValueList<SectionRow> Rows)
{
    /// <summary>Depth of the cell's top below a row's center, in nm (negative above it).</summary>
    public double CellTopNm { get; } = Cell.Min(body => body.TopNm);

    /// <summary>Depth of the cell's bottom below a row's center, in nm.</summary>
    public double CellBottomNm { get; } = Cell.Max(body => body.BottomNm);

    /// <summary>Whether its rows are closed films: solid platelets that fill their spacing side by side, for which films are exact.</summary>
    public bool IsFilm { get; } = Cell.Count == 1 && Cell[0].Core is null && Cell[0].Outer.Shape == OutlineShape.Rectangle
        && 2 * Cell[0].Outer.HalfWidthNm >= SpacingNm - SectionBuilder.TouchingNm;
}
