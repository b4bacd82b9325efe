using BarbuleOptics.Lanes;

namespace BarbuleOptics.Grating.Multipoles.Lanes;

/// <summary>Scratch tables of cylinder functions on both sides of both circles, shared by all rods of one thread.</summary>
internal sealed class RodTables<TLanes>
    where TLanes : struct, ILanes<TLanes>
{
    /// <summary>In the matrix at the rod's circle.</summary>
    public CylinderLanes<TLanes> Outside { get; } = new();

    /// <summary>In the rod at its circle.</summary>
    public CylinderLanes<TLanes> Rod { get; } = new();

    /// <summary>In the rod at its core's circle.</summary>
    public CylinderLanes<TLanes> RodAtCore { get; } = new();

    /// <summary>In the core at its circle.</summary>
    public CylinderLanes<TLanes> Core { get; } = new();
}
