using System.Numerics;

namespace BarbuleOptics.Grating.Modal;

/// <summary>The weak form of a sector at one depth: v'. Zz u' + v'. Zx u + v. Xz u' + v. Xx u.</summary>
/// <remarks>From <see cref="CutOperators"/> with dE/dx = i Kx E, test functions exp(-i kx x), Kx the diagonal of wave vectors.</remarks>
internal sealed class DepthPoint
{
    private readonly ModalSector _sector;
    private readonly ComplexMatrix _scaled;

    /// <summary>Memory for a sector of harmonics up to N.</summary>
    public DepthPoint(in ModalSector sector, int harmonics)
    {
        _sector = sector;
        _scaled = new ComplexMatrix(2 * harmonics + 1, 2 * harmonics + 1);
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

    /// <summary>Fills the four matrices.</summary>
    public void Set(ModalWaves waves, CutOperators operators)
    {
        Zz.Clear();
        Zx.Clear();
        Xz.Clear();
        Xx.Clear();
        double alpha = waves.Alpha, k2 = waves.K0 * waves.K0, sign = _sector.MagneticSign;
        FieldBasis e = _sector.Electric, h = _sector.Magnetic;
        Complex i = Complex.ImaginaryOne;
        if (e.Count > 0)
        {
            ScalePermittivity(operators.Permittivity, -k2, waves.Kx);
            FieldBasis.AddBetween(e, e, _scaled, 1, Xx, 0, 0);
            for (int n = 0; n < e.Count; n++)
                Zz[n, n] += 1;
            if (alpha != 0)
                AddBlocks(waves.Kx, e, e, 0, 0, (alpha * alpha, operators.Zz), (i * alpha * alpha, operators.Xz), (-i * alpha * alpha, operators.Xz), (alpha * alpha, operators.Xx));
        }
        if (h.Count > 0)
        {
            int first = e.Count;
            AddBlocks(waves.Kx, h, h, first, first, (sign, operators.Xx), (-i * sign, operators.Xz), (i * sign, operators.Xz), (sign, operators.Zz));
            for (int n = 0; n < h.Count; n++)
                Xx[first + n, first + n] -= sign * k2;
            if (e.Count > 0 && alpha != 0)
            {
                AddBlocks(waves.Kx, e, h, 0, first, (-alpha, operators.Xz), (i * alpha, operators.Zz), (i * alpha, operators.Xx), (alpha, operators.Xz));
                AddBlocks(waves.Kx, h, e, first, 0, (-alpha * sign, operators.Xz), (-i * alpha * sign, operators.Xx), (-i * alpha * sign, operators.Zz), (alpha * sign, operators.Xz));
            }
        }
    }

    private void AddBlocks(
        double[] kx, in FieldBasis rows, in FieldBasis columns, int firstRow, int firstColumn, (Complex Factor, ComplexMatrix Operator) zz,
        (Complex Factor, ComplexMatrix Operator) zx, (Complex Factor, ComplexMatrix Operator) xz, (Complex Factor, ComplexMatrix Operator) xx)
    {
        FieldBasis.AddBetween(rows, columns, zz.Operator, zz.Factor, Zz, firstRow, firstColumn);
        Scale(zx.Operator, kx, false, true);
        FieldBasis.AddBetween(rows, columns, _scaled, zx.Factor, Zx, firstRow, firstColumn);
        Scale(xz.Operator, kx, true, false);
        FieldBasis.AddBetween(rows, columns, _scaled, xz.Factor, Xz, firstRow, firstColumn);
        Scale(xx.Operator, kx, true, true);
        FieldBasis.AddBetween(rows, columns, _scaled, xx.Factor, Xx, firstRow, firstColumn);
    }

    private void Scale(ComplexMatrix source, double[] kx, bool rows, bool columns)
    {
        for (int r = 0; r < kx.Length; r++)
        {
            ReadOnlySpan<Complex> from = source.Row(r);
            Span<Complex> to = _scaled.Row(r);
            double factor = rows ? kx[r] : 1;
            for (int c = 0; c < to.Length; c++)
                to[c] = (columns ? factor * kx[c] : factor) * from[c];
        }
    }

    private void ScalePermittivity(Complex[] coefficients, double factor, double[] kx)
    {
        int count = kx.Length;
        for (int r = 0; r < count; r++)
        {
            Span<Complex> to = _scaled.Row(r);
            for (int c = 0; c < count; c++)
                to[c] = factor * coefficients[r - c + count - 1];
            to[r] += kx[r] * kx[r];
        }
    }
}
