using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Grating.Modal.Lanes;

/// <summary>A slab of upright walls that is its own mirror image about an upright axis and about its middle, for several wavelengths side by side.</summary>
/// <remarks>
/// One field along the rods is followed, E or H. With functions in which [f] is the unit matrix (<see cref="UprightGeometry"/>)
/// and P_i the share of material i between them, a stretch of depth has Z u'' = K u: for E Z = 1 and K = (w + kx0)^2 - k0^2 sum e_i P_i;
/// for H Z = sum P_i/e_i and K = (w + kx0) (sum e_i P_i)^-1 (w + kx0) - k0^2. From the middle, where the field's slope or the field itself is
/// zero, the flux Y u is carried to the top (<see cref="DepthFunctions"/>); with what leaves beyond, G = P (Y + Y0)^-1 P^T between the plane waves P gives
/// reflection (G_even + G_odd)/2 and transmission (G_even - G_odd)/2, the same from both sides. <see cref="ModalSlab"/> is the readable reference.
/// </remarks>
internal sealed class UprightSlab
{
    /// <summary>Square of the largest multiplier that elimination may meet; beyond it too many digits would be lost.</summary>
    private const double MostGrowth = 1e7;

    private readonly SlabShape _shape;
    private readonly double[]? _wallsNm;
    private readonly Dictionary<int, UprightGeometry> _geometries = [];
    private readonly SlabRecord[] _records = [new(), new(), new()];
    private LaneMemory _memory = new(0);
    private UprightGeometry? _solved;

    /// <summary>Describes a slab that <see cref="Covers"/> says yes to.</summary>
    public UprightSlab(SlabShape shape)
    {
        _shape = shape;
        _wallsNm = WallCrowding.WallsOf(shape);
    }

    /// <summary>Whether a slab is of this kind.</summary>
    public static bool Covers(SlabShape shape) => shape.HasAxis && shape.HasMiddle && shape.Intervals.All(interval => interval.IsUpright);

    /// <summary>Fills reflection and transmission between plane waves, the same from above and from below.</summary>
    /// <param name="light">The light, one wavelength a lane.</param>
    /// <param name="isElectric">Whether E is followed, otherwise H.</param>
    /// <param name="mostOrder">Largest order of the channels, M.</param>
    /// <param name="harmonics">N; at least M is used.</param>
    /// <param name="reflection">Receives (2 M + 1)^2 complex elements, row by row.</param>
    /// <param name="transmission">Likewise.</param>
    /// <param name="keepsFields">Whether <see cref="AddLosses"/> will follow.</param>
    /// <returns>Mask of the lanes in which elimination lost too many digits; where all are lost answers are not finite.</returns>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public TLanes Scatter<TLanes>(SlabLight light, bool isElectric, int mostOrder, int harmonics, Span<double> reflection, Span<double> transmission, bool keepsFields = false)
        where TLanes : struct, ILanes<TLanes>
    {
        harmonics = Math.Max(harmonics, mostOrder);
        if (!_geometries.TryGetValue(harmonics, out UprightGeometry? geometry))
            geometry = _geometries[harmonics] = new UprightGeometry(_shape, _wallsNm, harmonics);
        int needed = UprightKernel.MemoryOf<TLanes>(2 * harmonics + 1);
        if (_memory.Length < needed)
            _memory = new LaneMemory(needed);
        ref double memory = ref _memory[0];
        var ports = new PortLanes(reflection, transmission, mostOrder);
        ports.Clear<TLanes>();
        _solved = geometry;
        TLanes growth;
        if (light.IsNormal)
        {
            growth = UprightKernel.Solve<TLanes>(_shape, geometry, 1, light, isElectric, ports, ref memory, keepsFields ? _records[2] : null);
            if (mostOrder > 0)
                growth = TLanes.Max(growth, UprightKernel.Solve<TLanes>(_shape, geometry, -1, light, isElectric, ports, ref memory, keepsFields ? _records[0] : null));
        }
        else
        {
            growth = UprightKernel.Solve<TLanes>(_shape, geometry, 0, light, isElectric, ports, ref memory, keepsFields ? _records[1] : null);
        }
        ports.TurnToAmplitudes<TLanes>(light, isElectric, _shape.AxisNm / _shape.PeriodNm);
        return TLanes.LessThan(TLanes.Broadcast(MostGrowth), growth);
    }

    /// <summary>Adds what each material loses, in units of its own, from waves that fall on the slab solved last with fields kept.</summary>
    /// <param name="light">As solved.</param>
    /// <param name="isElectric">As solved.</param>
    /// <param name="mostOrder">As solved.</param>
    /// <param name="down">Downward amplitudes at the top plane, by order.</param>
    /// <param name="up">Upward amplitudes at the bottom plane.</param>
    /// <param name="byMaterial">Real numbers by the number of the material.</param>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void AddLosses<TLanes>(SlabLight light, bool isElectric, int mostOrder, ref double down, ref double up, ref double byMaterial)
        where TLanes : struct, ILanes<TLanes>
    {
        foreach (int parity in light.IsNormal ? (ReadOnlySpan<int>)[1, -1] : [0])
        {
            if (parity < 0 && mostOrder == 0)
                continue;
            int needed = SlabLosses.MemoryOf<TLanes>(_records[parity + 1], mostOrder);
            if (_memory.Length < needed)
                _memory = new LaneMemory(needed);
            var part = new SlabPart(_shape, _solved!, parity, _records[parity + 1], light, isElectric);
            SlabLosses.Add<TLanes>(part, mostOrder, ref down, ref up, ref byMaterial, ref _memory[0]);
        }
    }
}
