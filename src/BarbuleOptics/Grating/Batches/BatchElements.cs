using BarbuleOptics.Grating.Joining;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Grating.Batches;

/// <summary>Which kinds of elements packs of wavelengths can be solved for, and their making.</summary>
internal static class BatchElements
{
    /// <summary>Whether there is an element for a kind.</summary>
    public static bool Covers(ElementKind kind) => kind is RodKind { Rods.Count: 1 } rods && rods.Rods[0].IsRound;

    /// <summary>Makes the element of a kind that is covered.</summary>
    public static IBatchElement<TLanes> Create<TLanes>(ElementKind kind)
        where TLanes : struct, ILanes<TLanes>
        => kind is RodKind rods
            ? new RowElement<TLanes>(rods)
            : throw new ArgumentException($"No batch element for {kind.GetType().Name}.", nameof(kind));
}
