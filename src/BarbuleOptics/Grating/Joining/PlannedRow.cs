using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Joining;

/// <summary>What the plan places as a whole: one row of round rods, or the whole cells of one row.</summary>
/// <param name="Run">The run it belongs to.</param>
/// <param name="Row">The row.</param>
/// <param name="Rod">The body that makes a row of round rods by itself; null for whole cells.</param>
internal sealed record PlannedRow(SectionRun Run, SectionRow Row, CellBody? Rod)
{
    /// <summary>Depth of its top, in nm.</summary>
    public double TopNm { get; } = Row.CenterNm + (Rod?.TopNm ?? Run.CellTopNm);

    /// <summary>Depth of its bottom, in nm.</summary>
    public double BottomNm { get; } = Row.CenterNm + (Rod?.BottomNm ?? Run.CellBottomNm);

    /// <summary>Depth of its middle, in nm: of the centers of rods, or of the row.</summary>
    public double CenterNm { get; } = Row.CenterNm + (Rod?.ZNm ?? 0);

    /// <summary>All its bodies.</summary>
    public IEnumerable<CellBody> Bodies => Rod is null ? Run.Cell : [Rod];

    /// <summary>The rows of a run: one for each round rod where all bodies are round, else one for each cell.</summary>
    public static IEnumerable<PlannedRow> Of(SectionRun run)
    {
        bool round = run.Cell.All(IsRound);
        foreach (SectionRow row in run.Rows)
        {
            if (!round)
            {
                yield return new PlannedRow(run, row, null);
                continue;
            }
            foreach (CellBody body in run.Cell)
                yield return new PlannedRow(run, row, body);
        }
    }

    private static bool IsRound(CellBody body) => IsRound(body.Outer) && (body.Core is not Outline core || IsRound(core));

    private static bool IsRound(Outline outline) => outline.Shape == OutlineShape.Ellipse && outline.HalfWidthNm == outline.HalfHeightNm;
}
