using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Grating.Multipoles.Lanes;

/// <summary>The sums of inverse powers of <see cref="LatticeTail"/>, another start a lane.</summary>
/// <remarks>Starts of 11.5 and more, where eight terms of the asymptotic series still fall for all powers.</remarks>
internal sealed class TailLanes<TLanes>
    where TLanes : struct, ILanes<TLanes>
{
    /// <summary>Largest power.</summary>
    public const int MostPower = LatticeTail.MostPower;

    private readonly LaneBuffer<TLanes> _sums = new();
    private TLanes _start, _inverse, _square;
    private int _known;

    public TailLanes() => _sums.Reserve(MostPower / 2 + 1);

    /// <summary>Sets the start a, and forgets the sums of another.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void Set(TLanes start)
    {
        _start = start;
        _inverse = TLanes.Broadcast(1) / start;
        _square = _inverse * _inverse;
        _known = 0;
    }

    /// <summary>a^s times the sum of (n + a)^-s over n >= 0; for s = 1, -a psi(a).</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public TLanes ScaledSum(int power)
    {
        for (; _known < power; _known++)
            _sums.SetReal(_known + 1, Sum(_known + 1));
        return _sums.Real(power);
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private TLanes Sum(int s)
    {
        TLanes leading = s == 1 ? -(_start * TLanes.Log(_start)) : _start * TLanes.Broadcast(1.0 / (s - 1));
        // From the last term inward: B_2k/(2k)! s (s + 1) ... (s + 2k - 2)/a^(2k - 1).
        ReadOnlySpan<double> bernoulli = LatticeTail.Bernoulli;
        TLanes sum = TLanes.Broadcast(0);
        for (int k = bernoulli.Length - 1; k >= 0; k--)
        {
            double first = k == 0 ? s : (s + 2 * k - 1.0) * (s + 2 * k);
            sum = TLanes.Broadcast(first) * (k == 0 ? _inverse : _square) * (TLanes.Broadcast(bernoulli[k]) + sum);
        }
        return TLanes.Broadcast(0.5) + leading + sum;
    }
}
