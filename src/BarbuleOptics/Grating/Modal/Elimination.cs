using System.Numerics;

namespace BarbuleOptics.Grating.Modal;

/// <summary>Removes leading unknowns from a dense system and leaves the Schur complement of the others in place.</summary>
/// <remarks>Rows of removed unknowns keep their upper factors, from which their values follow once the others are known.</remarks>
internal static class Elimination
{
    /// <summary>Smallest pivot against the largest element of its row that elimination without interchanges may meet.</summary>
    private const double LeastPivot = 1e-7;

    /// <summary>Number of unknowns removed together.</summary>
    private const int Panel = 4;

    /// <summary>Removes the first <paramref name="count"/> of <paramref name="size"/> unknowns of a complex symmetric system, of
    /// which the upper triangle alone is read and written, without interchanges.</summary>
    /// <returns>False where a pivot is too small for that or not finite.</returns>
    public static bool TryReduceSymmetric(ComplexMatrix system, int count, int size)
    {
        Span<Complex> inverses = stackalloc Complex[Panel];
        for (int first = 0; first < count; first += Panel)
        {
            // A few rows are made ready, then all rows below are reduced by them at once, which reads and writes those less often.
            int pivots = Math.Min(Panel, count - first);
            for (int k = first; k < first + pivots; k++)
            {
                Span<Complex> top = system.Row(k)[k..size];
                if (!IsSafe(top))
                    return false;
                Complex inverse = inverses[k - first] = Complex.One / top[0];
                for (int row = k + 1; row < first + pivots; row++)
                    ComplexMatrix.SubtractScaled(system.Row(row)[row..size], top[row - k] * inverse, top[(row - k)..]);
            }
            for (int row = first + pivots; row < size; row++)
                Reduce(system, first, inverses[..pivots], row, size);
        }
        return true;
    }

    private static void Reduce(ComplexMatrix system, int first, ReadOnlySpan<Complex> inverses, int row, int size)
    {
        Span<Complex> target = system.Row(row)[row..size];
        if (inverses.Length < Panel)
        {
            for (int p = 0; p < inverses.Length; p++)
                ComplexMatrix.SubtractScaled(target, system[first + p, row] * inverses[p], system.Row(first + p)[row..size]);
            return;
        }
        ComplexMatrix.SubtractScaled(
            target, system[first, row] * inverses[0], system.Row(first)[row..size], system[first + 1, row] * inverses[1], system.Row(first + 1)[row..size],
            system[first + 2, row] * inverses[2], system.Row(first + 2)[row..size], system[first + 3, row] * inverses[3], system.Row(first + 3)[row..size]);
    }

    /// <summary>Removes the first <paramref name="count"/> of <paramref name="size"/> unknowns of any system, with interchanges of rows
    /// among those removed.</summary>
    /// <returns>False where the block removed has no inverse.</returns>
    public static bool TryReduce(ComplexMatrix system, int count, int size)
    {
        for (int k = 0; k < count; k++)
        {
            Interchange(system, k, count, size);
            Span<Complex> top = system.Row(k)[k..size];
            if (top[0] == Complex.Zero || !Complex.IsFinite(top[0]))
                return false;
            Complex inverse = Complex.One / top[0];
            for (int row = k + 1; row < size; row++)
            {
                Span<Complex> target = system.Row(row)[k..size];
                if (target[0] != Complex.Zero)
                    ComplexMatrix.SubtractScaled(target, target[0] * inverse, top);
            }
        }
        return true;
    }

    /// <summary>Copies the upper triangle of the block that starts at <paramref name="first"/> below the diagonal.</summary>
    public static void MirrorUpper(ComplexMatrix system, int first, int size)
    {
        for (int row = first; row < size; row++)
        {
            for (int column = first; column < row; column++)
                system[row, column] = system[column, row];
        }
    }

    private static bool IsSafe(ReadOnlySpan<Complex> row)
    {
        double most = 0;
        foreach (Complex element in row[1..])
            most = Math.Max(most, Size(element));
        double pivot = Size(row[0]);
        return pivot > LeastPivot * most && double.IsFinite(pivot);
    }

    private static void Interchange(ComplexMatrix system, int k, int count, int size)
    {
        int best = k;
        for (int row = k + 1; row < count; row++)
        {
            if (Size(system[row, k]) > Size(system[best, k]))
                best = row;
        }
        if (best == k)
            return;
        Span<Complex> one = system.Row(k)[..size], other = system.Row(best)[..size];
        for (int i = 0; i < size; i++)
            (one[i], other[i]) = (other[i], one[i]);
    }

    private static double Size(Complex value) => Math.Abs(value.Real) + Math.Abs(value.Imaginary);
}
