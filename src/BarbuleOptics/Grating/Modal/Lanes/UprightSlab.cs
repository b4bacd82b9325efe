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
    private const double MostGrowth = 1e10;

    private readonly SlabShape _shape;
    private readonly double[]? _wallsNm;
    private readonly Dictionary<int, UprightGeometry> _geometries = [];
    private LaneMemory _memory = new(0);

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
    /// <returns>Mask of the lanes in which elimination lost too many digits; where all are lost answers are not finite.</returns>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public TLanes Scatter<TLanes>(SlabLight light, bool isElectric, int mostOrder, int harmonics, Span<double> reflection, Span<double> transmission)
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
        TLanes growth;
        if (light.IsNormal)
        {
            growth = UprightKernel.Solve<TLanes>(_shape, geometry, 1, light, isElectric, ports, ref memory);
            if (mostOrder > 0)
                growth = TLanes.Max(growth, UprightKernel.Solve<TLanes>(_shape, geometry, -1, light, isElectric, ports, ref memory));
        }
        else
        {
            growth = UprightKernel.Solve<TLanes>(_shape, geometry, 0, light, isElectric, ports, ref memory);
        }
        ports.TurnToAmplitudes<TLanes>(light, isElectric, _shape.AxisNm / _shape.PeriodNm);
        return TLanes.LessThan(TLanes.Broadcast(MostGrowth), growth);
    }
}
