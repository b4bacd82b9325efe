using System.Runtime.CompilerServices;
using BarbuleOptics.Grating.Multipoles.Lanes;
using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Batches;

/// <summary>What all elements share at one direction: the plane waves, and lattice sums once they are asked for.</summary>
internal sealed class DirectionLanes<TLanes>
    where TLanes : struct, ILanes<TLanes>
{
    private readonly LatticeLanes<TLanes> _sums = new();
    private int _top = -1;

    /// <summary>The plane waves.</summary>
    public ChannelLanes<TLanes> Channels { get; } = new();

    /// <summary>Scratch tables for the answers of rods.</summary>
    public RodTables<TLanes> Tables { get; } = new();

    /// <summary>Least |kz|^2/|k|^2 of an order in the matrix; very large before lattice sums were asked for.</summary>
    public TLanes LeastDepth { get; private set; }

    /// <summary>Takes a direction over; <paramref name="sameSums"/> tells that wavelengths, direction and period are those of the last call.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void Set(PackLanes<TLanes> pack, double sine, double cosine, double periodNm, int mostOrder, int media, bool sameSums)
    {
        Channels.Set(pack, sine, cosine, periodNm, mostOrder, media);
        if (sameSums)
            return;
        _top = -1;
        LeastDepth = TLanes.Broadcast(double.MaxValue);
    }

    /// <summary>Lattice sums 0 to <paramref name="top"/> of the period.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public LatticeLanes<TLanes> Sums(int top)
    {
        if (top > _top)
        {
            PackLanes<TLanes> pack = Channels.Pack;
            _sums.Set(pack.WaveNumber(Section.Matrix), Channels.Turns, Channels.PeriodNm, pack.LargestWaveNumber(Section.Matrix), top);
            _top = top;
            LeastDepth = _sums.LeastDepth;
        }
        return _sums;
    }
}
