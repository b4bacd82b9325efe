using System.Numerics;

namespace BarbuleOptics.Grating.Modal;

/// <summary>The weak form of a sector at one depth: v'. Zz u' + v'. Zx u + v. Xz u' + v. Xx u.</summary>
/// <remarks>From <see cref="CutOperators"/> with dE/dx = i Kx E, test functions exp(-i kx x), Kx the diagonal of wave vectors.</remarks>
internal sealed class DepthPoint
{
    private readonly ModalSector _sector;
    private readonly ComplexMatrix _electric;

    /// <summary>Memory for a sector.</summary>
    public DepthPoint(in ModalSector sector)
    {
        _sector = sector;
        _electric = new ComplexMatrix(sector.Electric.Count, sector.Electric.Count);
        Zz = new ComplexMatrix(sector.Size, sector.Size);
        Zx = new ComplexMatrix(sector.Size, sector.Size);
        Xz = new ComplexMatrix(sector.Size, sector.Size);
        Xx = new ComplexMatrix(sector.Size, sector.Size);
    }

    /// <summary>Between the slopes of test function and field.</summary>
    public ComplexMatrix Zz { get; }

    /// <summary>Between the slope of the test function and the field.</summary>
    public ComplexMatrix Zx { get; }

    /// <summary>Between the test function and the slope of the field.</summary>
    public ComplexMatrix Xz { get; }

    /// <summary>Between test function and field.</summary>
    public ComplexMatrix Xx { get; }

    /// <summary>Whether Zz is the unit matrix and Zx and Xz are zero.</summary>
    public bool IsPlain { get; private set; }

    /// <summary>Fills the four matrices.</summary>
    public void Set(ModalWaves waves, CutOperators operators)
    {
        double alpha = waves.Alpha, sign = _sector.MagneticSign;
        FieldBasis e = _sector.Electric, h = _sector.Magnetic;
        Complex i = Complex.ImaginaryOne;
        IsPlain = h.Count == 0;
        Xx.Clear();
        if (!IsPlain)
        {
            Zz.Clear();
            Zx.Clear();
            Xz.Clear();
        }
        if (e.Count > 0)
        {
            AddElectric(waves, operators);
            if (alpha != 0)
            {
                double square = alpha * alpha;
                Add(waves.Kx, e, e, 0, 0, (square, operators.Zz), (i * square, operators.Xz), (-i * square, operators.Xz), (square, operators.Xx));
            }
        }
        if (h.Count > 0)
        {
            int first = e.Count;
            Add(waves.Kx, h, h, first, first, (sign, operators.Xx), (-i * sign, operators.Xz), (i * sign, operators.Xz), (sign, operators.Zz));
            for (int n = 0; n < h.Count; n++)
                Xx[first + n, first + n] -= sign * waves.K0 * waves.K0;
            if (e.Count > 0 && alpha != 0)
            {
                double turned = alpha * sign;
                Add(waves.Kx, e, h, 0, first, (-alpha, operators.Xz), (i * alpha, operators.Zz), (i * alpha, operators.Xx), (alpha, operators.Xz));
                Add(waves.Kx, h, e, first, 0, (-turned, operators.Xz), (-i * turned, operators.Xx), (-i * turned, operators.Zz), (turned, operators.Xz));
            }
        }
    }

    // dE/dx and dE/dz by themselves, and -k0^2 e.
    private void AddElectric(ModalWaves waves, CutOperators operators)
    {
        FieldBasis e = _sector.Electric;
        FieldBasis.FillBetween(e, e, operators.Permittivity, _electric);
        for (int row = 0; row < e.Count; row++)
        {
            ComplexMatrix.AddScaled(Xx.Row(row)[..e.Count], -waves.K0 * waves.K0, _electric.Row(row));
            double kx = waves.Kx[e.HarmonicOf(row) + waves.Harmonics];
            Xx[row, row] += kx * kx;
            if (!IsPlain)
                Zz[row, row] += 1;
        }
    }

    private void Add(
        double[] kx, in FieldBasis rows, in FieldBasis columns, int firstRow, int firstColumn, (Complex Factor, ComplexMatrix Operator) zz,
        (Complex Factor, ComplexMatrix Operator) zx, (Complex Factor, ComplexMatrix Operator) xz, (Complex Factor, ComplexMatrix Operator) xx)
    {
        FieldBasis.AddBetween(rows, columns, zz.Operator, zz.Factor, [], [], Zz, firstRow, firstColumn);
        FieldBasis.AddBetween(rows, columns, zx.Operator, zx.Factor, [], kx, Zx, firstRow, firstColumn);
        FieldBasis.AddBetween(rows, columns, xz.Operator, xz.Factor, kx, [], Xz, firstRow, firstColumn);
        FieldBasis.AddBetween(rows, columns, xx.Operator, xx.Factor, kx, kx, Xx, firstRow, firstColumn);
    }
}
