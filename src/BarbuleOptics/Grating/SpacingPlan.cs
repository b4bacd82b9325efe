using BarbuleOptics.Layering;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Grating;

/// <summary>How layers of different spacing are brought to one period where more than the zeroth order passes between them.</summary>
/// <remarks>A common period holds at most <see cref="CommonPeriod.MostCells"/> cells of each layer; of all such periods that is taken which moves the
/// worst spacing least, in proportion. Bodies keep their sizes; where less room would make neighbors overlap, spacings only grow.
/// A section that has a common period is left as it is.</remarks>
public sealed class SpacingPlan
{
    private SpacingPlan(Section nearest, Section? neighbor, ValueList<SpacingMove> moves)
    {
        Nearest = nearest;
        Neighbor = neighbor;
        Moves = moves;
    }

    /// <summary>The section at the nearest common period; the section itself when it has one.</summary>
    public Section Nearest { get; }

    /// <summary>The section at the next nearest common period: how much its R differs from that of <see cref="Nearest"/> tells what the
    /// move may cost. Null when nothing was moved.</summary>
    public Section? Neighbor { get; }

    /// <summary>The spacings that differ between the section and <see cref="Nearest"/>.</summary>
    public ValueList<SpacingMove> Moves { get; }

    /// <summary>The common period, in nm, which orders are counted by; null without rows.</summary>
    public double? PeriodNm => Nearest.PeriodNm;

    /// <summary>Plans a section.</summary>
    public static SpacingPlan Of(Section section)
    {
        ArgumentNullException.ThrowIfNull(section);
        if (section.Runs.Count == 0 || section.PeriodNm is not null)
            return new SpacingPlan(section, null, []);
        List<Candidate> candidates = Candidates(section.Runs);
        Section nearest = Move(section, candidates[0]);
        var moves = new List<SpacingMove>();
        for (int run = 0; run < section.Runs.Count; run++)
        {
            double fromNm = section.Runs[run].SpacingNm, toNm = nearest.Runs[run].SpacingNm;
            if (Math.Abs(toNm - fromNm) > 1e-9 * fromNm)
                moves.Add(new SpacingMove(section.Runs[run].LayerNumber, fromNm, toNm));
        }
        return new SpacingPlan(nearest, Move(section, candidates[1]), ValueList.Create<SpacingMove>([.. moves]));
    }

    // By the worst change of a spacing, in proportion; at least two, for n cells of the longest spacing give different periods.
    private static List<Candidate> Candidates(ValueList<SectionRun> runs)
    {
        double longestNm = runs.Max(run => run.SpacingNm);
        var candidates = new List<Candidate>();
        for (int cells = 1; cells <= CommonPeriod.MostCells; cells++)
        {
            Candidate candidate = Around(runs, cells * longestNm);
            if (!candidates.Any(other => SameSpacings(other, candidate)))
                candidates.Add(candidate);
        }
        if (candidates.Count == 1)
            candidates.Add(Grown(candidates[0]));
        return [.. candidates.OrderBy(candidate => candidate.Worst).ThenBy(candidate => candidate.PeriodNm)];
    }

    private static Candidate Around(ValueList<SectionRun> runs, double aboutNm)
    {
        int[] cells = [.. runs.Select(run => Math.Clamp((int)Math.Round(aboutNm / run.SpacingNm), 1, CommonPeriod.MostCells))];
        double leastNm = double.PositiveInfinity, mostNm = 0, roomNm = 0;
        for (int run = 0; run < cells.Length; run++)
        {
            leastNm = Math.Min(leastNm, cells[run] * runs[run].SpacingNm);
            mostNm = Math.Max(mostNm, cells[run] * runs[run].SpacingNm);
            roomNm = Math.Max(roomNm, cells[run] * LeastSpacingNm(runs, runs[run]));
        }
        double periodNm = Math.Max(Math.Sqrt(leastNm * mostNm), roomNm);
        double worst = 0;
        for (int run = 0; run < cells.Length; run++)
            worst = Math.Max(worst, Math.Abs(Math.Log(periodNm / (cells[run] * runs[run].SpacingNm))));
        return new Candidate(periodNm, cells, worst);
    }

    // One body alone needs its width; bodies that others nest with, in the cell or in depth, keep their distances at least.
    private static double LeastSpacingNm(ValueList<SectionRun> runs, SectionRun run)
    {
        bool nests = run.Cell.Count > 1 || (run.Rows.Count > 1 && run.PitchNm < run.CellBottomNm - run.CellTopNm)
            || runs.Any(other => other != run && other.Rows[0].CenterNm + other.CellTopNm < run.Rows[^1].CenterNm + run.CellBottomNm
                && other.Rows[^1].CenterNm + other.CellBottomNm > run.Rows[0].CenterNm + run.CellTopNm);
        return nests ? run.SpacingNm : 2 * run.Cell[0].Outer.HalfWidthNm;
    }

    private static bool SameSpacings(Candidate first, Candidate second)
        => first.Cells.Zip(second.Cells, (one, other) => Math.Abs(first.PeriodNm / one / (second.PeriodNm / other) - 1)).Max() < 1e-9;

    // All spacings one to one whatever the number of cells: the other choice is the longest spacing for all.
    private static Candidate Grown(Candidate only)
    {
        double factor = Math.Exp(only.Worst > 0 ? only.Worst : 0.01);
        return new Candidate(only.PeriodNm * factor, only.Cells, 2 * only.Worst);
    }

    private static Section Move(Section section, Candidate candidate)
    {
        var runs = new SectionRun[section.Runs.Count];
        for (int i = 0; i < runs.Length; i++)
        {
            SectionRun run = section.Runs[i];
            double spacingNm = candidate.PeriodNm / candidate.Cells[i], factor = spacingNm / run.SpacingNm;
            CellBody[] cell = [.. run.Cell.Select(body => body with { XNm = body.XNm * factor })];
            SectionRow[] rows = [.. run.Rows.Select(row => row with { ShiftNm = row.ShiftNm * factor })];
            runs[i] = new SectionRun(
                run.LayerNumber, spacingNm, run.PitchNm, ValueList.Create<CellBody>(cell), ValueList.Create<SectionRow>(rows));
        }
        return section with { Runs = ValueList.Create<SectionRun>(runs) };
    }

    /// <summary>A common period, the cells of each run in it, and the worst change of a spacing (logarithm of the factor).</summary>
    private sealed record Candidate(double PeriodNm, int[] Cells, double Worst);
}
