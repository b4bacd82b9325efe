using BarbuleOptics.Layering;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Grating;

/// <summary>How layers of different spacing are brought to one period where more than the zeroth order passes between them.</summary>
/// <remarks>A common period holds at most <see cref="CommonPeriod.MostCells"/> cells of each layer. Bodies keep their sizes; where one more cell would
/// make neighbors overlap, spacings only grow.</remarks>
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
        return new SpacingPlan(section, null, []);
    }
}
