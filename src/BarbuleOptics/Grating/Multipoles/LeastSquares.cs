using System.Numerics;

namespace BarbuleOptics.Grating.Multipoles;

/// <summary>Solves overdetermined complex systems in the sense of least squares by Householder's reflections.</summary>
/// <remarks>Source: Golub and Van Loan, Matrix Computations, section 5.2 (from memory). Backward stable, so that the badly conditioned
/// systems of fundamental solutions still give a small misfit.</remarks>
internal static class LeastSquares
{
    /// <summary>Reflects <paramref name="matrix"/> to upper triangular form and <paramref name="right"/> with it, then solves: the first rows of
    /// <paramref name="right"/> receive the solutions, what remains in the others is the misfit.</summary>
    /// <returns>False where a column depends on those before it.</returns>
    public static bool TrySolve(ComplexMatrix matrix, ComplexMatrix right)
    {
        int rows = matrix.Rows, columns = matrix.Columns;
        var reflector = new Complex[rows];
        var products = new Complex[Math.Max(columns, right.Columns)];
        for (int k = 0; k < columns; k++)
        {
            double square = 0;
            for (int i = k; i < rows; i++)
                square += Square(matrix[i, k]);
            double norm = Math.Sqrt(square);
            if (norm == 0 || !double.IsFinite(norm))
                return false;
            Complex head = matrix[k, k];
            Complex sign = head == Complex.Zero ? Complex.One : head / head.Magnitude;
            for (int i = k; i < rows; i++)
                reflector[i] = matrix[i, k];
            reflector[k] += sign * norm;
            double factor = 1 / (norm * (norm + head.Magnitude));
            Reflect(matrix, reflector, k, k + 1, factor, products);
            Reflect(right, reflector, k, 0, factor, products);
            matrix[k, k] = -sign * norm;
        }
        for (int k = columns - 1; k >= 0; k--)
        {
            Span<Complex> row = right.Row(k);
            for (int j = k + 1; j < columns; j++)
                ComplexMatrix.SubtractScaled(row, matrix[k, j], right.Row(j));
            Complex inverse = 1 / matrix[k, k];
            for (int c = 0; c < row.Length; c++)
                row[c] *= inverse;
        }
        return true;
    }

    private static void Reflect(ComplexMatrix matrix, Complex[] reflector, int first, int column, double factor, Complex[] products)
    {
        Span<Complex> sums = products.AsSpan(0, matrix.Columns - column);
        sums.Clear();
        for (int i = first; i < matrix.Rows; i++)
            ComplexMatrix.SubtractScaled(sums, -Complex.Conjugate(reflector[i]), matrix.Row(i)[column..]);
        for (int i = first; i < matrix.Rows; i++)
            ComplexMatrix.SubtractScaled(matrix.Row(i)[column..], factor * reflector[i], sums);
    }

    private static double Square(Complex z) => z.Real * z.Real + z.Imaginary * z.Imaginary;
}
