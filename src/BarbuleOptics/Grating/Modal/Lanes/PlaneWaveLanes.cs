using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Modal.Lanes;

/// <summary>Plane waves in the medium beyond a slab, in lanes.</summary>
internal static class PlaneWaveLanes
{
    /// <summary>Wave vector in depth of an order, Im >= 0, never zero (<see cref="GratingWaves.LeastKz"/>), in 1/nm.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ComplexLanes<TLanes> DepthWave<TLanes>(SlabLight light, ComplexLanes<TLanes> permittivity, int order)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes k0 = TLanes.Load(in light.K0[0]), kx = TLanes.Load(in light.Kx0[0]) + TLanes.Broadcast(2 * Math.PI * order / light.PeriodNm);
        ComplexLanes<TLanes> root = (new ComplexLanes<TLanes>(k0 * k0 * permittivity.Real - kx * kx, k0 * k0 * permittivity.Imaginary)).PassiveRoot();
        TLanes least = TLanes.Broadcast(GratingWaves.LeastKz) * k0;
        TLanes grazes = TLanes.LessThan(TLanes.Abs(root.Real) + TLanes.Abs(root.Imaginary), least);
        return ComplexLanes<TLanes>.Select(grazes, new ComplexLanes<TLanes>(least, TLanes.Broadcast(0)), root);
    }

    /// <summary>Writes what leaves into the medium: flux over field at the plane, of which the upper triangle counts.</summary>
    /// <param name="sector">The functions.</param>
    /// <param name="hasSums">Whether far orders are in the sums, from which each order's own part is then a difference.</param>
    /// <param name="light">The light.</param>
    /// <param name="isElectric">Whether E is followed, otherwise H.</param>
    /// <param name="target">Receives n rows of n elements.</param>
    /// <param name="scratch">Room for an element for each order.</param>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void SetOutgoing<TLanes>(UprightSector sector, bool hasSums, SlabLight light, bool isElectric, ref double target, ref double scratch)
        where TLanes : struct, ILanes<TLanes>
    {
        int n = sector.Count, size = ComplexLanes<TLanes>.Stride, orders = sector.Orders.Length;
        ComplexLanes<TLanes> matrix = light.PermittivityOf<TLanes>(Section.Matrix);
        TLanes k0 = TLanes.Load(in light.K0[0]), kx0 = TLanes.Load(in light.Kx0[0]), zero = TLanes.Broadcast(0);
        ComplexLanes<TLanes> squared = k0 * k0 * matrix, flux = isElectric ? ComplexLanes<TLanes>.Broadcast(1) : matrix.Reciprocal();
        // -i kz = K |n| + sgn(n) kx0 - q/(2 K |n|) - i rest.
        LaneSums.Clear<TLanes>(ref target, n * n);
        if (hasSums)
        {
            LaneSums.AddShared(ref target, flux, sector.Size);
            LaneSums.AddShared(ref target, kx0 * flux, sector.Sign);
            LaneSums.AddShared(ref target, TLanes.Broadcast(-0.5) * (squared * flux), sector.Inverse);
        }
        double step = 2 * Math.PI / light.PeriodNm;
        for (int place = 0; place < orders; place++)
        {
            int order = sector.Orders[place];
            ComplexLanes<TLanes> rest = -DepthWave(light, matrix, order).TimesI;
            if (hasSums && order != 0)
            {
                double far = step * Math.Abs(order);
                ComplexLanes<TLanes> known = TLanes.Broadcast(0.5 / far) * squared;
                rest -= new ComplexLanes<TLanes>(TLanes.Broadcast(far) + TLanes.Broadcast(Math.Sign(order)) * kx0 - known.Real, -known.Imaginary);
            }
            ComplexLanes<TLanes>.Store(rest * flux, ref Unsafe.Add(ref scratch, place * size));
        }
        AddSquares<TLanes>(ref target, ref scratch, sector.Ports, n, orders);
    }

    // Adds the sum over orders of a number times the square of the order's row.
    [MethodImpl(MethodImplOptions.AggressiveOptimization | MethodImplOptions.NoInlining)]
    private static void AddSquares<TLanes>(ref double target, ref double factors, ReadOnlySpan<double> ports, int n, int orders)
        where TLanes : struct, ILanes<TLanes>
    {
        int size = ComplexLanes<TLanes>.Stride, half = TLanes.Count;
        ref double port = ref MemoryMarshal.GetReference(ports);
        for (int row = 0; row < n; row++)
        {
            for (int column = row; column < n; column++)
            {
                ref double element = ref Unsafe.Add(ref target, (row * n + column) * size);
                TLanes real = TLanes.Load(in element), imaginary = TLanes.Load(in Unsafe.Add(ref element, half));
                ref double factor = ref factors;
                for (int place = 0; place < orders; place++)
                {
                    TLanes product = TLanes.Broadcast(Unsafe.Add(ref port, place * n + row) * Unsafe.Add(ref port, place * n + column));
                    real = TLanes.MultiplyAdd(product, TLanes.Load(in factor), real);
                    imaginary = TLanes.MultiplyAdd(product, TLanes.Load(in Unsafe.Add(ref factor, half)), imaginary);
                    factor = ref Unsafe.Add(ref factor, size);
                }
                TLanes.Store(real, ref element);
                TLanes.Store(imaginary, ref Unsafe.Add(ref element, half));
            }
        }
    }
}
