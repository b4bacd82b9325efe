using System.Diagnostics;
using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Benchmarks.Kernels;

/// <summary>How many floating-point operations a second one thread of this processor does in fused multiply-adds, two for each.</summary>
internal static class FmaPeak
{
    private const int Rounds = 300_000, Chains = 12;

    /// <summary>Times it once, for some milliseconds, at the processor's widest vectors.</summary>
    public static double Measure()
    {
        long start = Stopwatch.GetTimestamp();
        double count = LaneWidth.Widest.Invoke<Loop, double>(default);
        return count / Stopwatch.GetElapsedTime(start).TotalSeconds;
    }

    private readonly struct Loop : ILaneAction<double>
    {
        private static readonly double[] Sink = new double[Chains];

        // Twelve chains that do not wait for each other cover the latency of four cycles on two ports, and then some.
        [MethodImpl(MethodImplOptions.AggressiveOptimization)]
        public double Invoke<TLanes>()
            where TLanes : struct, ILanes<TLanes>
        {
            TLanes x = TLanes.Broadcast(0.999999), y = TLanes.Broadcast(1e-7);
            TLanes a = y, b = y, c = y, d = y, e = y, f = y, g = y, h = y, i = y, j = y, k = y, l = y;
            for (int round = 0; round < Rounds; round++)
            {
                a = TLanes.MultiplyAdd(a, x, y);
                b = TLanes.MultiplyAdd(b, x, y);
                c = TLanes.MultiplyAdd(c, x, y);
                d = TLanes.MultiplyAdd(d, x, y);
                e = TLanes.MultiplyAdd(e, x, y);
                f = TLanes.MultiplyAdd(f, x, y);
                g = TLanes.MultiplyAdd(g, x, y);
                h = TLanes.MultiplyAdd(h, x, y);
                i = TLanes.MultiplyAdd(i, x, y);
                j = TLanes.MultiplyAdd(j, x, y);
                k = TLanes.MultiplyAdd(k, x, y);
                l = TLanes.MultiplyAdd(l, x, y);
            }
            TLanes.Store(a + b + c + d + (e + f + g + h) + (i + j + k + l), ref Sink[0]);
            return 2.0 * Rounds * Chains * TLanes.Count;
        }
    }
}
