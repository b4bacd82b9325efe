using System.Runtime.CompilerServices;
using BarbuleOptics.Grating.Joining;
using BarbuleOptics.Grating.Multipoles.Lanes;
using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Batches;

/// <summary>A row of round rods, one a cell, as an element of a batch.</summary>
internal sealed class RowElement<TLanes> : IBatchElement<TLanes>
    where TLanes : struct, ILanes<TLanes>
{
    /// <summary>Least |pivot|^2 of that of its element: what is lost are as many digits.</summary>
    private const double LeastPivot = 1e-10;

    private readonly CellRod _kind;
    private readonly List<RodLanes<TLanes>> _rods = [];
    private readonly RowLanes<TLanes> _row;
    private DirectionLanes<TLanes> _direction = null!;

    public RowElement(RodKind kind)
    {
        _kind = kind.Rods[0];
        _row = new RowLanes<TLanes>(_kind.Outer.HalfHeightNm, kind.PeriodNm);
    }

    /// <inheritdoc/>
    public LaneBuffer<TLanes> ReflectTop => _row.Reflect;

    /// <inheritdoc/>
    public LaneBuffer<TLanes> TransmitDown => _row.Transmit;

    /// <inheritdoc/>
    public LaneBuffer<TLanes> TransmitUp => _row.Transmit;

    /// <inheritdoc/>
    public LaneBuffer<TLanes> ReflectBottom => _row.Reflect;

    /// <inheritdoc/>
    public bool Absorbs(PackLanes<TLanes> pack)
        => pack.Absorbs(_kind.Material) || pack.Absorbs(Section.Matrix) || (_kind.Core is not null && pack.Absorbs(_kind.CoreMaterial));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void SetDirection(DirectionLanes<TLanes> direction, in Resolution resolution)
    {
        _direction = direction;
        // Answers of rods know no direction: each pack's are kept for the next one.
        PackLanes<TLanes> pack = direction.Channels.Pack;
        while (_rods.Count <= pack.Number)
            _rods.Add(new RodLanes<TLanes>(_kind.Outer.HalfHeightNm, _kind.Core?.HalfHeightNm ?? 0, _kind.Material, _kind.CoreMaterial));
        _rods[pack.Number].Prepare(pack, resolution.Multipoles, direction.Tables);
        _row.SetDirection(_rods[pack.Number], direction.Channels, direction.Sums(2 * resolution.Multipoles), resolution.Multipoles);
    }

    /// <inheritdoc/>
    public TLanes Solve(RodField field)
    {
        _row.Solve(field);
        return TLanes.LessThan(_row.LeastPivot, TLanes.Broadcast(LeastPivot));
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void AddLoss(LaneBuffer<TLanes> down, LaneBuffer<TLanes> up, LaneBuffer<TLanes> byMaterial)
    {
        PackLanes<TLanes> pack = _direction.Channels.Pack;
        TLanes zero = TLanes.Broadcast(0), scale = TLanes.Broadcast(1) / (pack.K0 * TLanes.Broadcast(_row.PeriodNm));
        (TLanes rod, TLanes core) = _row.PowerInto(down, up);
        (rod, core) = (scale * rod, scale * core);
        TLanes all = rod;
        if (_kind.Core is not null)
        {
            TLanes absorbs = TLanes.LessThan(zero, pack.Permittivity(_kind.CoreMaterial).Imaginary);
            core = TLanes.Select(absorbs, core, zero);
            rod -= core;
            byMaterial.SetReal(_kind.CoreMaterial, byMaterial.Real(_kind.CoreMaterial) + core);
        }
        TLanes lost = TLanes.Select(TLanes.LessThan(zero, pack.Permittivity(_kind.Material).Imaginary), rod, zero);
        byMaterial.SetReal(_kind.Material, byMaterial.Real(_kind.Material) + lost);
        // Green's identity: what enters through the planes and not into the rods is lost between them.
        TLanes absorbing = TLanes.LessThan(zero, pack.Permittivity(Section.Matrix).Imaginary);
        if (TLanes.Any(absorbing))
        {
            TLanes between = TLanes.Select(absorbing, IntoPlanes(down, up) - all, zero);
            byMaterial.SetReal(Section.Matrix, byMaterial.Real(Section.Matrix) + between);
        }
    }

    // Re(conj(phi) psi) through the upper plane less that through the lower one.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private TLanes IntoPlanes(LaneBuffer<TLanes> down, LaneBuffer<TLanes> up)
    {
        ChannelLanes<TLanes> channels = _direction.Channels;
        TLanes power = TLanes.Broadcast(0);
        for (int row = 0; row < channels.Orders; row++)
        {
            ComplexLanes<TLanes> above = ComplexLanes<TLanes>.Broadcast(0), below = above;
            for (int column = 0; column < channels.Orders; column++)
            {
                ComplexLanes<TLanes> reflect = ReflectTop[row * channels.Orders + column], transmit = TransmitDown[row * channels.Orders + column];
                above += reflect * down[column] + transmit * up[column];
                below += transmit * down[column] + reflect * up[column];
            }
            ComplexLanes<TLanes> eta = channels.Eta(Section.Matrix, row);
            power += ((down[row] + above).Conjugate * (eta * (down[row] - above))).Real - ((below + up[row]).Conjugate * (eta * (below - up[row]))).Real;
        }
        return power;
    }
}
