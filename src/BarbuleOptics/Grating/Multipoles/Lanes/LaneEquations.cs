using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Grating.Multipoles.Lanes;

/// <summary>Small dense complex systems, one in each lane, solved side by side.</summary>
/// <remarks>Gaussian elimination in which all lanes share the row order: the pivot is the element that is largest over all lanes together, which
/// is as good as one for each lane where lanes are neighboring wavelengths. Rows should be of like size.</remarks>
internal static class LaneEquations
{
    /// <summary>Solves A X = B in place.</summary>
    /// <param name="system">Rows of A with those of B behind them: size x (size + columns) complex values; X replaces B.</param>
    /// <param name="size">Number of unknowns.</param>
    /// <param name="columns">Number of right sides.</param>
    /// <returns>False where a pivot vanishes in some lane.</returns>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static bool TrySolve<TLanes>(ref double system, int size, int columns)
        where TLanes : struct, ILanes<TLanes>
    {
        int stride = ComplexLanes<TLanes>.Stride, width = size + columns;
        for (int k = 0; k < size; k++)
        {
            int best = PivotRow<TLanes>(ref system, k, size, width);
            if (best < 0)
                return false;
            if (best != k)
                Exchange<TLanes>(ref system, k, best, width);
            ref double pivotRow = ref Unsafe.Add(ref system, k * width * stride);
            ComplexLanes<TLanes> inverse = ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref pivotRow, k * stride)).Reciprocal();
            for (int j = k + 1; j < width; j++)
            {
                ref double at = ref Unsafe.Add(ref pivotRow, j * stride);
                ComplexLanes<TLanes>.Store(ComplexLanes<TLanes>.Load(ref at) * inverse, ref at);
            }
            for (int i = k + 1; i < size; i++)
                Subtract<TLanes>(ref system, i, k, k + 1, width);
        }
        for (int k = size - 1; k > 0; k--)
        {
            for (int i = 0; i < k; i++)
                Subtract<TLanes>(ref system, i, k, size, width);
        }
        return true;
    }

    // Row i loses its element of column k times row k, from a column on.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Subtract<TLanes>(ref double system, int i, int k, int from, int width)
        where TLanes : struct, ILanes<TLanes>
    {
        int stride = ComplexLanes<TLanes>.Stride;
        ref double row = ref Unsafe.Add(ref system, i * width * stride);
        ref double pivotRow = ref Unsafe.Add(ref system, k * width * stride);
        ComplexLanes<TLanes> factor = ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref row, k * stride));
        for (int j = from; j < width; j++)
        {
            ref double at = ref Unsafe.Add(ref row, j * stride);
            ComplexLanes<TLanes>.Store(
                ComplexLanes<TLanes>.SubtractProduct(factor, ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref pivotRow, j * stride)), ComplexLanes<TLanes>.Load(ref at)), ref at);
        }
    }

    private static int PivotRow<TLanes>(ref double system, int k, int size, int width)
        where TLanes : struct, ILanes<TLanes>
    {
        int stride = ComplexLanes<TLanes>.Stride, best = -1;
        double most = 0;
        Span<double> norms = stackalloc double[TLanes.Count];
        for (int i = k; i < size; i++)
        {
            TLanes.Store(ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref system, (i * width + k) * stride)).Norm, ref norms[0]);
            double sum = 0, least = double.PositiveInfinity;
            foreach (double norm in norms)
                (sum, least) = (sum + norm, Math.Min(least, norm));
            // A lane in which it vanishes cannot be divided by it.
            if (least > 0 && sum > most)
                (best, most) = (i, sum);
        }
        return double.IsFinite(most) ? best : -1;
    }

    private static void Exchange<TLanes>(ref double system, int first, int second, int width)
        where TLanes : struct, ILanes<TLanes>
    {
        int length = width * ComplexLanes<TLanes>.Stride;
        Span<double> one = System.Runtime.InteropServices.MemoryMarshal.CreateSpan(ref Unsafe.Add(ref system, first * length), length);
        Span<double> other = System.Runtime.InteropServices.MemoryMarshal.CreateSpan(ref Unsafe.Add(ref system, second * length), length);
        for (int i = 0; i < length; i++)
            (one[i], other[i]) = (other[i], one[i]);
    }
}
