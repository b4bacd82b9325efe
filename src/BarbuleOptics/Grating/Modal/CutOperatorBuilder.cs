using System.Numerics;

namespace BarbuleOptics.Grating.Modal;

/// <summary>Computes the operators of a depth from its cut.</summary>
internal sealed class CutOperatorBuilder
{
    private readonly int _count;
    private readonly Complex[] _coefficients;
    private readonly Complex[] _normalXX;
    private readonly Complex[] _normalXZ;
    private readonly Complex[] _inverses;
    private readonly ComplexMatrix _along;
    private readonly ComplexMatrix _normal;
    private readonly ComplexMatrix _factor;
    private readonly ComplexMatrix _difference;
    private readonly LinearSolver _solver;

    /// <summary>Scratch for 2 N + 1 harmonics.</summary>
    public CutOperatorBuilder(int harmonics)
    {
        _count = 2 * harmonics + 1;
        _coefficients = new Complex[2 * _count - 1];
        _normalXX = new Complex[2 * _count - 1];
        _normalXZ = new Complex[2 * _count - 1];
        _inverses = new Complex[16];
        _along = new ComplexMatrix(_count, _count);
        _normal = new ComplexMatrix(_count, _count);
        _factor = new ComplexMatrix(_count, _count);
        _difference = new ComplexMatrix(_count, _count);
        _solver = new LinearSolver(_count);
    }

    /// <summary>Fills <paramref name="operators"/>.</summary>
    /// <param name="cut">The walls and materials.</param>
    /// <param name="permittivities">By the number of the material.</param>
    /// <param name="alpha">ky / k0.</param>
    /// <param name="isElectric">Whether the electric field is followed alone, which needs the permittivity only.</param>
    /// <param name="operators">Receives the operators.</param>
    /// <returns>False where an inverse does not exist.</returns>
    public bool TryBuild(SlabCut cut, ReadOnlySpan<Complex> permittivities, double alpha, bool isElectric, CutOperators operators)
    {
        cut.Transform(permittivities, operators.Permittivity);
        if (isElectric)
            return true;
        // Q, along walls.
        FillToeplitz(operators.Permittivity, _factor);
        ShiftDiagonal(_factor, -alpha * alpha);
        if (!TryInvert(_factor, _along))
            return false;
        // W, along the normal.
        Span<Complex> inverses = permittivities.Length <= _inverses.Length ? _inverses.AsSpan(0, permittivities.Length) : new Complex[permittivities.Length];
        for (int m = 0; m < inverses.Length; m++)
            inverses[m] = Complex.One / permittivities[m];
        cut.Transform(inverses, _coefficients);
        FillToeplitz(_coefficients, _normal);
        if (alpha != 0 && !(TryInvert(_normal, _factor) && TryInvertShifted(alpha)))
            return false;

        cut.TransformNormals(_normalXX, _normalXZ);
        _difference.CopyFrom(_normal);
        _difference.Subtract(_along);
        FillToeplitz(_normalXX, _factor);
        SetSymmetricProduct(operators.Xz);
        operators.Xx.CopyFrom(_along);
        operators.Xx.Add(operators.Xz);
        operators.Zz.CopyFrom(_normal);
        operators.Zz.Subtract(operators.Xz);
        FillToeplitz(_normalXZ, _factor);
        SetSymmetricProduct(operators.Xz);
        return true;
    }

    private bool TryInvertShifted(double alpha)
    {
        ShiftDiagonal(_factor, -alpha * alpha);
        return TryInvert(_factor, _normal);
    }

    private bool TryInvert(ComplexMatrix matrix, ComplexMatrix inverse)
    {
        if (!_solver.TryFactor(matrix))
            return false;
        inverse.SetIdentity();
        _solver.Solve(inverse);
        return true;
    }

    private void SetSymmetricProduct(ComplexMatrix product)
    {
        product.SetProduct(_difference, _factor);
        product.AddProduct(_factor, _difference);
        foreach (ref Complex element in product.Elements)
            element *= 0.5;
    }

    private void ShiftDiagonal(ComplexMatrix matrix, double shift)
    {
        for (int i = 0; i < _count; i++)
            matrix[i, i] += shift;
    }

    private void FillToeplitz(ReadOnlySpan<Complex> coefficients, ComplexMatrix matrix)
    {
        for (int row = 0; row < _count; row++)
        {
            Span<Complex> elements = matrix.Row(row);
            for (int column = 0; column < _count; column++)
                elements[column] = coefficients[row - column + _count - 1];
        }
    }
}
