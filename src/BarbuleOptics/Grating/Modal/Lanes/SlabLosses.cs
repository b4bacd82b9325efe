using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Modal.Lanes;

/// <summary>What the materials of a slab of upright walls lose in proportion to each other, from the fields inside.</summary>
/// <remarks>
/// Fields even and odd about the middle lose power by themselves, and each half of the slab the same. In depth the fields are found by halving: between
/// two equal pieces u = (2 a)^-1 b (u_top + u_bottom), from the systems that doubling left. Material i with the share P_i loses Im(e_i) times the
/// integral of u^H P_i u in E, and of h^H P_i h/|e_i|^2 + g^H P_i g in H, with the slope h = du/dz and g = (sum e_i P_i)^-1 (w + kx0) u the
/// continuous field in depth; the integral is Romberg's of three steps. Layers that fade within a step at faces are met roughly.
/// </remarks>
internal static class SlabLosses
{
    /// <summary>Doubles of memory that <see cref="Add"/> needs.</summary>
    public static int MemoryOf<TLanes>(SlabRecord record, int mostOrder)
        where TLanes : struct, ILanes<TLanes>
    {
        int nodes = 1;
        foreach (int doublings in record.Doublings)
            nodes = Math.Max(nodes, (1 << doublings) + 1);
        return ((nodes + 4) * (record.Count + 1) + 2 * mostOrder + 1) * ComplexLanes<TLanes>.Stride;
    }

    /// <summary>Adds the losses of one half, in units of their own.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void Add<TLanes>(in SlabPart part, int mostOrder, ref double down, ref double up, ref double byMaterial, ref double memory)
        where TLanes : struct, ILanes<TLanes>
    {
        int n = part.Record.Count, size = ComplexLanes<TLanes>.Stride, intervals = part.Record.Doublings.Length;
        (_, int ports) = part.Sector.PortsUpTo(mostOrder);
        ref double top = ref memory, bottom = ref Unsafe.Add(ref memory, (n + 1) * size), work = ref Unsafe.Add(ref memory, 2 * (n + 1) * size);
        ref double nodes = ref Unsafe.Add(ref memory, 4 * (n + 1) * size);
        for (int parity = 0; parity < 2; parity++)
        {
            SetIncoming<TLanes>(part, mostOrder, parity == 0 ? 1 : -1, ref down, ref up, ref nodes);
            SymmetricLanes.Recall<TLanes>(ref part.Record.Close(parity, intervals), n, ports, ref nodes, ref top);
            for (int i = 0; i < intervals; i++)
            {
                bool isInnermost = i == intervals - 1;
                int doublings = part.Record.Doublings[i], count = 1 << (isInnermost ? doublings - 1 : doublings);
                if (!isInnermost)
                    SymmetricLanes.Recall<TLanes>(ref part.Record.Carry(i, parity), n, n, ref top, ref bottom);
                else if (parity == 0)
                    SymmetricLanes.Recall<TLanes>(ref part.Record.Level(i, doublings), n, n, ref top, ref bottom);
                else
                    LaneSums.Clear<TLanes>(ref bottom, n);
                Halve<TLanes>(part.Record, i, count, ref top, ref bottom, ref work, ref nodes);
                for (int node = 0; node <= count; node++)
                    AddNode<TLanes>(part, i, count, node, ref nodes, ref work, ref byMaterial);
                LaneSums.Set<TLanes>(ref top, ref bottom, 1, ref bottom, 0, n);
            }
        }
    }

    // Right sides that waves from above and below make, half their sum or half their difference, of the sector's ports.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void SetIncoming<TLanes>(in SlabPart part, int mostOrder, double sign, ref double down, ref double up, ref double target)
        where TLanes : struct, ILanes<TLanes>
    {
        int size = ComplexLanes<TLanes>.Stride, place = 0;
        double half = Math.Sqrt(0.5);
        foreach (int order in part.Sector.Orders)
        {
            if (Math.Abs(order) > mostOrder)
                continue;
            ComplexLanes<TLanes> right = Right<TLanes>(part, mostOrder, order, sign, ref down, ref up);
            if (part.Parity != 0 && order != 0)
                right = TLanes.Broadcast(half) * (right + TLanes.Broadcast(part.Parity) * Right<TLanes>(part, mostOrder, -order, sign, ref down, ref up));
            ComplexLanes<TLanes>.Store(right, ref Unsafe.Add(ref target, place++ * size));
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static ComplexLanes<TLanes> Right<TLanes>(in SlabPart part, int mostOrder, int order, double sign, ref double down, ref double up)
        where TLanes : struct, ILanes<TLanes>
    {
        int at = (mostOrder + order) * ComplexLanes<TLanes>.Stride;
        ComplexLanes<TLanes> sum = ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref down, at)) + TLanes.Broadcast(sign) * ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref up, at));
        // Seen from the mirror axis; what all orders share is left out.
        (double sine, double cosine) = Math.SinCos(2 * Math.PI * order * part.Shape.AxisNm / part.Shape.PeriodNm);
        return ComplexLanes<TLanes>.Broadcast(cosine, sine) * (PlaneWaveLanes.DepthWave(part.Light, part.Light.PermittivityOf<TLanes>(Section.Matrix), order) * sum);
    }

    // Fields at all planes between pieces of twice the thin depth.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void Halve<TLanes>(SlabRecord record, int interval, int count, ref double top, ref double bottom, ref double work, ref double nodes)
        where TLanes : struct, ILanes<TLanes>
    {
        int n = record.Count, step = n * ComplexLanes<TLanes>.Stride;
        LaneSums.Set<TLanes>(ref nodes, ref top, 1, ref top, 0, n);
        LaneSums.Set<TLanes>(ref Unsafe.Add(ref nodes, count * step), ref bottom, 1, ref bottom, 0, n);
        int level = 0;
        for (int pieces = count; pieces > 1; pieces /= 2)
            level++;
        for (int half = count / 2; half > 0; half /= 2, level--)
        {
            for (int node = half; node < count; node += 2 * half)
            {
                LaneSums.Set<TLanes>(ref work, ref Unsafe.Add(ref nodes, (node - half) * step), 0.5, ref Unsafe.Add(ref nodes, (node + half) * step), 0.5, n);
                SymmetricLanes.Recall<TLanes>(ref record.Level(interval, level), n, n, ref work, ref Unsafe.Add(ref nodes, node * step));
            }
        }
    }

    // Adds what a node counts for in each absorbing material.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void AddNode<TLanes>(in SlabPart part, int interval, int count, int node, ref double nodes, ref double work, ref double byMaterial)
        where TLanes : struct, ILanes<TLanes>
    {
        int n = part.Record.Count, step = n * ComplexLanes<TLanes>.Stride;
        TLanes weight = TLanes.Broadcast(2 * part.Record.ThinNm[interval] * Weight(node, count)), zero = TLanes.Broadcast(0);
        ref double field = ref Unsafe.Add(ref nodes, node * step);
        ref double slope = ref work, across = ref Unsafe.Add(ref work, (n + 1) * ComplexLanes<TLanes>.Stride);
        if (!part.IsElectric)
        {
            SetAcross<TLanes>(part, interval, ref field, ref across);
            SetSlope<TLanes>(part.Record, interval, ref field, ref Unsafe.Add(ref field, node < count ? step : -step), ref slope);
        }
        UprightSector sector = part.Sector, slopes = part.Slopes;
        for (int share = 0; share < sector.Shares[interval].Length; share++)
        {
            (int material, double[] matrix) = sector.Shares[interval][share];
            ComplexLanes<TLanes> permittivity = part.Light.PermittivityOf<TLanes>(material);
            if (!TLanes.Any(TLanes.LessThan(zero, permittivity.Imaginary)))
                continue;
            TLanes lost = part.IsElectric
                ? Square<TLanes>(matrix, n, ref field)
                : Square<TLanes>(matrix, n, ref slope) / permittivity.Norm + Square<TLanes>(slopes.Shares[interval][share].Matrix, slopes.Count, ref across);
            ref double sum = ref Unsafe.Add(ref byMaterial, material * TLanes.Count);
            TLanes.Store(TLanes.MultiplyAdd(weight * permittivity.Imaginary, lost, TLanes.Load(in sum)), ref sum);
        }
    }

    /// <summary>Weight of a node in (64 T(h) - 20 T(2 h) + T(4 h))/45 over <paramref name="count"/> steps, T the trapezoidal sum divided by h.</summary>
    public static double Weight(int node, int count)
    {
        double weight = (64 - (node % 2 == 0 ? 40 : 0) + (node % 4 == 0 ? 4 : 0)) / 45.0;
        return node == 0 || node == count ? weight / 2 : weight;
    }

    // g = (sum e_i P_i)^-1 (w + kx0) u.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void SetAcross<TLanes>(in SlabPart part, int interval, ref double field, ref double result)
        where TLanes : struct, ILanes<TLanes>
    {
        UprightSector sector = part.Sector;
        int m = part.Slopes.Count, size = ComplexLanes<TLanes>.Stride;
        TLanes kx0 = TLanes.Load(in part.Light.Kx0[0]);
        LaneSums.Clear<TLanes>(ref result, m);
        ref double across = ref part.Record.Across(interval);
        for (int column = 0; column < m; column++)
        {
            int own = column + part.Parity;
            // Odd functions have no fellow of the even function 0.
            if (own < 0 || own >= sector.Count)
                continue;
            ComplexLanes<TLanes> turned = (kx0 + TLanes.Broadcast(sector.Waves[own])) * ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref field, own * size));
            for (int row = 0; row < m; row++)
            {
                ref double sum = ref Unsafe.Add(ref result, row * size);
                ComplexLanes<TLanes>.Store(
                    ComplexLanes<TLanes>.MultiplyAdd(ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref across, (row * m + column) * size)), turned, ComplexLanes<TLanes>.Load(ref sum)), ref sum);
            }
        }
    }

    // The slope in depth, but for its sign, from the field at a plane and at the other plane of a piece.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void SetSlope<TLanes>(SlabRecord record, int interval, ref double field, ref double other, ref double result)
        where TLanes : struct, ILanes<TLanes>
    {
        int n = record.Count, size = ComplexLanes<TLanes>.Stride;
        ref double piece = ref record.Piece(interval), link = ref record.Link(interval), inverse = ref record.SlopeInverse(interval);
        LaneSums.Clear<TLanes>(ref result, n);
        for (int row = 0; row < n; row++)
        {
            ComplexLanes<TLanes> flux = ComplexLanes<TLanes>.Broadcast(0);
            for (int column = 0; column < n; column++)
            {
                // Of C the upper triangle counts.
                int upper = (Math.Min(row, column) * n + Math.Max(row, column)) * size;
                flux = ComplexLanes<TLanes>.MultiplyAdd(ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref piece, upper)), ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref field, column * size)), flux);
                flux = ComplexLanes<TLanes>.SubtractProduct(ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref link, upper)), ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref other, column * size)), flux);
            }
            for (int to = 0; to < n; to++)
            {
                ref double sum = ref Unsafe.Add(ref result, to * size);
                ComplexLanes<TLanes>.Store(
                    ComplexLanes<TLanes>.MultiplyAdd(ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref inverse, (to * n + row) * size)), flux, ComplexLanes<TLanes>.Load(ref sum)), ref sum);
            }
        }
    }

    // v^H P v of a symmetric real P.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static TLanes Square<TLanes>(double[] matrix, int n, ref double vector)
        where TLanes : struct, ILanes<TLanes>
    {
        int size = ComplexLanes<TLanes>.Stride;
        TLanes sum = TLanes.Broadcast(0);
        for (int row = 0; row < n; row++)
        {
            ComplexLanes<TLanes> product = ComplexLanes<TLanes>.Broadcast(0);
            for (int column = 0; column < n; column++)
                product += TLanes.Broadcast(matrix[row * n + column]) * ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref vector, column * size));
            ComplexLanes<TLanes> own = ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref vector, row * size));
            sum = TLanes.MultiplyAdd(own.Real, product.Real, TLanes.MultiplyAdd(own.Imaginary, product.Imaginary, sum));
        }
        return sum;
    }
}
