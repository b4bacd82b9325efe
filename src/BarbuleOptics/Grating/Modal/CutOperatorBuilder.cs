using System.Numerics;

namespace BarbuleOptics.Grating.Modal;

/// <summary>Computes the operators of a depth from its cut.</summary>
internal sealed class CutOperatorBuilder
{
    private readonly Complex[] _coefficients;
    private readonly Complex[] _inverses;
    private readonly OperatorBlock _all;
    private readonly OperatorBlock? _odd;
    private readonly ComplexMatrix _mixed;
    private readonly ComplexMatrix _normalMixed;

    /// <summary>Scratch for 2 N + 1 harmonics.</summary>
    /// <param name="harmonics">Largest harmonic, N.</param>
    /// <param name="hasAxis">Whether cuts are their own mirror image about x = 0: even and odd combinations are then computed apart.</param>
    public CutOperatorBuilder(int harmonics, bool hasAxis)
    {
        _coefficients = new Complex[4 * harmonics + 1];
        _inverses = new Complex[16];
        FieldBasis rows = hasAxis ? FieldBasis.Even(harmonics) : FieldBasis.All(harmonics), columns = hasAxis ? FieldBasis.Odd(harmonics) : rows;
        _all = new OperatorBlock(rows);
        _odd = hasAxis ? new OperatorBlock(columns) : null;
        _mixed = new ComplexMatrix(rows.Count, columns.Count);
        _normalMixed = new ComplexMatrix(rows.Count, columns.Count);
    }

    /// <summary>Fills <paramref name="operators"/>.</summary>
    /// <param name="cut">Where the materials lie, and the normals.</param>
    /// <param name="permittivities">By the number of the material.</param>
    /// <param name="alpha">ky / k0.</param>
    /// <param name="isElectric">Whether the electric field is followed alone, which needs the permittivity only.</param>
    /// <param name="operators">Receives the operators.</param>
    /// <returns>False where an inverse does not exist.</returns>
    public bool TryBuild(CutTransform cut, ReadOnlySpan<Complex> permittivities, double alpha, bool isElectric, CutOperators operators)
    {
        cut.Transform(permittivities, operators.Permittivity);
        if (isElectric)
            return true;
        Span<Complex> inverses = permittivities.Length <= _inverses.Length ? _inverses.AsSpan(0, permittivities.Length) : new Complex[permittivities.Length];
        for (int m = 0; m < inverses.Length; m++)
            inverses[m] = Complex.One / permittivities[m];
        cut.Transform(inverses, _coefficients);
        if (!_all.TrySet(operators.Permittivity, _coefficients, cut.NormalXX, alpha)
            || (_odd is not null && !_odd.TrySet(operators.Permittivity, _coefficients, cut.NormalXX, alpha)))
            return false;

        // Half of D n_x n_z + n_x n_z D; n_x n_z is odd and leads from odd combinations to even ones.
        OperatorBlock odd = _odd ?? _all;
        FieldBasis.FillBetween(_all.Basis, odd.Basis, cut.NormalXZ, _normalMixed);
        _mixed.SetProduct(_all.Difference, _normalMixed);
        _mixed.AddProduct(_normalMixed, odd.Difference);
        if (_odd is not null)
        {
            FieldBasis.JoinEven(_all.Along, _odd.Along, operators.Xx);
            FieldBasis.JoinEven(_all.Normal, _odd.Normal, operators.Zz);
            FieldBasis.JoinOdd(_mixed, 0.5, operators.Xz);
            return true;
        }
        operators.Xx.CopyFrom(_all.Along);
        operators.Zz.CopyFrom(_all.Normal);
        for (int i = 0; i < _mixed.Elements.Length; i++)
            operators.Xz.Elements[i] = 0.5 * _mixed.Elements[i];
        return true;
    }
}
