using System.Numerics;

namespace BarbuleOptics.Grating.Modal;

/// <summary>The weak form of a sector at one depth: v'. Zz u' + v'. Zx u + v. Xz u' + v. Xx u.</summary>
/// <remarks>From <see cref="CutOperators"/> with dE/dx = i Kx E, test functions exp(-i kx x), Kx the diagonal of wave vectors.</remarks>
internal sealed class DepthPoint
{
    private readonly ModalSector _sector;
    private readonly ComplexMatrix _electric;
    private ComplexMatrix? _full;
    private ComplexMatrix? _half;

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

    /// <summary>Fills the four matrices over crowded harmonics.</summary>
    /// <param name="waves">The light.</param>
    /// <param name="slope">[f].</param>
    /// <param name="kx">-i f d/dx.</param>
    /// <param name="operators">The operators.</param>
    public void Set(ModalWaves waves, ComplexMatrix slope, ComplexMatrix kx, CrowdedOperators operators)
    {
        double alpha = waves.Alpha, k2 = waves.K0 * waves.K0, sign = _sector.MagneticSign;
        FieldBasis e = _sector.Electric, h = _sector.Magnetic;
        int first = e.Count;
        Complex i = Complex.ImaginaryOne;
        IsPlain = false;
        Xx.Clear();
        Zz.Clear();
        Zx.Clear();
        Xz.Clear();
        _full ??= new ComplexMatrix(kx.Rows, kx.Rows);
        _half ??= new ComplexMatrix(kx.Rows, kx.Rows);
        if (e.Count > 0)
        {
            AddFull(e, e, Multiplied(kx, operators.A, kx), 1, Xx, 0, 0);
            AddFull(e, e, operators.Permittivity, -k2, Xx, 0, 0);
            AddFull(e, e, slope, 1, Zz, 0, 0);
            if (alpha != 0)
                AddFull(e, e, operators.SlopeQSlope, alpha * alpha, Zz, 0, 0);
        }
        if (h.Count == 0)
            return;
        AddFull(h, h, Multiplied(kx, operators.Q, kx), sign, Xx, first, first);
        AddFull(h, h, slope, -sign * k2, Xx, first, first);
        AddFull(h, h, operators.XWhole, sign, Zz, first, first);
        if (e.Count == 0 || alpha == 0)
            return;
        AddFull(e, h, Multiplied(operators.SlopeQ, kx), i * alpha, Zx, 0, first);
        AddFull(e, h, Multiplied(kx, operators.AX), i * alpha, Xz, 0, first);
        AddFull(h, e, Multiplied(operators.XA, kx), -i * alpha * sign, Zx, first, 0);
        AddFull(h, e, Multiplied(kx, operators.QSlope), -i * alpha * sign, Xz, first, 0);
    }

    private ComplexMatrix Multiplied(ComplexMatrix left, ComplexMatrix right)
    {
        _full!.SetProduct(left, right);
        return _full;
    }

    private ComplexMatrix Multiplied(ComplexMatrix left, ComplexMatrix middle, ComplexMatrix right)
    {
        _half!.SetProduct(left, middle);
        return Multiplied(_half, right);
    }

    private static void AddFull(in FieldBasis rows, in FieldBasis columns, ComplexMatrix full, Complex factor, ComplexMatrix target, int firstRow, int firstColumn)
        => FieldBasis.AddBetween(rows, columns, full, factor, [], [], target, firstRow, firstColumn);

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
