using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Grating.Multipoles.Lanes;

/// <summary>Sums over the points of an outline, in each lane.</summary>
internal static class EllipseSums
{
    /// <summary>Values and derivatives of the waves of one symmetry at the points: order after order, point after point.</summary>
    /// <param name="of">The symmetry.</param>
    /// <param name="points">The points.</param>
    /// <param name="k">Wave number, 1/nm.</param>
    /// <param name="orders">Number of orders in <paramref name="waves"/>.</param>
    /// <param name="waves">Z_m(kr), point after point.</param>
    /// <param name="values">Receives the waves.</param>
    /// <param name="slopes">Receives their derivatives, see <see cref="EllipseQuadrature"/>.</param>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void SetNodes<TLanes>(
        in EllipseSymmetry of, EllipseQuadrature points, ComplexLanes<TLanes> k, int orders, ref double waves, ref double values, ref double slopes)
        where TLanes : struct, ILanes<TLanes>
    {
        int stride = ComplexLanes<TLanes>.Stride;
        ComplexLanes<TLanes> half = TLanes.Broadcast(0.5) * k;
        for (int i = 0; i < of.Count; i++)
        {
            int m = of.Order(i);
            ReadOnlySpan<double> angular = points.Angular(of.IsSine, m), lower = points.Lower(of.IsSine, m), upper = points.Upper(of.IsSine, m);
            for (int q = 0; q < angular.Length; q++)
            {
                ref double at = ref Unsafe.Add(ref waves, (q * orders + m) * stride);
                ComplexLanes<TLanes> next = ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref at, stride));
                // Z_(-1) = -Z_1.
                ComplexLanes<TLanes> before = m > 0 ? ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref at, -stride)) : -next;
                int place = (i * angular.Length + q) * stride;
                ComplexLanes<TLanes>.Store(TLanes.Broadcast(angular[q]) * ComplexLanes<TLanes>.Load(ref at), ref Unsafe.Add(ref values, place));
                ComplexLanes<TLanes>.Store(
                    half * (TLanes.Broadcast(lower[q]) * before - TLanes.Broadcast(upper[q]) * next), ref Unsafe.Add(ref slopes, place));
            }
        }
    }

    /// <summary>Integrals of waves with the terms of a Fourier series: element (i, j) goes with wave i and term j.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void WithSeries<TLanes>(in EllipseSymmetry of, EllipseQuadrature points, ref double waves, ref double table)
        where TLanes : struct, ILanes<TLanes>
    {
        int stride = ComplexLanes<TLanes>.Stride, count = of.Count, length = points.Count;
        for (int j = 0; j < count; j += 2)
        {
            ReadOnlySpan<double> series = points.Series(of.IsSine, of.Order(j)), next = points.Series(of.IsSine, of.Order(Math.Min(j + 1, count - 1)));
            for (int i = 0; i < count; i++)
            {
                ref double wave = ref Unsafe.Add(ref waves, i * length * stride);
                TLanes real = TLanes.Broadcast(0), imaginary = real, nextReal = real, nextImaginary = real;
                for (int q = 0; q < length; q++)
                {
                    ComplexLanes<TLanes> value = ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref wave, q * stride));
                    TLanes term = TLanes.Broadcast(series[q]), nextTerm = TLanes.Broadcast(next[q]);
                    real = TLanes.MultiplyAdd(term, value.Real, real);
                    imaginary = TLanes.MultiplyAdd(term, value.Imaginary, imaginary);
                    nextReal = TLanes.MultiplyAdd(nextTerm, value.Real, nextReal);
                    nextImaginary = TLanes.MultiplyAdd(nextTerm, value.Imaginary, nextImaginary);
                }
                ComplexLanes<TLanes>.Store(new(real, imaginary), ref Unsafe.Add(ref table, (i * count + j) * stride));
                if (j + 1 < count)
                    ComplexLanes<TLanes>.Store(new(nextReal, nextImaginary), ref Unsafe.Add(ref table, (i * count + j + 1) * stride));
            }
        }
    }

    /// <summary>Integrals of products of waves: element (i, j) goes with wave i of the first and wave j of the second.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void Products<TLanes>(int count, double[] weights, ref double first, ref double second, ref double table)
        where TLanes : struct, ILanes<TLanes>
    {
        int stride = ComplexLanes<TLanes>.Stride, length = weights.Length;
        for (int i = 0; i < count; i++)
        {
            // The weight goes with the first of the two, once.
            ref double left = ref Unsafe.Add(ref first, i * length * stride);
            for (int j = 0; j < count; j++)
            {
                ref double right = ref Unsafe.Add(ref second, j * length * stride);
                ComplexLanes<TLanes> sum = ComplexLanes<TLanes>.Broadcast(0);
                for (int q = 0; q < length; q++)
                {
                    ComplexLanes<TLanes> product = ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref left, q * stride))
                        * ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref right, q * stride));
                    TLanes weight = TLanes.Broadcast(weights[q]);
                    sum = new(TLanes.MultiplyAdd(weight, product.Real, sum.Real), TLanes.MultiplyAdd(weight, product.Imaginary, sum.Imaginary));
                }
                ComplexLanes<TLanes>.Store(sum, ref Unsafe.Add(ref table, (i * count + j) * stride));
            }
        }
    }

    /// <summary>Sum of products of a row, whose elements follow one another, and a column of a square table.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ComplexLanes<TLanes> Product<TLanes>(int count, ref double row, ref double column)
        where TLanes : struct, ILanes<TLanes>
    {
        int stride = ComplexLanes<TLanes>.Stride;
        ComplexLanes<TLanes> sum = ComplexLanes<TLanes>.Broadcast(0);
        for (int j = 0; j < count; j++)
        {
            sum = ComplexLanes<TLanes>.MultiplyAdd(
                ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref row, j * stride)), ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref column, j * count * stride)), sum);
        }
        return sum;
    }

    /// <summary>first - ratio second, element by element.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void Combine<TLanes>(int length, ComplexLanes<TLanes> ratio, ref double first, ref double second, ref double result)
        where TLanes : struct, ILanes<TLanes>
    {
        int stride = ComplexLanes<TLanes>.Stride;
        for (int i = 0; i < length * stride; i += stride)
        {
            ComplexLanes<TLanes>.Store(
                ComplexLanes<TLanes>.SubtractProduct(
                    ratio, ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref second, i)), ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref first, i))),
                ref Unsafe.Add(ref result, i));
        }
    }

    /// <summary>Divides each row of a system by the absolute value of its largest element among the first <paramref name="size"/>.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void ScaleRows<TLanes>(ref double system, int rows, int size, int width)
        where TLanes : struct, ILanes<TLanes>
    {
        int stride = ComplexLanes<TLanes>.Stride;
        for (int i = 0; i < rows; i++)
        {
            ref double row = ref Unsafe.Add(ref system, i * width * stride);
            TLanes most = TLanes.Broadcast(1e-300);
            for (int j = 0; j < size; j++)
                most = TLanes.Max(most, ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref row, j * stride)).Norm);
            TLanes scale = TLanes.Broadcast(1) / TLanes.Sqrt(most);
            for (int j = 0; j < width; j++)
            {
                ref double at = ref Unsafe.Add(ref row, j * stride);
                ComplexLanes<TLanes>.Store(scale * ComplexLanes<TLanes>.Load(ref at), ref at);
            }
        }
    }
}
