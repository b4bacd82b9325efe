using System.Numerics;

namespace BarbuleOptics.Grating;

/// <summary>Solves square complex systems by elimination with partial pivoting; factors once, solves many right sides.</summary>
internal sealed class LinearSolver
{
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
        for (int k = 0; k < size; k++)
        {
            _pivots[k] = LargestBelow(k);
            Swap(_factors, k, _pivots[k]);
            Complex pivot = _factors[k, k];
            if (pivot == Complex.Zero || !Complex.IsFinite(pivot))
                return false;
            _inverseDiagonal[k] = Complex.One / pivot;
            ReadOnlySpan<Complex> tail = _factors.Row(k)[(k + 1)..];
            for (int row = k + 1; row < size; row++)
            {
                Complex factor = _factors[row, k] * _inverseDiagonal[k];
                _factors[row, k] = factor;
                if (factor != Complex.Zero)
                    ComplexMatrix.SubtractScaled(_factors.Row(row)[(k + 1)..], factor, tail);
            }
        }
        return true;
    }

    /// <summary>Replaces the columns of <paramref name="right"/> by the solutions.</summary>
    public void Solve(ComplexMatrix right)
    {
        int size = _pivots.Length;
        for (int k = 0; k < size; k++)
            Swap(right, k, _pivots[k]);
        for (int k = 0; k < size; k++)
        {
            for (int row = k + 1; row < size; row++)
                ComplexMatrix.SubtractScaled(right.Row(row), _factors[row, k], right.Row(k));
        }
        for (int k = size - 1; k >= 0; k--)
        {
            Span<Complex> solved = right.Row(k);
            for (int column = 0; column < solved.Length; column++)
                solved[column] *= _inverseDiagonal[k];
            for (int row = 0; row < k; row++)
                ComplexMatrix.SubtractScaled(right.Row(row), _factors[row, k], solved);
        }
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
