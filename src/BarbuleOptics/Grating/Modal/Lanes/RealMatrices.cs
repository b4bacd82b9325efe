using System.Runtime.CompilerServices;

namespace BarbuleOptics.Grating.Modal.Lanes;

/// <summary>Small real matrices, for what is computed once a slab.</summary>
internal static class RealMatrices
{
    /// <summary>Product.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static double[,] Times(double[,] left, double[,] right)
    {
        var result = new double[left.GetLength(0), right.GetLength(1)];
        for (int row = 0; row < result.GetLength(0); row++)
        {
            for (int k = 0; k < left.GetLength(1); k++)
            {
                double factor = left[row, k];
                for (int column = 0; factor != 0 && column < result.GetLength(1); column++)
                    result[row, column] += factor * right[k, column];
            }
        }
        return result;
    }

    /// <summary>Transpose.</summary>
    public static double[,] Transposed(double[,] matrix)
    {
        var result = new double[matrix.GetLength(1), matrix.GetLength(0)];
        for (int row = 0; row < result.GetLength(0); row++)
        {
            for (int column = 0; column < result.GetLength(1); column++)
                result[row, column] = matrix[column, row];
        }
        return result;
    }

    /// <summary>All elements, row after row.</summary>
    public static double[] Flat(double[,] matrix) => [.. matrix.Cast<double>()];

    /// <summary>The lower triangle L of a positive definite matrix L L^T.</summary>
    public static double[,] Cholesky(double[,] matrix)
    {
        int n = matrix.GetLength(0);
        var lower = new double[n, n];
        for (int row = 0; row < n; row++)
        {
            for (int column = 0; column <= row; column++)
            {
                double sum = matrix[row, column];
                for (int k = 0; k < column; k++)
                    sum -= lower[row, k] * lower[column, k];
                lower[row, column] = row == column ? Math.Sqrt(sum) : sum / lower[column, column];
            }
        }
        return lower;
    }

    /// <summary>Replaces the columns of <paramref name="right"/> by L^-1 times them.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void SolveLower(double[,] lower, double[,] right)
    {
        for (int row = 0; row < right.GetLength(0); row++)
        {
            for (int column = 0; column < right.GetLength(1); column++)
            {
                for (int k = 0; k < row; k++)
                    right[row, column] -= lower[row, k] * right[k, column];
                right[row, column] /= lower[row, row];
            }
        }
    }

    /// <summary>Replaces the columns of <paramref name="right"/> by L^-T times them.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void SolveUpper(double[,] lower, double[,] right)
    {
        for (int row = right.GetLength(0) - 1; row >= 0; row--)
        {
            for (int column = 0; column < right.GetLength(1); column++)
            {
                for (int k = row + 1; k < right.GetLength(0); k++)
                    right[row, column] -= lower[k, row] * right[k, column];
                right[row, column] /= lower[row, row];
            }
        }
    }
}
