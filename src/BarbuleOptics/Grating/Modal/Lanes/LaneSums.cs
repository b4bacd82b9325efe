using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Grating.Modal.Lanes;

/// <summary>Sums of matrices in lanes memory, element by element.</summary>
internal static class LaneSums
{
    /// <summary>Adds <paramref name="factor"/> times <paramref name="source"/>, both of <paramref name="count"/> complex elements side by side.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void Add<TLanes>(ref double target, ref double source, double factor, int count)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes scale = TLanes.Broadcast(factor);
        for (int i = 0; i < 2 * count; i++)
        {
            TLanes.Store(TLanes.MultiplyAdd(scale, TLanes.Load(in source), TLanes.Load(in target)), ref target);
            target = ref Unsafe.Add(ref target, TLanes.Count);
            source = ref Unsafe.Add(ref source, TLanes.Count);
        }
    }

    /// <summary>Writes one <paramref name="factor"/> times <paramref name="first"/> plus another times <paramref name="second"/>.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void Set<TLanes>(ref double target, ref double first, double factor, ref double second, double otherFactor, int count)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes one = TLanes.Broadcast(factor), other = TLanes.Broadcast(otherFactor);
        for (int i = 0; i < 2 * count; i++)
        {
            TLanes.Store(TLanes.MultiplyAdd(one, TLanes.Load(in first), other * TLanes.Load(in second)), ref target);
            target = ref Unsafe.Add(ref target, TLanes.Count);
            first = ref Unsafe.Add(ref first, TLanes.Count);
            second = ref Unsafe.Add(ref second, TLanes.Count);
        }
    }

    /// <summary>Adds a complex number of each lane times a real matrix that all lanes share.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void AddShared<TLanes>(ref double target, ComplexLanes<TLanes> factor, ReadOnlySpan<double> shared)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes real = factor.Real, imaginary = factor.Imaginary;
        foreach (double element in shared)
        {
            TLanes scale = TLanes.Broadcast(element);
            ref double second = ref Unsafe.Add(ref target, TLanes.Count);
            TLanes.Store(TLanes.MultiplyAdd(real, scale, TLanes.Load(in target)), ref target);
            TLanes.Store(TLanes.MultiplyAdd(imaginary, scale, TLanes.Load(in second)), ref second);
            target = ref Unsafe.Add(ref second, TLanes.Count);
        }
    }

    /// <summary>Writes n rows of n elements, one <paramref name="factor"/> times the first matrix plus another times the second, into the left part of a
    /// system of <paramref name="width"/> columns.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void SetLeft<TLanes>(ref double system, int n, int width, ref double first, double factor, ref double second, double otherFactor)
        where TLanes : struct, ILanes<TLanes>
    {
        int size = 2 * TLanes.Count;
        for (int row = 0; row < n; row++)
        {
            // The upper triangle is all that is read.
            int from = (row * n + row) * size;
            Set<TLanes>(ref Unsafe.Add(ref system, (row * width + row) * size), ref Unsafe.Add(ref first, from), factor, ref Unsafe.Add(ref second, from), otherFactor, n - row);
        }
    }

    /// <summary>Copies n rows of c elements, times a factor, into the right part of a system of n + c columns.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void SetRight<TLanes>(ref double system, int n, int c, ref double right, double factor)
        where TLanes : struct, ILanes<TLanes>
    {
        int size = 2 * TLanes.Count;
        for (int row = 0; row < n; row++)
        {
            ref double from = ref Unsafe.Add(ref right, row * c * size);
            Set<TLanes>(ref Unsafe.Add(ref system, (row * (n + c) + n) * size), ref from, factor, ref from, 0, c);
        }
    }

    /// <summary>Writes the unit matrix into the right part of a system of 2 n columns.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void SetRightIdentity<TLanes>(ref double system, int n)
        where TLanes : struct, ILanes<TLanes>
    {
        int size = 2 * TLanes.Count;
        for (int row = 0; row < n; row++)
        {
            for (int column = 0; column < n; column++)
                ComplexLanes<TLanes>.Store(ComplexLanes<TLanes>.Broadcast(row == column ? 1 : 0), ref Unsafe.Add(ref system, (2 * row * n + n + column) * size));
        }
    }

    /// <summary>Sets elements to zero.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void Clear<TLanes>(ref double target, int count)
        where TLanes : struct, ILanes<TLanes>
    {
        for (int i = 0; i < 2 * count; i++)
            TLanes.Store(TLanes.Broadcast(0), ref Unsafe.Add(ref target, i * TLanes.Count));
    }
}
