using BarbuleOptics.Grating.Multipoles.Lanes;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Grating.Batches;

/// <summary>A piece of the section between two planes, solved for a pack of wavelengths at one direction without a wave vector along the rods: what
/// <see cref="IGratingElement"/> is for one wavelength. It holds its own memory and belongs to one thread.</summary>
/// <remarks>Matrices are row-major over the orders -M to M, amplitudes and planes as in <see cref="ScatteringBlock"/>; a row of rods has both planes
/// at its centers. x = 0 is the element's own origin.</remarks>
internal interface IBatchElement<TLanes>
    where TLanes : struct, ILanes<TLanes>
{
    /// <summary>Downward at the top into upward at the top.</summary>
    LaneBuffer<TLanes> ReflectTop { get; }

    /// <summary>Downward at the top into downward at the bottom.</summary>
    LaneBuffer<TLanes> TransmitDown { get; }

    /// <summary>Upward at the bottom into upward at the top.</summary>
    LaneBuffer<TLanes> TransmitUp { get; }

    /// <summary>Upward at the bottom into downward at the bottom.</summary>
    LaneBuffer<TLanes> ReflectBottom { get; }

    /// <summary>Whether it loses power in some lane.</summary>
    bool Absorbs(PackLanes<TLanes> pack);

    /// <summary>Prepares what both fields share.</summary>
    void SetDirection(DirectionLanes<TLanes> direction, in Resolution resolution);

    /// <summary>Fills the four matrices for one field along the rods.</summary>
    /// <returns>Mask of the lanes whose answer is not to be trusted.</returns>
    TLanes Solve(RodField field);

    /// <summary>Adds the power lost in each material to <paramref name="byMaterial"/>, in units of Re(conj(phi) psi)
    /// (<see cref="Joining.ChannelTable"/>), from the waves that fall on the element. Called any number of times after <see cref="Solve"/>.</summary>
    /// <param name="down">Downward amplitudes at the top, by order.</param>
    /// <param name="up">Upward amplitudes at the bottom.</param>
    /// <param name="byMaterial">Real numbers by the number of the material, the matrix included.</param>
    void AddLoss(LaneBuffer<TLanes> down, LaneBuffer<TLanes> up, LaneBuffer<TLanes> byMaterial);
}
