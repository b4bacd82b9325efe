using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Modal.Lanes;

/// <summary>Where a slab's answers between plane waves are gathered: what unit right sides make, first, then amplitudes.</summary>
internal readonly ref struct PortLanes(Span<double> reflection, Span<double> transmission, int mostOrder)
{
    private static readonly double Half = Math.Sqrt(0.5);

    private readonly Span<double> _reflection = reflection;
    private readonly Span<double> _transmission = transmission;

    /// <summary>Largest order of the channels.</summary>
    public int MostOrder { get; } = mostOrder;

    /// <summary>Sets all to zero.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void Clear<TLanes>()
        where TLanes : struct, ILanes<TLanes>
    {
        int count = (2 * MostOrder + 1) * (2 * MostOrder + 1) * ComplexLanes<TLanes>.Stride;
        _reflection[..count].Clear();
        _transmission[..count].Clear();
    }

    /// <summary>Adds what ports of one parity give: for E or H even about the middle, and for it odd there.</summary>
    /// <param name="even">Rows of <paramref name="count"/> elements.</param>
    /// <param name="odd">Likewise.</param>
    /// <param name="count">Number of ports.</param>
    /// <param name="parity">0 where a port is an order, 1 or -1 where it is the even or odd combination of two; the first port of even ones is order 0,
    /// of odd ones order 1.</param>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void Add<TLanes>(ref double even, ref double odd, int count, int parity)
        where TLanes : struct, ILanes<TLanes>
    {
        int size = ComplexLanes<TLanes>.Stride, first = parity < 0 ? 1 : 0;
        for (int row = 0; row < count; row++)
        {
            for (int column = 0; column < count; column++)
            {
                int at = (row * count + column) * size;
                ComplexLanes<TLanes> same = ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref even, at));
                ComplexLanes<TLanes> other = ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref odd, at));
                ComplexLanes<TLanes> reflected = TLanes.Broadcast(0.5) * (same + other), passed = TLanes.Broadcast(0.5) * (same - other);
                if (parity == 0)
                    AddTo(row, column, 1, reflected, passed);
                else
                    AddImages(first + row, first + column, parity, reflected, passed);
            }
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void AddImages<TLanes>(int m, int n, int parity, ComplexLanes<TLanes> reflected, ComplexLanes<TLanes> passed)
        where TLanes : struct, ILanes<TLanes>
    {
        double share = (m == 0 ? 1 : Half) * (n == 0 ? 1 : Half);
        AddTo(MostOrder + m, MostOrder + n, share, reflected, passed);
        if (m != 0)
            AddTo(MostOrder - m, MostOrder + n, parity * share, reflected, passed);
        if (n != 0)
            AddTo(MostOrder + m, MostOrder - n, parity * share, reflected, passed);
        if (m != 0 && n != 0)
            AddTo(MostOrder - m, MostOrder - n, share, reflected, passed);
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void AddTo<TLanes>(int row, int column, double share, ComplexLanes<TLanes> reflected, ComplexLanes<TLanes> passed)
        where TLanes : struct, ILanes<TLanes>
    {
        int at = (row * (2 * MostOrder + 1) + column) * ComplexLanes<TLanes>.Stride;
        ref double reflection = ref _reflection[at], transmission = ref _transmission[at];
        TLanes scale = TLanes.Broadcast(share);
        ComplexLanes<TLanes>.Store(ComplexLanes<TLanes>.Load(ref reflection) + scale * reflected, ref reflection);
        ComplexLanes<TLanes>.Store(ComplexLanes<TLanes>.Load(ref transmission) + scale * passed, ref transmission);
    }

    /// <summary>Turns what unit right sides make into amplitudes, counted from the slab's origin instead of its axis.</summary>
    /// <param name="light">The light.</param>
    /// <param name="isElectric">Whether E is followed, otherwise H.</param>
    /// <param name="axis">Place of the axis in periods.</param>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void TurnToAmplitudes<TLanes>(SlabLight light, bool isElectric, double axis)
        where TLanes : struct, ILanes<TLanes>
    {
        int size = ComplexLanes<TLanes>.Stride, channels = 2 * MostOrder + 1;
        ComplexLanes<TLanes> matrix = light.PermittivityOf<TLanes>(Section.Matrix);
        ComplexLanes<TLanes> flux = isElectric ? ComplexLanes<TLanes>.Broadcast(0, -2) : ComplexLanes<TLanes>.Broadcast(0, -2) * matrix.Reciprocal();
        for (int column = 0; column < channels; column++)
        {
            ComplexLanes<TLanes> right = flux * PlaneWaveLanes.DepthWave(light, matrix, column - MostOrder);
            for (int row = 0; row < channels; row++)
            {
                (double sine, double cosine) = Math.SinCos(-2 * Math.PI * (row - column) * axis);
                ComplexLanes<TLanes> factor = axis == 0 ? right : right * ComplexLanes<TLanes>.Broadcast(cosine, sine);
                ref double reflection = ref _reflection[(row * channels + column) * size], transmission = ref _transmission[(row * channels + column) * size];
                ComplexLanes<TLanes> reflected = factor * ComplexLanes<TLanes>.Load(ref reflection), passed = factor * ComplexLanes<TLanes>.Load(ref transmission);
                if (row == column)
                    reflected -= ComplexLanes<TLanes>.Broadcast(1);
                ComplexLanes<TLanes>.Store(reflected, ref reflection);
                ComplexLanes<TLanes>.Store(passed, ref transmission);
            }
        }
    }
}
