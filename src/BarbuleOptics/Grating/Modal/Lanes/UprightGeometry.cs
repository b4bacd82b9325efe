using System.Numerics;
using static BarbuleOptics.Grating.Modal.Lanes.RealMatrices;

namespace BarbuleOptics.Grating.Modal.Lanes;

/// <summary>All that kernels need to know of the bodies of a slab with upright walls and a mirror axis, for harmonics up to N.</summary>
/// <remarks>
/// With [f] the crowded harmonics' measure and D = diag(2 pi m/P), the functions are solutions of D v = w [f] v with v^T [f] v = 1: in them
/// [f] is the unit matrix and -i d/dx at kx0 is the diagonal w + kx0, as if they were plane waves of wave numbers w. Function -m is function m seen in the mirror.
/// Without walls to crowd at they are the harmonics themselves.
/// </remarks>
internal sealed class UprightGeometry
{
    private readonly SlabShape _shape;
    private readonly int _harmonics;
    private readonly double _step;
    private readonly double[,] _functions;
    private readonly double[] _waves;
    private readonly double[,] _orders;
    private readonly int _most;
    private readonly (int Material, double[,] Matrix)[][] _shares;
    private readonly double[][,] _sums;
    private readonly UprightSector?[] _sectors = new UprightSector?[3];

    /// <summary>Makes it.</summary>
    /// <param name="shape">The slab.</param>
    /// <param name="wallsNm">From <see cref="WallCrowding.WallsOf"/>; null for plain harmonics.</param>
    /// <param name="harmonics">N.</param>
    public UprightGeometry(SlabShape shape, double[]? wallsNm, int harmonics)
    {
        (_shape, _harmonics, _step) = (shape, harmonics, 2 * Math.PI / shape.PeriodNm);
        int count = 2 * harmonics + 1;
        _functions = new double[count, count];
        _waves = new double[count];
        if (wallsNm is null)
        {
            for (int m = 0; m < count; m++)
                (_functions[m, m], _waves[m]) = (1, (m - harmonics) * _step);
            (_orders, _most) = (_functions, harmonics);
            _sums = [new double[count, count], new double[count, count], new double[count, count]];
            _shares = [.. shape.HalfIntervals.Select(PlainShares)];
            return;
        }
        WallCrowding crowding = WallCrowding.Of(wallsNm, shape, harmonics);
        var store = new CrowdedStore(shape, crowding, harmonics);
        FindFunctions(Real(store.Slope));
        CrowdedPlanes planes = store.Planes;
        _most = planes.MostOrder;
        _orders = Times(Real(planes.AllOrders), _functions);
        _sums = [.. new[] { planes.Size, planes.Sign, planes.Inverse }.Select(sum => Between(Real(sum)))];
        _shares = [.. shape.HalfIntervals.Select(interval => CrowdedShares(crowding, store.MaterialsOf(interval)))];
    }

    /// <summary>Whether what the far orders carry stands in the sums of a sector, in closed form.</summary>
    public bool HasSums => _most > _harmonics;

    /// <summary>All functions (0), at any angle of incidence, or the even (1) and odd ones (-1), which light at normal incidence does not mix.</summary>
    public UprightSector Of(int parity) => _sectors[parity + 1] ??= parity switch
    {
        0 => Sector(FieldBasis.All(_harmonics), FieldBasis.All(_most)),
        1 => Sector(FieldBasis.Even(_harmonics), FieldBasis.Even(_most)),
        _ => Sector(FieldBasis.Odd(_harmonics), FieldBasis.Odd(_most)),
    };

    private UprightSector Sector(in FieldBasis functions, in FieldBasis orders)
    {
        double[,] right = Combinations(functions, _harmonics), left = Combinations(orders, _most);
        FieldBasis copy = functions, copyOfOrders = orders;
        return new UprightSector(
            functions.Count,
            [.. Enumerable.Range(0, functions.Count).Select(i => _waves[copy.HarmonicOf(i) + _harmonics])],
            [.. _shares.Select(interval => interval.Select(share => (share.Material, Flat(Times(Transposed(right), Times(share.Matrix, right))))).ToArray())],
            [.. Enumerable.Range(0, orders.Count).Select(i => copyOfOrders.HarmonicOf(i))],
            Flat(Times(Transposed(left), Times(_orders, right))),
            Flat(Times(Transposed(right), Times(_sums[0], right))),
            Flat(Times(Transposed(right), Times(_sums[1], right))),
            Flat(Times(Transposed(right), Times(_sums[2], right))));
    }

    // Even and odd functions are combined like harmonics.
    private static double[,] Combinations(in FieldBasis basis, int harmonics)
    {
        var result = new double[2 * harmonics + 1, basis.Count];
        for (int i = 0; i < basis.Count; i++)
        {
            int harmonic = basis.HarmonicOf(i);
            result[harmonics + harmonic, i] = basis.ShareOf(harmonic);
            if (basis.HasPairs && harmonic != 0)
                result[harmonics - harmonic, i] = basis.ShareOf(-harmonic);
        }
        return result;
    }

    private void FindFunctions(double[,] slope)
    {
        int count = 2 * _harmonics + 1;
        double[,] lower = Cholesky(slope), matrix = new double[count, count];
        // L^-1 D L^-T, column by column.
        for (int column = 0; column < count; column++)
        {
            for (int row = 0; row < count; row++)
                matrix[row, column] = row == column ? (row - _harmonics) * _step : 0;
        }
        SolveLower(lower, matrix);
        matrix = Transposed(matrix);
        SolveLower(lower, matrix);
        (double[] waves, double[,] vectors) = SymmetricEigen.Solve(matrix);
        SolveUpper(lower, vectors);
        for (int n = 0; n <= _harmonics; n++)
        {
            int column = _harmonics + n, mirror = _harmonics - n;
            _waves[column] = n == 0 ? 0 : waves[column];
            _waves[mirror] = -_waves[column];
            // The function of wave number 0 is the harmonic 0, whose mirror image it is itself.
            for (int m = 0; m < count; m++)
                _functions[m, column] = n > 0 ? vectors[m, column] : m == _harmonics ? 1 / Math.Sqrt(slope[m, m]) : 0;
            for (int m = 0; n > 0 && m < count; m++)
                _functions[count - 1 - m, mirror] = vectors[m, column];
        }
    }

    private double[,] Between(double[,] matrix) => Times(Transposed(_functions), Times(matrix, _functions));

    private (int, double[,])[] CrowdedShares(WallCrowding crowding, int[] materials)
    {
        var shares = new List<(int, double[,])>();
        var coefficients = new Complex[4 * _harmonics + 1];
        foreach (int material in materials.Distinct())
        {
            Array.Clear(coefficients);
            for (int stretch = 0; stretch < materials.Length; stretch++)
            {
                if (materials[stretch] == material)
                    crowding.AddSlope(stretch, Complex.One, coefficients);
            }
            shares.Add((material, Between(Toeplitz(coefficients))));
        }
        return [.. shares];
    }

    private (int, double[,])[] PlainShares(SlabInterval interval)
    {
        var shares = new List<(int, double[,])>();
        var cut = new SlabCut(_shape);
        cut.Set(interval, (interval.TopNm + interval.BottomNm) / 2);
        var coefficients = new Complex[4 * _harmonics + 1];
        int most = _shape.Bodies.Select(placed => Math.Max(placed.Body.Material, placed.Body.CoreMaterial)).DefaultIfEmpty(0).Max();
        for (int material = 0; material <= most; material++)
        {
            if (!cut.Meets(material))
                continue;
            cut.TransformInside(material, coefficients);
            shares.Add((material, Toeplitz(coefficients)));
        }
        return [.. shares];
    }

    private double[,] Toeplitz(Complex[] coefficients)
    {
        int count = 2 * _harmonics + 1;
        var result = new double[count, count];
        for (int row = 0; row < count; row++)
        {
            for (int column = 0; column < count; column++)
                result[row, column] = coefficients[2 * _harmonics + row - column].Real;
        }
        return result;
    }

    // What bodies with a mirror axis make is real.
    private static double[,] Real(ComplexMatrix matrix)
    {
        var result = new double[matrix.Rows, matrix.Columns];
        for (int row = 0; row < matrix.Rows; row++)
        {
            for (int column = 0; column < matrix.Columns; column++)
                result[row, column] = matrix[row, column].Real;
        }
        return result;
    }
}
