using System.Numerics;

namespace BarbuleOptics.Grating;

/// <summary>Solves square complex systems by elimination with partial pivoting; factors once, solves many right sides.</summary>
internal sealed class LinearSolver
{
    /// <summary>Columns eliminated before those behind them are touched.</summary>
    private const int Panel = 4;

    private readonly ComplexMatrix _factors;
    private readonly int[] _pivots;
    private readonly Complex[] _inverseDiagonal;

    /// <summary>A solver for systems of <paramref name="size"/> unknowns.</summary>
    public LinearSolver(int size)
    {
        _factors = new ComplexMatrix(size, size);
        _pivots = new int[size];
        _inverseDiagonal = new Complex[size];
    }

    /// <summary>Factors a copy of <paramref name="matrix"/>.</summary>
    /// <returns>Whether it has an inverse in floating point: false where a pivot is zero or not finite.</returns>
    public bool TryFactor(ComplexMatrix matrix)
    {
        _factors.CopyFrom(matrix);
        int size = _pivots.Length;
        for (int first = 0; first < size; first += Panel)
        {
            int end = Math.Min(size, first + Panel);
            for (int k = first; k < end; k++)
            {
                if (!TryEliminate(k, end))
                    return false;
            }
            // What the panel does to the columns behind it, four rows in one pass.
            for (int k = first + 1; k < end; k++)
            {
                for (int above = first; above < k; above++)
                    ComplexMatrix.SubtractScaled(_factors.Row(k)[end..], _factors[k, above], _factors.Row(above)[end..]);
            }
            for (int row = end; row < size; row++)
            {
                ReadOnlySpan<Complex> factors = _factors.Row(row).Slice(first, Panel);
                ComplexMatrix.SubtractScaled(
                    _factors.Row(row)[end..], factors[0], _factors.Row(first)[end..], factors[1], _factors.Row(first + 1)[end..],
                    factors[2], _factors.Row(first + 2)[end..], factors[3], _factors.Row(first + 3)[end..]);
            }
        }
        return true;
    }

    // One column, within the columns before end.
    private bool TryEliminate(int k, int end)
    {
        _pivots[k] = LargestBelow(k);
        Swap(_factors, k, _pivots[k]);
        Complex pivot = _factors[k, k];
        if (pivot == Complex.Zero || !Complex.IsFinite(pivot))
            return false;
        _inverseDiagonal[k] = Complex.One / pivot;
        ReadOnlySpan<Complex> tail = _factors.Row(k)[(k + 1)..end];
        for (int row = k + 1; row < _pivots.Length; row++)
        {
            Complex factor = _factors[row, k] * _inverseDiagonal[k];
            _factors[row, k] = factor;
            if (factor != Complex.Zero)
                ComplexMatrix.SubtractScaled(_factors.Row(row)[(k + 1)..end], factor, tail);
        }
        return true;
    }

    /// <summary>Replaces the columns of <paramref name="right"/> by the solutions.</summary>
    public void Solve(ComplexMatrix right)
    {
        int size = _pivots.Length;
        for (int k = 0; k < size; k++)
            Swap(right, k, _pivots[k]);
        for (int row = 1; row < size; row++)
            SubtractRows(right, row, 0, row);
        for (int row = size - 1; row >= 0; row--)
        {
            SubtractRows(right, row, row + 1, size);
            Span<Complex> solved = right.Row(row);
            for (int column = 0; column < solved.Length; column++)
                solved[column] *= _inverseDiagonal[row];
        }
    }

    // Subtracts rows first to before end, times the factors that stand in the row.
    private void SubtractRows(ComplexMatrix right, int row, int first, int end)
    {
        Span<Complex> target = right.Row(row);
        ReadOnlySpan<Complex> factors = _factors.Row(row);
        int k = first;
        for (; k + 4 <= end; k += 4)
        {
            ComplexMatrix.SubtractScaled(
                target, factors[k], right.Row(k), factors[k + 1], right.Row(k + 1),
                factors[k + 2], right.Row(k + 2), factors[k + 3], right.Row(k + 3));
        }
        for (; k < end; k++)
            ComplexMatrix.SubtractScaled(target, factors[k], right.Row(k));
    }

    /// <summary>Replaces one right side by its solution.</summary>
    public void Solve(Span<Complex> right)
    {
        int size = _pivots.Length;
        for (int k = 0; k < size; k++)
            (right[k], right[_pivots[k]]) = (right[_pivots[k]], right[k]);
        for (int row = 1; row < size; row++)
            right[row] -= Dot(_factors.Row(row)[..row], right);
        for (int row = size - 1; row >= 0; row--)
            right[row] = (right[row] - Dot(_factors.Row(row)[(row + 1)..], right[(row + 1)..])) * _inverseDiagonal[row];
    }

    private static Complex Dot(ReadOnlySpan<Complex> factors, ReadOnlySpan<Complex> values)
    {
        Complex sum = Complex.Zero;
        for (int i = 0; i < factors.Length; i++)
            sum += factors[i] * values[i];
        return sum;
    }

    private int LargestBelow(int k)
    {
        int best = k;
        double most = -1;
        for (int row = k; row < _pivots.Length; row++)
        {
            Complex element = _factors[row, k];
            double size = Math.Abs(element.Real) + Math.Abs(element.Imaginary);
            if (size > most)
                (best, most) = (row, size);
        }
        return best;
    }

    private static void Swap(ComplexMatrix matrix, int first, int second)
    {
        if (first == second)
            return;
        Span<Complex> one = matrix.Row(first), other = matrix.Row(second);
        for (int i = 0; i < one.Length; i++)
            (one[i], other[i]) = (other[i], one[i]);
    }
}
