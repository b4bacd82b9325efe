using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using BarbuleOptics.Grating.Modal;
using BarbuleOptics.Grating.Modal.Lanes;
using BarbuleOptics.Grating.Multipoles.Lanes;
using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Batches;

/// <summary>A slab of upright walls as an element of a batch.</summary>
internal sealed class SlabElement<TLanes> : IBatchElement<TLanes>
    where TLanes : struct, ILanes<TLanes>
{
    private readonly UprightSlab _slab;
    private readonly int[] _materials;
    private readonly SlabLight _light = new();
    private readonly double[] _kx0 = new double[TLanes.Count];
    private readonly double[] _k0 = new double[TLanes.Count];
    private readonly LaneBuffer<TLanes> _reflection = new();
    private readonly LaneBuffer<TLanes> _transmission = new();
    private ChannelLanes<TLanes> _channels = null!;
    private readonly LaneBuffer<TLanes> _parts = new();
    private int _harmonics, _absorbing, _only;
    private bool _isElectric;

    public SlabElement(SlabShape shape)
    {
        _slab = new UprightSlab(shape);
        _materials = [Section.Matrix, .. shape.Bodies.SelectMany(placed => (int[])[placed.Body.Material, placed.Body.CoreMaterial])];
        _materials = [.. _materials.Distinct()];
    }

    /// <inheritdoc/>
    public LaneBuffer<TLanes> ReflectTop => _reflection;

    /// <inheritdoc/>
    public LaneBuffer<TLanes> TransmitDown => _transmission;

    /// <inheritdoc/>
    public LaneBuffer<TLanes> TransmitUp => _transmission;

    /// <inheritdoc/>
    public LaneBuffer<TLanes> ReflectBottom => _reflection;

    /// <inheritdoc/>
    public bool Absorbs(PackLanes<TLanes> pack)
    {
        foreach (int material in _materials)
        {
            if (pack.Absorbs(material))
                return true;
        }
        return false;
    }

    /// <inheritdoc/>
    public void SetDirection(DirectionLanes<TLanes> direction, in Resolution resolution)
    {
        _channels = direction.Channels;
        _harmonics = resolution.Harmonics;
        PackLanes<TLanes> pack = _channels.Pack;
        int materials = _materials.Max() + 1;
        _light.Reserve(TLanes.Count, materials);
        for (int material = 0; material < materials; material++)
            ComplexLanes<TLanes>.Store(pack.Permittivity(material), ref _light.Permittivities[material * ComplexLanes<TLanes>.Stride]);
        TLanes.Store(pack.K0, ref _k0[0]);
        TLanes.Store(_channels.Kx(_channels.MostOrder), ref _kx0[0]);
        _light.Set(_k0, _kx0, _channels.PeriodNm);
        _reflection.Reserve(_channels.Orders * _channels.Orders);
        _transmission.Reserve(_channels.Orders * _channels.Orders);
    }

    /// <inheritdoc/>
    public TLanes Solve(RodField field)
    {
        PackLanes<TLanes> pack = _channels.Pack;
        (_isElectric, _absorbing, _only) = (field == RodField.Electric, 0, Section.Matrix);
        foreach (int material in _materials)
        {
            if (pack.Absorbs(material))
                (_only, _absorbing) = (material, _absorbing + 1);
        }
        int length = _channels.Orders * _channels.Orders * ComplexLanes<TLanes>.Stride;
        return _slab.Scatter<TLanes>(
            _light, _isElectric, _channels.MostOrder, _harmonics,
            MemoryMarshal.CreateSpan(ref _reflection.At(0), length), MemoryMarshal.CreateSpan(ref _transmission.At(0), length),
            keepsFields: _absorbing > 1);
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void AddLoss(LaneBuffer<TLanes> down, LaneBuffer<TLanes> up, LaneBuffer<TLanes> byMaterial)
    {
        TLanes total = PowerInto(down, up), zero = TLanes.Broadcast(0);
        if (_absorbing == 1)
        {
            byMaterial.SetReal(_only, byMaterial.Real(_only) + total);
            return;
        }
        // The parts from the fields inside, the whole from the balance.
        _parts.Reserve(_light.Materials);
        _parts.Clear(_light.Materials);
        _slab.AddLosses<TLanes>(_light, _isElectric, _channels.MostOrder, ref down.At(0), ref up.At(0), ref _parts.RealAt(0));
        TLanes sum = zero;
        foreach (int material in _materials)
            sum += _parts.Real(material);
        TLanes scale = TLanes.Select(TLanes.LessThan(zero, sum), total / sum, zero);
        foreach (int material in _materials)
            byMaterial.SetReal(material, byMaterial.Real(material) + scale * _parts.Real(material));
    }

    // Re(conj(phi) psi) through the upper plane less that through the lower one, which is the loss of Galerkin's method.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private TLanes PowerInto(LaneBuffer<TLanes> down, LaneBuffer<TLanes> up)
    {
        int orders = _channels.Orders;
        TLanes power = TLanes.Broadcast(0);
        for (int row = 0; row < orders; row++)
        {
            ComplexLanes<TLanes> above = ComplexLanes<TLanes>.Broadcast(0), below = above;
            for (int column = 0; column < orders; column++)
            {
                ComplexLanes<TLanes> reflect = _reflection[row * orders + column], transmit = _transmission[row * orders + column];
                above += reflect * down[column] + transmit * up[column];
                below += transmit * down[column] + reflect * up[column];
            }
            ComplexLanes<TLanes> eta = _channels.Eta(Section.Matrix, row);
            power += ((down[row] + above).Conjugate * (eta * (down[row] - above))).Real - ((below + up[row]).Conjugate * (eta * (below - up[row]))).Real;
        }
        return power;
    }
}
