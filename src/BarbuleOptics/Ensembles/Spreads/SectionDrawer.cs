using BarbuleOptics.Anatomy;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Ensembles.Spreads;

/// <summary>Lays out the section of one draw; where the lengths drawn do not go together, the nearest that do.</summary>
/// <remarks>Sizes and distances are clamped one by one (<see cref="DrawnStructure"/>), a gap that is drawn grows until layers are clear, and what is left (bodies of
/// one cell that collide, fixed distances) is mended by halving the way of all lengths from the mean geometry, which exists. Changes are
/// left in the lengths, so that their bias can be told.</remarks>
internal sealed class SectionDrawer(Barbule barbule, DrawSlot[] slots, bool separateRows)
{
    private const int MostGaps = 8;
    private const int MostHalvings = 12;

    private readonly double[] _drawnNm = new double[slots.Length];

    // Slot of the gap under each layer of the structure as drawn; -1 where it follows from the distance of rows.
    private readonly int[] _gapSlots = GapSlots(barbule, slots, separateRows);

    /// <summary>The section of one draw.</summary>
    /// <param name="lengthsNm">The lengths drawn, one a slot; changed to those taken.</param>
    /// <param name="rowCounts">Rows of each layer.</param>
    public Section Draw(Span<double> lengthsNm, ReadOnlySpan<int> rowCounts)
    {
        lengthsNm.CopyTo(_drawnNm);
        for (int halving = 0; halving <= MostHalvings; halving++)
        {
            double share = halving == MostHalvings ? 0 : Math.ScaleB(1, -halving);
            for (int i = 0; i < slots.Length; i++)
                lengthsNm[i] = slots[i].Length.CentralNm + share * (_drawnNm[i] - slots[i].Length.CentralNm);
            if (TryDraw(lengthsNm, rowCounts) is Section section)
                return section;
        }
        throw new ArgumentException("The mean geometry cannot exist with the rows drawn.", nameof(rowCounts));
    }

    private Section? TryDraw(Span<double> lengthsNm, ReadOnlySpan<int> rowCounts)
    {
        for (int attempt = 0; attempt < MostGaps; attempt++)
        {
            (Section? section, GapShortage? shortage) = SectionBuilder.LayOut(DrawnStructure.Of(barbule, slots, lengthsNm, rowCounts, separateRows));
            if (section is not null)
                return section;
            int slot = shortage is null || shortage.LayerNumber < 1 ? -1 : _gapSlots[shortage.LayerNumber - 1];
            if (slot < 0 || slots[slot].Law is null)
                return null;
            lengthsNm[slot] += shortage!.MissingNm + SectionBuilder.TouchingNm;
        }
        return null;
    }

    private static int[] GapSlots(Barbule barbule, DrawSlot[] slots, bool separateRows)
    {
        var places = new List<int>();
        for (int l = 0; l < barbule.Layers.Count; l++)
        {
            if (separateRows)
                places.AddRange(Enumerable.Repeat(-1, barbule.Layers[l].Rows.Central - 1));
            places.Add(Array.FindIndex(slots, slot => slot.Key == FormattableString.Invariant($"layer{l + 1}.gap")));
        }
        return [.. places];
    }
}
