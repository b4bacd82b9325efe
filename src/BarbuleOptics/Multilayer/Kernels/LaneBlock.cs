using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Multilayer.Kernels;

/// <summary>Wavelengths in vectors: the last vector reaches back over the one before it, or where all are too few for one is filled up with the last.</summary>
internal static class LaneBlock
{
    /// <summary>Number of vectors for a number of wavelengths.</summary>
    public static int Vectors(int count, int lanes) => (count + lanes - 1) / lanes;

    /// <summary>Reads a vector's values.</summary>
    /// <param name="values">One a wavelength; not empty.</param>
    /// <param name="vector">Number of the vector.</param>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static TLanes Load<TLanes>(ReadOnlySpan<double> values, int vector)
        where TLanes : struct, ILanes<TLanes>
    {
        int first = Math.Min(vector * TLanes.Count, values.Length - TLanes.Count);
        return first >= 0 ? TLanes.Load(in Unsafe.Add(ref MemoryMarshal.GetReference(values), first)) : LoadFew<TLanes>(values);
    }

    /// <summary>Adds a weighted vector to the values, each value once.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Add<TLanes>(Span<double> values, int vector, double weight, TLanes addend)
        where TLanes : struct, ILanes<TLanes>
    {
        int first = vector * TLanes.Count;
        if (first + TLanes.Count <= values.Length)
        {
            ref double place = ref values[first];
            TLanes.Store(TLanes.MultiplyAdd(TLanes.Broadcast(weight), addend, TLanes.Load(in place)), ref place);
            return;
        }
        AddTail(values[first..], values.Length < TLanes.Count ? 0 : first + TLanes.Count - values.Length, weight, addend);
    }

    /// <summary>The largest of the lanes; NaN where one is.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization | MethodImplOptions.NoInlining)]
    public static double Largest<TLanes>(TLanes value)
        where TLanes : struct, ILanes<TLanes>
    {
        Span<double> lanes = stackalloc double[TLanes.Count];
        TLanes.Store(value, ref lanes[0]);
        double largest = lanes[0];
        foreach (double lane in lanes)
            largest = Math.Max(largest, lane);
        return largest;
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization | MethodImplOptions.NoInlining)]
    private static TLanes LoadFew<TLanes>(ReadOnlySpan<double> values)
        where TLanes : struct, ILanes<TLanes>
    {
        Span<double> lanes = stackalloc double[TLanes.Count];
        lanes.Fill(values[^1]);
        values.CopyTo(lanes);
        return TLanes.Load(in MemoryMarshal.GetReference(lanes));
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization | MethodImplOptions.NoInlining)]
    private static void AddTail<TLanes>(Span<double> values, int skipped, double weight, TLanes addend)
        where TLanes : struct, ILanes<TLanes>
    {
        Span<double> lanes = stackalloc double[TLanes.Count];
        TLanes.Store(addend, ref MemoryMarshal.GetReference(lanes));
        for (int lane = 0; lane < values.Length; lane++)
            values[lane] += weight * lanes[skipped + lane];
    }
}
