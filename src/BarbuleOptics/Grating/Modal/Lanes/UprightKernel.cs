using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Grating.Modal.Lanes;

/// <summary>Solves a slab of upright walls for functions of one kind; the formulas stand at <see cref="UprightSlab"/>.</summary>
internal static class UprightKernel
{
    /// <summary>Largest real s, by number of doublings, up to which C and T of functions that fade come out to 1e-11.</summary>
    private static readonly double[] Steepest = [0.4, 0.82, 1.89, 74, 290, 1190, 4700];

    /// <summary>Where fields are recorded: doublings beyond those needed, and the least number, for steps that losses are integrated by.</summary>
    private const int MoreDoublings = 2, LeastDoublings = 3;

    /// <summary>Doubles of memory that <see cref="Solve"/> needs for n functions.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static int MemoryOf<TLanes>(int n)
        where TLanes : struct, ILanes<TLanes>
        => 6 * n * n * ComplexLanes<TLanes>.Stride + DepthFunctions.ScratchOf<TLanes>(n + 9);

    /// <summary>Adds what these functions answer to <paramref name="ports"/>.</summary>
    /// <param name="shape">The slab.</param>
    /// <param name="geometry">Its functions.</param>
    /// <param name="parity">0 for all functions, 1 for the even, -1 for the odd ones.</param>
    /// <param name="light">The light.</param>
    /// <param name="isElectric">Whether E is followed, otherwise H.</param>
    /// <param name="ports">Receives the answers, by adding.</param>
    /// <param name="memory">Of <see cref="MemoryOf"/>.</param>
    /// <param name="record">Receives what the fields inside follow from; null where they are not asked for.</param>
    /// <returns>Square of the largest multiplier met.</returns>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static TLanes Solve<TLanes>(
        SlabShape shape, UprightGeometry geometry, int parity, SlabLight light, bool isElectric, in PortLanes ports, ref double memory, SlabRecord? record)
        where TLanes : struct, ILanes<TLanes>
    {
        UprightSector sector = geometry.Of(parity);
        int n = sector.Count, size = ComplexLanes<TLanes>.Stride, count = n * n, area = count * size;
        ref double k = ref memory, z = ref Unsafe.Add(ref memory, area), c = ref Unsafe.Add(ref memory, 2 * area), d = ref Unsafe.Add(ref memory, 3 * area);
        ref double even = ref Unsafe.Add(ref memory, 4 * area), odd = ref Unsafe.Add(ref memory, 5 * area), scratch = ref Unsafe.Add(ref memory, 6 * area);
        (int first, int portCount) = sector.PortsUpTo(ports.MostOrder);
        record?.Reserve(n, portCount, shape.HalfIntervals.Length, size);
        TLanes growth = TLanes.Broadcast(0);
        for (int i = shape.HalfIntervals.Length - 1; i >= 0; i--)
        {
            bool isInnermost = i == shape.HalfIntervals.Length - 1;
            double depthNm = isInnermost ? shape.HalfIntervals[i].ThicknessNm : shape.HalfIntervals[i].ThicknessNm / 2;
            int doublings = DoublingsFor(depthNm, sector, light, isElectric);
            if (record is not null)
                doublings = Math.Clamp(doublings + MoreDoublings, LeastDoublings, SlabRecord.MostLevels);
            double thinNm = Math.ScaleB(depthNm, -doublings);
            if (record is not null)
                (record.Doublings[i], record.ThinNm[i]) = (doublings, thinNm);
            growth = TLanes.Max(growth, SetEquations<TLanes>(geometry, parity, i, light, isElectric, thinNm, ref k, ref z, ref scratch, record));
            growth = TLanes.Max(growth, DepthFunctions.Find<TLanes>(ref k, ref z, isElectric, n, thinNm, doublings, ref c, ref d, ref scratch, record, i));
            if (isInnermost)
            {
                LaneSums.Set<TLanes>(ref even, ref c, 1, ref d, -1, count);
                LaneSums.Set<TLanes>(ref odd, ref c, 1, ref c, 0, count);
                continue;
            }
            // A piece of twice the depth: C - D/2 at its planes, -D/2 between them.
            LaneSums.Add<TLanes>(ref c, ref d, -0.5, count);
            growth = TLanes.Max(growth, Carry<TLanes>(ref c, ref d, n, ref even, ref scratch, record, i, 0));
            growth = TLanes.Max(growth, Carry<TLanes>(ref c, ref d, n, ref odd, ref scratch, record, i, 1));
        }
        PlaneWaveLanes.SetOutgoing<TLanes>(sector, geometry.HasSums, light, isElectric, ref k, ref scratch);
        growth = TLanes.Max(growth, Close<TLanes>(sector, first, portCount, ref k, ref even, ref c, ref scratch, record, 0));
        growth = TLanes.Max(growth, Close<TLanes>(sector, first, portCount, ref k, ref odd, ref d, ref scratch, record, 1));
        ports.Add<TLanes>(ref c, ref d, portCount, parity);
        return growth;
    }

    private static int DoublingsFor(double depthNm, UprightSector sector, SlabLight light, bool isElectric)
    {
        int doublings = Math.Max(0, (int)Math.Ceiling(Math.Log2(light.MostWave * depthNm / DepthFunctions.Reach)));
        double steepest = (sector.MostWave + light.MostAcross) * Math.Sqrt(isElectric ? 1 : light.MostContrast) * depthNm;
        while (doublings < Steepest.Length && steepest > Steepest[doublings])
            doublings++;
        return doublings;
    }

    // K times the square of a depth, and Z.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static TLanes SetEquations<TLanes>(
        UprightGeometry geometry, int parity, int interval, SlabLight light, bool isElectric, double thinNm, ref double k, ref double z, ref double scratch, SlabRecord? record)
        where TLanes : struct, ILanes<TLanes>
    {
        UprightSector sector = geometry.Of(parity);
        int n = sector.Count;
        TLanes k0 = TLanes.Load(in light.K0[0]), kx0 = TLanes.Load(in light.Kx0[0]), square = TLanes.Broadcast(thinNm * thinNm), growth = TLanes.Broadcast(0);
        TLanes scaled = -(square * k0 * k0);
        if (isElectric)
        {
            SetSum(sector.Shares[interval], light, false, scaled, n * n, ref k);
            LaneSums.Clear<TLanes>(ref z, n * n);
            for (int i = 0; i < n; i++)
            {
                TLanes wave = kx0 + TLanes.Broadcast(sector.Waves[i]);
                AddToDiagonal(ref k, n, i, square * wave * wave);
                AddToDiagonal(ref z, n, i, TLanes.Broadcast(1));
            }
            return growth;
        }
        SetSum(sector.Shares[interval], light, true, TLanes.Broadcast(1), n * n, ref z);
        // The slope along the surface of an even function is odd.
        UprightSector slopes = geometry.Of(-parity);
        int m = slopes.Count, size = ComplexLanes<TLanes>.Stride;
        ref double inverse = ref Unsafe.Add(ref scratch, 2 * m * m * size);
        if (m > 0)
        {
            SetSum(slopes.Shares[interval], light, false, TLanes.Broadcast(1), m * m, ref inverse);
            LaneSums.SetLeft<TLanes>(ref scratch, m, 2 * m, ref inverse, 1, ref inverse, 0);
            LaneSums.SetRightIdentity<TLanes>(ref scratch, m);
            growth = SymmetricLanes.Eliminate<TLanes>(ref scratch, m, m, true, ref inverse, ref Unsafe.Add(ref inverse, m * m * size));
        }
        if (record is not null)
            LaneSums.Set<TLanes>(ref record.Across(interval), ref inverse, 1, ref inverse, 0, m * m);
        // Function 0 has no odd fellow, and no slope where functions are even.
        for (int row = 0; row < n; row++)
        {
            TLanes wave = square * (kx0 + TLanes.Broadcast(sector.Waves[row]));
            for (int column = 0; column < n; column++)
            {
                ref double element = ref Unsafe.Add(ref k, (row * n + column) * size);
                ComplexLanes<TLanes> value = parity > 0 && (row == 0 || column == 0)
                    ? ComplexLanes<TLanes>.Broadcast(0)
                    : wave * (kx0 + TLanes.Broadcast(sector.Waves[column])) * ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref inverse, ((row - parity) * m + column - parity) * size));
                ComplexLanes<TLanes>.Store(value, ref element);
            }
            AddToDiagonal(ref k, n, row, scaled);
        }
        if (record is not null)
        {
            LaneSums.SetLeft<TLanes>(ref scratch, n, 2 * n, ref z, 1, ref z, 0);
            LaneSums.SetRightIdentity<TLanes>(ref scratch, n);
            growth = TLanes.Max(growth, SymmetricLanes.Eliminate<TLanes>(ref scratch, n, n, true, ref record.SlopeInverse(interval), ref Unsafe.Add(ref scratch, 2 * n * n * size)));
        }
        return growth;
    }

    // A number times the sum over the materials of e, or 1/e, times the material's share.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void SetSum<TLanes>((int Material, double[] Matrix)[] shares, SlabLight light, bool isInverse, TLanes factor, int count, ref double target)
        where TLanes : struct, ILanes<TLanes>
    {
        LaneSums.Clear<TLanes>(ref target, count);
        foreach ((int material, double[] matrix) in shares)
        {
            ComplexLanes<TLanes> permittivity = light.PermittivityOf<TLanes>(material);
            LaneSums.AddShared(ref target, factor * (isInverse ? permittivity.Reciprocal() : permittivity), matrix);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void AddToDiagonal<TLanes>(ref double matrix, int n, int i, TLanes value)
        where TLanes : struct, ILanes<TLanes>
    {
        ref double element = ref Unsafe.Add(ref matrix, i * (n + 1) * ComplexLanes<TLanes>.Stride);
        TLanes.Store(TLanes.Load(in element) + value, ref element);
    }

    // The flux at the top of a piece, of what lies below it: Y becomes a - b (a + Y)^-1 b, b = d/2.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static TLanes Carry<TLanes>(ref double a, ref double d, int n, ref double y, ref double scratch, SlabRecord? record, int interval, int parity)
        where TLanes : struct, ILanes<TLanes>
    {
        LaneSums.SetLeft<TLanes>(ref scratch, n, 2 * n, ref a, 1, ref y, 1);
        LaneSums.SetRight<TLanes>(ref scratch, n, n, ref d, 0.5);
        ref double rest = ref Unsafe.Add(ref scratch, 2 * n * n * ComplexLanes<TLanes>.Stride);
        TLanes growth = SymmetricLanes.Eliminate<TLanes>(ref scratch, n, n, false, ref y, ref rest);
        if (record is not null)
            SymmetricLanes.Keep<TLanes>(ref scratch, n, n, ref rest, ref record.Carry(interval, parity));
        LaneSums.Set<TLanes>(ref y, ref a, 1, ref y, -1, n * n);
        return growth;
    }

    // What the plane waves of some ports make of each other.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static TLanes Close<TLanes>(UprightSector sector, int first, int count, ref double outgoing, ref double y, ref double result, ref double scratch, SlabRecord? record, int parity)
        where TLanes : struct, ILanes<TLanes>
    {
        int n = sector.Count, size = ComplexLanes<TLanes>.Stride;
        LaneSums.SetLeft<TLanes>(ref scratch, n, n + count, ref outgoing, 1, ref y, 1);
        for (int row = 0; row < n; row++)
        {
            for (int port = 0; port < count; port++)
            {
                ComplexLanes<TLanes>.Store(
                    ComplexLanes<TLanes>.Broadcast(sector.Ports[(first + port) * n + row]), ref Unsafe.Add(ref scratch, (row * (n + count) + n + port) * size));
            }
        }
        ref double rest = ref Unsafe.Add(ref scratch, n * (n + count) * size);
        TLanes growth = SymmetricLanes.Eliminate<TLanes>(ref scratch, n, count, false, ref result, ref rest);
        if (record is not null)
            SymmetricLanes.Keep<TLanes>(ref scratch, n, count, ref rest, ref record.Close(parity, record.Doublings.Length));
        return growth;
    }
}
