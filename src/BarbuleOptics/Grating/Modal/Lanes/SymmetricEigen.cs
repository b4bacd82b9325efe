using System.Runtime.CompilerServices;

namespace BarbuleOptics.Grating.Modal.Lanes;

/// <summary>Eigenvalues and orthonormal eigenvectors of small real symmetric matrices, by Jacobi's rotations.</summary>
/// <remarks>Golub and Van Loan, Matrix Computations, section 8.5 (from memory). Small eigenvalues keep their digits better than by other methods; what it
/// costs is spent once a slab.</remarks>
internal static class SymmetricEigen
{
    private const int MostSweeps = 40;

    /// <summary>Solves.</summary>
    /// <param name="matrix">The matrix; overwritten.</param>
    /// <returns>Eigenvalues in rising order, and the vector of each as a column.</returns>
    public static (double[] Values, double[,] Vectors) Solve(double[,] matrix)
    {
        int n = matrix.GetLength(0);
        var vectors = new double[n, n];
        double size = 0;
        for (int i = 0; i < n; i++)
        {
            vectors[i, i] = 1;
            for (int j = 0; j < n; j++)
                size += matrix[i, j] * matrix[i, j];
        }
        for (int sweep = 0; sweep < MostSweeps && Outside(matrix) > 1e-34 * size; sweep++)
        {
            for (int p = 0; p < n; p++)
            {
                for (int q = p + 1; q < n; q++)
                    Rotate(matrix, vectors, p, q);
            }
        }
        int[] order = [.. Enumerable.Range(0, n).OrderBy(i => matrix[i, i])];
        var sorted = new double[n, n];
        for (int column = 0; column < n; column++)
        {
            for (int row = 0; row < n; row++)
                sorted[row, column] = vectors[row, order[column]];
        }
        return ([.. order.Select(i => matrix[i, i])], sorted);
    }

    private static double Outside(double[,] matrix)
    {
        double sum = 0;
        for (int i = 0; i < matrix.GetLength(0); i++)
        {
            for (int j = 0; j < i; j++)
                sum += matrix[i, j] * matrix[i, j];
        }
        return sum;
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void Rotate(double[,] matrix, double[,] vectors, int p, int q)
    {
        double off = matrix[p, q];
        if (off == 0)
            return;
        double theta = (matrix[q, q] - matrix[p, p]) / (2 * off);
        double t = (theta >= 0 ? 1 : -1) / (Math.Abs(theta) + Math.Sqrt(theta * theta + 1)), cos = 1 / Math.Sqrt(t * t + 1), sin = t * cos;
        for (int k = 0; k < matrix.GetLength(0); k++)
            (matrix[k, p], matrix[k, q]) = (cos * matrix[k, p] - sin * matrix[k, q], sin * matrix[k, p] + cos * matrix[k, q]);
        for (int k = 0; k < matrix.GetLength(0); k++)
            (matrix[p, k], matrix[q, k]) = (cos * matrix[p, k] - sin * matrix[q, k], sin * matrix[p, k] + cos * matrix[q, k]);
        matrix[p, q] = matrix[q, p] = 0;
        for (int k = 0; k < matrix.GetLength(0); k++)
            (vectors[k, p], vectors[k, q]) = (cos * vectors[k, p] - sin * vectors[k, q], sin * vectors[k, p] + cos * vectors[k, q]);
    }
}
