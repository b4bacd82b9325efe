using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Joining;

/// <summary>What the plan places as a whole: one row of round rods, one or several a cell, or the whole cells of one row.</summary>
/// <param name="Run">The run it belongs to.</param>
/// <param name="Row">The row.</param>
/// <param name="Rods">The bodies that make a row of round rods by themselves; null for whole cells.</param>
internal sealed record PlannedRow(SectionRun Run, SectionRow Row, CellBody[]? Rods)
{
    /// <summary>Depth of its top, in nm.</summary>
    public double TopNm { get; } = Row.CenterNm + (Rods?.Min(rod => rod.TopNm) ?? Run.CellTopNm);

    /// <summary>Depth of its bottom, in nm.</summary>
    public double BottomNm { get; } = Row.CenterNm + (Rods?.Max(rod => rod.BottomNm) ?? Run.CellBottomNm);

    /// <summary>Depth of its middle, in nm: of the centers of rods, or of the row.</summary>
    public double CenterNm { get; } = Row.CenterNm + (Rods?[0].ZNm ?? 0);

    /// <summary>Half the height of the tallest rod, in nm; 0 for whole cells.</summary>
    public double RadiusNm { get; } = Rods?.Max(rod => rod.Outer.HalfHeightNm) ?? 0;

    /// <summary>All its bodies.</summary>
    public IEnumerable<CellBody> Bodies => Rods is null ? Run.Cell : Rods;

    /// <summary>The rows of a run: one for each rod, or for those side by side, where all bodies are rods for multipoles, else one for each cell.</summary>
    public static IEnumerable<PlannedRow> Of(SectionRun run, RowMethods methods)
    {
        bool round = methods != RowMethods.SlabsOnly && run.Cell.All(IsRound)
            || methods == RowMethods.AllRods && run.Cell.Count == 1 && FlatRod.Is(run.Cell[0], run.SpacingNm);
        foreach (SectionRow row in run.Rows)
        {
            if (!round)
            {
                yield return new PlannedRow(run, row, null);
                continue;
            }
            foreach (CellBody[] rods in RodCells.Of(run))
                yield return new PlannedRow(run, row, rods);
        }
    }

    private static bool IsRound(CellBody body) => IsRound(body.Outer) && (body.Core is not Outline core || IsRound(core));

    private static bool IsRound(Outline outline) => outline.Shape == OutlineShape.Ellipse && outline.HalfWidthNm == outline.HalfHeightNm;
}
