using System.Runtime.CompilerServices;

namespace BarbuleOptics.Lanes;

/// <summary>Small dense complex algebra, one problem a lane; matrices are row-major, an element as <see cref="ComplexLanes{TLanes}"/> lies in memory.</summary>
/// <remarks>Sums of products are held in registers for up to four columns at a time: eight accumulators hide the latency of a fused
/// multiply-add, where one would wait for itself. Distances in memory are in doubles.</remarks>
internal static class LaneAlgebra<TLanes>
    where TLanes : struct, ILanes<TLanes>
{
    /// <summary>sum[j] += sum over k of left[k] right[k, j], for one row.</summary>
    /// <param name="sum">The row, columns one after another.</param>
    /// <param name="left">First factor of each product.</param>
    /// <param name="leftStep">From one k to the next.</param>
    /// <param name="right">First row of the second factors.</param>
    /// <param name="rightStep">From one k to the next.</param>
    /// <param name="terms">Number of k.</param>
    /// <param name="columns">Number of j.</param>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void Add(ref double sum, ref double left, int leftStep, ref double right, int rightStep, int terms, int columns)
    {
        int stride = ComplexLanes<TLanes>.Stride;
        while (columns > 0)
        {
            // Strips of 4, 3 and 2: a strip of one waits longest.
            int width = columns is 5 or 3 ? 3 : Math.Min(columns, 4);
            switch (width)
            {
                case 4:
                    Strip4(ref sum, ref left, leftStep, ref right, rightStep, terms);
                    break;
                case 3:
                    Strip3(ref sum, ref left, leftStep, ref right, rightStep, terms);
                    break;
                case 2:
                    Strip2(ref sum, ref left, leftStep, ref right, rightStep, terms);
                    break;
                default:
                    Strip1(ref sum, ref left, leftStep, ref right, rightStep, terms);
                    break;
            }
            columns -= width;
            sum = ref Unsafe.Add(ref sum, width * stride);
            right = ref Unsafe.Add(ref right, width * stride);
        }
    }

    /// <summary>product = left right, all of them square.</summary>
    public static void Multiply(LaneBuffer<TLanes> product, LaneBuffer<TLanes> left, LaneBuffer<TLanes> right, int size)
    {
        product.Clear(size * size);
        AddProduct(product, left, right, size);
    }

    /// <summary>sum += left right, all of them square.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void AddProduct(LaneBuffer<TLanes> sum, LaneBuffer<TLanes> left, LaneBuffer<TLanes> right, int size)
    {
        int stride = ComplexLanes<TLanes>.Stride;
        for (int row = 0; row < size; row++)
            Add(ref sum.At(row * size), ref left.At(row * size), stride, ref right.At(0), size * stride, size, size);
    }

    /// <summary>result = matrix vector, all at once or added to what is there.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void Apply(LaneBuffer<TLanes> result, LaneBuffer<TLanes> matrix, LaneBuffer<TLanes> vector, int size)
    {
        for (int row = 0; row < size; row++)
        {
            ref double elements = ref matrix.At(row * size);
            ComplexLanes<TLanes> even = ComplexLanes<TLanes>.Broadcast(0), odd = even;
            int column = 0;
            for (; column + 1 < size; column += 2)
            {
                even = ComplexLanes<TLanes>.MultiplyAdd(Element(ref elements, column), vector[column], even);
                odd = ComplexLanes<TLanes>.MultiplyAdd(Element(ref elements, column + 1), vector[column + 1], odd);
            }
            if (column < size)
                even = ComplexLanes<TLanes>.MultiplyAdd(Element(ref elements, column), vector[column], even);
            result[row] = even + odd;
        }
    }

    /// <summary>Solves matrix x = right by elimination without exchange of rows; both are overwritten, right with x.</summary>
    /// <param name="matrix">The square matrix.</param>
    /// <param name="size">Its size.</param>
    /// <param name="right">Right sides, row-major.</param>
    /// <param name="columns">Number of right sides.</param>
    /// <returns>By lane the least square of a pivot, to be compared with that of the elements.</returns>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static TLanes Solve(LaneBuffer<TLanes> matrix, int size, LaneBuffer<TLanes> right, int columns)
    {
        TLanes least = TLanes.Broadcast(double.MaxValue);
        int stride = ComplexLanes<TLanes>.Stride;
        // Left behind are -L below the diagonal, the inverse pivots on it and -U above, so that both substitutions are sums of products.
        for (int k = 0; k < size; k++)
        {
            ComplexLanes<TLanes> pivot = matrix[k * size + k];
            TLanes norm = pivot.Norm;
            least = TLanes.Min(least, norm);
            ComplexLanes<TLanes> inverse = TLanes.Broadcast(1) / norm * pivot.Conjugate;
            matrix[k * size + k] = inverse;
            for (int column = k + 1; column < size; column++)
                matrix[k * size + column] = -matrix[k * size + column];
            for (int row = k + 1; row < size; row++)
            {
                ComplexLanes<TLanes> factor = matrix[row * size + k] * inverse;
                matrix[row * size + k] = -factor;
                AddScaled(ref matrix.At(row * size + k + 1), factor, ref matrix.At(k * size + k + 1), size - k - 1);
            }
        }
        for (int row = 1; row < size; row++)
            Add(ref right.At(row * columns), ref matrix.At(row * size), stride, ref right.At(0), columns * stride, row, columns);
        for (int row = size - 1; row >= 0; row--)
        {
            Add(ref right.At(row * columns), ref matrix.At(row * size + row + 1), stride, ref right.At((row + 1) * columns), columns * stride, size - row - 1, columns);
            ComplexLanes<TLanes> inverse = matrix[row * size + row];
            for (int column = 0; column < columns; column++)
                right[row * columns + column] = inverse * right[row * columns + column];
        }
        return least;
    }

    /// <summary>sum[j] += factor terms[j].</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void AddScaled(ref double sum, ComplexLanes<TLanes> factor, ref double terms, int count)
    {
        int stride = ComplexLanes<TLanes>.Stride;
        for (; count > 0; count--)
        {
            ComplexLanes<TLanes>.Store(
                ComplexLanes<TLanes>.MultiplyAdd(factor, ComplexLanes<TLanes>.Load(ref terms), ComplexLanes<TLanes>.Load(ref sum)), ref sum);
            sum = ref Unsafe.Add(ref sum, stride);
            terms = ref Unsafe.Add(ref terms, stride);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static ComplexLanes<TLanes> Element(ref double first, int number)
        => ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref first, number * ComplexLanes<TLanes>.Stride));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Strip4(ref double sum, ref double left, int leftStep, ref double right, int rightStep, int terms)
    {
        int stride = ComplexLanes<TLanes>.Stride;
        ComplexLanes<TLanes> s0 = Element(ref sum, 0), s1 = Element(ref sum, 1), s2 = Element(ref sum, 2), s3 = Element(ref sum, 3);
        for (; terms > 0; terms--)
        {
            ComplexLanes<TLanes> factor = ComplexLanes<TLanes>.Load(ref left);
            s0 = ComplexLanes<TLanes>.MultiplyAdd(factor, Element(ref right, 0), s0);
            s1 = ComplexLanes<TLanes>.MultiplyAdd(factor, Element(ref right, 1), s1);
            s2 = ComplexLanes<TLanes>.MultiplyAdd(factor, Element(ref right, 2), s2);
            s3 = ComplexLanes<TLanes>.MultiplyAdd(factor, Element(ref right, 3), s3);
            left = ref Unsafe.Add(ref left, leftStep);
            right = ref Unsafe.Add(ref right, rightStep);
        }
        ComplexLanes<TLanes>.Store(s0, ref sum);
        ComplexLanes<TLanes>.Store(s1, ref Unsafe.Add(ref sum, stride));
        ComplexLanes<TLanes>.Store(s2, ref Unsafe.Add(ref sum, 2 * stride));
        ComplexLanes<TLanes>.Store(s3, ref Unsafe.Add(ref sum, 3 * stride));
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Strip3(ref double sum, ref double left, int leftStep, ref double right, int rightStep, int terms)
    {
        int stride = ComplexLanes<TLanes>.Stride;
        ComplexLanes<TLanes> s0 = Element(ref sum, 0), s1 = Element(ref sum, 1), s2 = Element(ref sum, 2);
        for (; terms > 0; terms--)
        {
            ComplexLanes<TLanes> factor = ComplexLanes<TLanes>.Load(ref left);
            s0 = ComplexLanes<TLanes>.MultiplyAdd(factor, Element(ref right, 0), s0);
            s1 = ComplexLanes<TLanes>.MultiplyAdd(factor, Element(ref right, 1), s1);
            s2 = ComplexLanes<TLanes>.MultiplyAdd(factor, Element(ref right, 2), s2);
            left = ref Unsafe.Add(ref left, leftStep);
            right = ref Unsafe.Add(ref right, rightStep);
        }
        ComplexLanes<TLanes>.Store(s0, ref sum);
        ComplexLanes<TLanes>.Store(s1, ref Unsafe.Add(ref sum, stride));
        ComplexLanes<TLanes>.Store(s2, ref Unsafe.Add(ref sum, 2 * stride));
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Strip2(ref double sum, ref double left, int leftStep, ref double right, int rightStep, int terms)
    {
        ComplexLanes<TLanes> s0 = Element(ref sum, 0), s1 = Element(ref sum, 1);
        for (; terms > 0; terms--)
        {
            ComplexLanes<TLanes> factor = ComplexLanes<TLanes>.Load(ref left);
            s0 = ComplexLanes<TLanes>.MultiplyAdd(factor, Element(ref right, 0), s0);
            s1 = ComplexLanes<TLanes>.MultiplyAdd(factor, Element(ref right, 1), s1);
            left = ref Unsafe.Add(ref left, leftStep);
            right = ref Unsafe.Add(ref right, rightStep);
        }
        ComplexLanes<TLanes>.Store(s0, ref sum);
        ComplexLanes<TLanes>.Store(s1, ref Unsafe.Add(ref sum, ComplexLanes<TLanes>.Stride));
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Strip1(ref double sum, ref double left, int leftStep, ref double right, int rightStep, int terms)
    {
        ComplexLanes<TLanes> s0 = Element(ref sum, 0);
        for (; terms > 0; terms--)
        {
            s0 = ComplexLanes<TLanes>.MultiplyAdd(ComplexLanes<TLanes>.Load(ref left), Element(ref right, 0), s0);
            left = ref Unsafe.Add(ref left, leftStep);
            right = ref Unsafe.Add(ref right, rightStep);
        }
        ComplexLanes<TLanes>.Store(s0, ref sum);
    }
}
