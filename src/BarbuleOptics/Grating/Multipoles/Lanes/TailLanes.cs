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

    public TailLanes() => _sums.Reserve(MostPower / 2 + 1);

    /// <summary>a^s times the sum of (n + a)^-s over n >= 0; for s = 1, -a psi(a).</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public TLanes ScaledSum(int power) => _sums.Real(power);

    /// <summary>Finds the sums of powers 1 to <paramref name="most"/> for a start a.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void Set(TLanes start, int most)
    {
        TLanes inverse = TLanes.Broadcast(1) / start, square = inverse * inverse, half = TLanes.Broadcast(0.5);
        ReadOnlySpan<double> bernoulli = LatticeTail.Bernoulli;
        for (int s = 1; s <= most; s++)
        {
            // From the last term inward: B_2k/(2k)! s (s + 1) ... (s + 2k - 2)/a^(2k - 1).
            TLanes sum = TLanes.Broadcast(bernoulli[^1]);
            for (int k = bernoulli.Length - 1; k > 0; k--)
                sum = TLanes.MultiplyAdd(TLanes.Broadcast((s + 2 * k - 1.0) * (s + 2 * k)) * square, sum, TLanes.Broadcast(bernoulli[k - 1]));
            TLanes leading = s == 1 ? -(start * TLanes.Log(start)) : start * TLanes.Broadcast(1.0 / (s - 1));
            _sums.SetReal(s, half + leading + TLanes.Broadcast(s) * inverse * sum);
        }
    }
}
