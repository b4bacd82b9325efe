using BarbuleOptics.Grating.Joining;
using BarbuleOptics.Grating.Modal;
using BarbuleOptics.Grating.Modal.Lanes;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Grating.Batches;

/// <summary>Which kinds of elements packs of wavelengths can be solved for, and their making.</summary>
internal static class BatchElements
{
    /// <summary>Whether there is an element for a kind.</summary>
    public static bool Covers(ElementKind kind)
        => kind is RodKind rods ? rods.Rods.Count == 1 : kind is SlabKind slab && UprightSlab.Covers(ShapeOf(slab));

    /// <summary>Makes the element of a kind that is covered.</summary>
    public static IBatchElement<TLanes> Create<TLanes>(ElementKind kind)
        where TLanes : struct, ILanes<TLanes>
        => kind switch
        {
            RodKind rods => rods.Rods[0].IsRound ? new RowElement<TLanes>(rods) : new FlatRowElement<TLanes>(rods),
            SlabKind slab => new SlabElement<TLanes>(ShapeOf(slab)),
            _ => throw new ArgumentException($"No batch element for {kind.GetType().Name}.", nameof(kind)),
        };

    private static SlabShape ShapeOf(SlabKind slab) => new(slab.Bodies, slab.HeightNm, slab.PeriodNm);
}
