using System.Numerics;
using System.Runtime.CompilerServices;

namespace BarbuleOptics.Grating.Modal;

/// <summary>Plane waves in a medium beyond a plane, met by a field of crowded harmonics.</summary>
/// <remarks>
/// Order n of harmonic m is C_nm = mean over u of f exp(i 2 pi (m u - n x)/P), whatever kx0. What leaves adds C^H (-i kz) C to the
/// equations: kz = i (K|n| + sgn(n) kx0 - q/(2 K |n|)) + rest, of which the sums over all n of the first three are made once, K = 2 pi/P,
/// q = k0^2 e - ky^2; the rest falls like 1/n^2. So the field just outside is not cut at the harmonics within, and power is kept.
/// </remarks>
internal sealed class CrowdedPlanes
{
    /// <summary>Most that the phase of an integrand turns within a panel of 16 nodes.</summary>
    private const double PanelPhase = 10;

    private static readonly (double[] Nodes, double[] Weights) Rule = ElementRule.GaussLegendre(16);

    private readonly int _harmonics;
    private readonly double _step;
    private readonly ComplexMatrix _slope;
    private readonly ComplexMatrix _kz;
    private readonly Complex[] _scaled;

    /// <summary>Makes what does not depend on the light.</summary>
    public CrowdedPlanes(WallCrowding crowding, ComplexMatrix slope, int harmonics, double periodNm)
    {
        int count = 2 * harmonics + 1, far = 4 * harmonics + 24;
        (_harmonics, _slope, _step, MostOrder) = (harmonics, slope, 2 * Math.PI / periodNm, harmonics + 4);
        ComplexMatrix all = Transform(crowding, harmonics, far, _step);
        AllOrders = new ComplexMatrix(2 * MostOrder + 1, count);
        Orders = new ComplexMatrix(count, count);
        Kx = new ComplexMatrix(count, count);
        (Size, Sign, Inverse, _kz) = (new ComplexMatrix(count, count), new ComplexMatrix(count, count), new ComplexMatrix(count, count), new ComplexMatrix(count, count));
        _scaled = new Complex[count];
        for (int n = -far; n <= far; n++)
        {
            ReadOnlySpan<Complex> row = all.Row(n + far);
            if (Math.Abs(n) <= MostOrder)
                row.CopyTo(AllOrders.Row(n + MostOrder));
            if (Math.Abs(n) <= harmonics)
                row.CopyTo(Orders.Row(n + harmonics));
            if (n == 0)
                continue;
            AddSquare(row, _step * Math.Abs(n), Size);
            AddSquare(row, Math.Sign(n), Sign);
            AddSquare(row, 1 / (_step * Math.Abs(n)), Inverse);
        }
    }

    /// <summary>Largest order whose kz is taken by itself.</summary>
    public int MostOrder { get; }

    /// <summary>C for the orders up to that.</summary>
    public ComplexMatrix AllOrders { get; }

    /// <summary>Sum of K |n| C_n^H C_n, C_n the row of order n.</summary>
    public ComplexMatrix Size { get; }

    /// <summary>Sum of sgn(n) C_n^H C_n.</summary>
    public ComplexMatrix Sign { get; }

    /// <summary>Sum of C_n^H C_n/(K |n|) without order 0.</summary>
    public ComplexMatrix Inverse { get; }

    /// <summary>C for the orders -N..N.</summary>
    public ComplexMatrix Orders { get; }

    /// <summary>-i d/dx in the crowded harmonics times f: diag(2 pi m/P) + kx0 [f].</summary>
    public ComplexMatrix Kx { get; }

    /// <summary>Takes the light.</summary>
    public void Set(ModalWaves waves, Complex permittivity)
    {
        double kx0 = waves.KxOf(0);
        Complex i = Complex.ImaginaryOne, q = waves.K0 * waves.K0 * (permittivity - waves.Alpha * waves.Alpha);
        for (int e = 0; e < Kx.Elements.Length; e++)
        {
            Kx.Elements[e] = kx0 * _slope.Elements[e];
            _kz.Elements[e] = i * (Size.Elements[e] + kx0 * Sign.Elements[e] - q / 2 * Inverse.Elements[e]);
        }
        for (int m = -_harmonics; m <= _harmonics; m++)
            Kx[m + _harmonics, m + _harmonics] += m * _step;
        for (int n = -MostOrder; n <= MostOrder; n++)
        {
            Complex rest = waves.KzIn(permittivity, n);
            if (n != 0)
                rest -= i * (_step * Math.Abs(n) + Math.Sign(n) * kx0 - q / (2 * _step * Math.Abs(n)));
            AddSquare(AllOrders.Row(n + MostOrder), rest, _kz);
        }
    }

    /// <summary>Adds the terms of outgoing waves at the top or the bottom plane, after <see cref="Set"/>.</summary>
    public void AddOutgoing(ModalWaves waves, in ModalSector sector, Complex permittivity, bool isTop, ComplexMatrix system)
    {
        (Complex electric, Complex magnetic) = waves.FluxFactors(permittivity);
        FieldBasis e = sector.Electric, h = sector.Magnetic;
        int first = e.Count;
        if (e.Count > 0)
            FieldBasis.AddBetween(e, e, _kz, -Complex.ImaginaryOne * electric, [], [], system, 0, 0);
        if (h.Count > 0)
            FieldBasis.AddBetween(h, h, _kz, -Complex.ImaginaryOne * sector.MagneticSign * magnetic, [], [], system, first, first);
        if (waves.Alpha == 0 || e.Count == 0 || h.Count == 0)
            return;
        Complex cross = new Complex(0, (isTop ? 1 : -1) * waves.Alpha) * magnetic;
        FieldBasis.AddBetween(e, h, Kx, cross, [], [], system, 0, first);
        FieldBasis.AddBetween(h, e, Kx, cross, [], [], system, first, 0);
    }

    private static void AddSquare(ReadOnlySpan<Complex> row, Complex factor, ComplexMatrix sum)
    {
        for (int m = 0; m < row.Length; m++)
            ComplexMatrix.SubtractScaled(sum.Row(m), -factor * Complex.Conjugate(row[m]), row);
    }

    // Runs long before it is called often enough to be compiled well by itself.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static ComplexMatrix Transform(WallCrowding crowding, int harmonics, int far, double step)
    {
        var result = new ComplexMatrix(2 * far + 1, 2 * harmonics + 1);
        var waves = new Complex[2 * harmonics + 1];
        for (int stretch = 0; stretch < crowding.Stretches; stretch++)
        {
            (double shareU, double shareX) = crowding.Shares(stretch);
            // The phase turns by a few radians in a panel, which 16 nodes integrate to rounding.
            int panels = 1 + (int)(Math.PI * 2 * (far * shareX + harmonics * shareU) / PanelPhase);
            for (int q = 0; q < panels * Rule.Nodes.Length; q++)
            {
                double share = (q / Rule.Nodes.Length + (1 + Rule.Nodes[q % Rule.Nodes.Length]) / 2) / panels;
                (double u, double x, double slope) = crowding.At(stretch, share);
                for (int m = -harmonics; m <= harmonics; m++)
                    waves[m + harmonics] = Complex.FromPolarCoordinates(shareU * slope * Rule.Weights[q % Rule.Nodes.Length] / (2 * panels), m * step * u);
                Complex turn = Complex.FromPolarCoordinates(1, -step * x), phase = Complex.FromPolarCoordinates(1, far * step * x);
                for (int n = -far; n <= far; n++)
                {
                    ComplexMatrix.SubtractScaled(result.Row(n + far), -phase, waves);
                    phase *= turn;
                }
            }
        }
        return result;
    }
}
