using System.Numerics;

namespace BarbuleOptics.Grating.Modal;

/// <summary>The operators eta_xx and eta_zz between combinations of one kind.</summary>
internal sealed class OperatorBlock
{
    private readonly ComplexMatrix _factor;
    private readonly ComplexMatrix _product;
    private readonly LinearSolver _solver;

    /// <summary>Scratch for some combinations.</summary>
    public OperatorBlock(in FieldBasis basis)
    {
        Basis = basis;
        int count = basis.Count;
        Along = new ComplexMatrix(count, count);
        Normal = new ComplexMatrix(count, count);
        Difference = new ComplexMatrix(count, count);
        _factor = new ComplexMatrix(count, count);
        _product = new ComplexMatrix(count, count);
        _solver = new LinearSolver(count);
    }

    /// <summary>The combinations.</summary>
    public FieldBasis Basis { get; }

    /// <summary>eta_xx = Q + D n_x^2.</summary>
    public ComplexMatrix Along { get; }

    /// <summary>eta_zz = W - D n_x^2.</summary>
    public ComplexMatrix Normal { get; }

    /// <summary>D = W - Q.</summary>
    public ComplexMatrix Difference { get; }

    /// <summary>Computes them from Fourier coefficients of e, 1/e and n_x^2.</summary>
    /// <returns>False where an inverse does not exist.</returns>
    public bool TrySet(Complex[] permittivity, Complex[] inverse, Complex[] normalXX, double alpha)
    {
        // Q = ([e] - alpha^2)^-1.
        FieldBasis.FillBetween(Basis, Basis, permittivity, _factor);
        if (!TryInvertShifted(_factor, alpha, Along))
            return false;
        // W = ([1/e]^-1 - alpha^2)^-1.
        FieldBasis.FillBetween(Basis, Basis, inverse, Normal);
        if (alpha != 0)
        {
            if (!TryInvertShifted(Normal, 0, _factor) || !TryInvertShifted(_factor, alpha, Normal))
                return false;
        }
        Difference.CopyFrom(Normal);
        Difference.Subtract(Along);
        FieldBasis.FillBetween(Basis, Basis, normalXX, _factor);
        _product.SetProduct(Difference, _factor);
        if (Basis.HasPairs)
            AddTransposed(_product);
        else
            _product.AddProduct(_factor, Difference);
        foreach (ref Complex element in _product.Elements)
            element *= 0.5;
        Along.Add(_product);
        Normal.Subtract(_product);
        return true;
    }

    // Of two symmetric matrices the product the other way round is the transpose.
    private static void AddTransposed(ComplexMatrix matrix)
    {
        for (int row = 0; row < matrix.Rows; row++)
        {
            for (int column = 0; column <= row; column++)
                matrix[row, column] = matrix[column, row] = matrix[row, column] + matrix[column, row];
        }
    }

    private bool TryInvertShifted(ComplexMatrix matrix, double alpha, ComplexMatrix inverse)
    {
        for (int i = 0; i < matrix.Rows; i++)
            matrix[i, i] -= alpha * alpha;
        if (!_solver.TryFactor(matrix))
            return false;
        inverse.SetIdentity();
        _solver.Solve(inverse);
        return true;
    }
}
