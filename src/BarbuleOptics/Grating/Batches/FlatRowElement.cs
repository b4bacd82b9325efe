using BarbuleOptics.Grating.Joining;
using BarbuleOptics.Grating.Multipoles;
using BarbuleOptics.Grating.Multipoles.Lanes;
using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Batches;

/// <summary>A row of flattened rods, one a cell, as an element of a batch.</summary>
/// <remarks>Where the matrix absorbs, or the rod and its core both do, losses need the fields in the rod: those lanes are left to the scalar code.</remarks>
internal sealed class FlatRowElement<TLanes> : IBatchElement<TLanes>
    where TLanes : struct, ILanes<TLanes>
{
    /// <summary>Least |pivot|^2, of elements near one.</summary>
    private const double LeastPivot = 1e-10;

    private readonly CellRod _kind;
    private readonly double _periodNm;
    private readonly List<FlatRodLanes<TLanes>> _rods = [];
    private readonly RowLanes<TLanes> _row;
    private readonly EllipseLanes?[] _ellipses = new EllipseLanes?[FlatRodLanes<TLanes>.MostMultipoles];
    private readonly Func<int, EllipseLanes> _ellipse;
    private PackLanes<TLanes> _pack = null!;
    private bool _stands;

    public FlatRowElement(RodKind kind)
    {
        _kind = kind.Rods[0];
        _periodNm = kind.PeriodNm;
        _row = new RowLanes<TLanes>(Math.Max(_kind.Outer.HalfWidthNm, _kind.Outer.HalfHeightNm), kind.PeriodNm);
        _ellipse = step => _ellipses[step] ??= new EllipseLanes(Outline(_kind.Outer), Core);
    }

    /// <inheritdoc/>
    public LaneBuffer<TLanes> ReflectTop => _row.Reflect;

    /// <inheritdoc/>
    public LaneBuffer<TLanes> TransmitDown => _row.Transmit;

    /// <inheritdoc/>
    public LaneBuffer<TLanes> TransmitUp => _row.Transmit;

    /// <inheritdoc/>
    public LaneBuffer<TLanes> ReflectBottom => _row.Reflect;

    private EllipseOutline Core => _kind.Core is Outline core ? Outline(core) : default;

    /// <inheritdoc/>
    public bool Absorbs(PackLanes<TLanes> pack) => pack.Absorbs(_kind.Material) || (_kind.Core is not null && pack.Absorbs(_kind.CoreMaterial));

    /// <inheritdoc/>
    public void SetDirection(DirectionLanes<TLanes> direction, in Resolution resolution)
    {
        ChannelLanes<TLanes> channels = direction.Channels;
        _pack = channels.Pack;
        while (_rods.Count <= _pack.Number)
            _rods.Add(new FlatRodLanes<TLanes>(Outline(_kind.Outer), Core, _kind.Material, _kind.CoreMaterial));
        FlatRodLanes<TLanes> rod = _rods[_pack.Number];
        double fastest = Math.Max(channels.LargestKx(0), channels.LargestKx(channels.Orders - 1));
        int needed = FlatRodLanes<TLanes>.MultipolesFor(fastest, rod.RadiusNm);
        int top = Math.Min(FlatRodLanes<TLanes>.MostMultipoles, Math.Max(needed, resolution.Multipoles));
        // An order too fast for the multipoles there are would be left out unseen.
        _stands = needed <= FlatRodLanes<TLanes>.MostMultipoles && rod.TryPrepare(_pack, top, _ellipse);
        if (_stands)
            _row.SetDirection(rod, channels, direction.Sums(2 * top), top);
        else
            _row.Clear(channels.Orders);
    }

    /// <inheritdoc/>
    public TLanes Solve(RodField field)
    {
        TLanes all = TLanes.LessThan(TLanes.Broadcast(0), TLanes.Broadcast(1));
        if (!_stands)
            return all;
        _row.Solve(field);
        TLanes unsafeFields = _rods[_pack.Number].NeedsFields(_pack);
        return TLanes.Select(unsafeFields, all, TLanes.LessThan(_row.LeastPivot, TLanes.Broadcast(LeastPivot)));
    }

    /// <inheritdoc/>
    public void AddLoss(LaneBuffer<TLanes> down, LaneBuffer<TLanes> up, LaneBuffer<TLanes> byMaterial)
    {
        if (!_stands)
            return;
        TLanes zero = TLanes.Broadcast(0), scale = TLanes.Broadcast(1) / (_pack.K0 * TLanes.Broadcast(_periodNm));
        TLanes lost = scale * _row.PowerInto(down, up).Rod;
        Add(_kind.Material);
        if (_kind.Core is not null)
            Add(_kind.CoreMaterial);

        void Add(int material)
        {
            TLanes own = TLanes.Select(TLanes.LessThan(zero, _pack.Permittivity(material).Imaginary), lost, zero);
            byMaterial.SetReal(material, byMaterial.Real(material) + own);
        }
    }

    private static EllipseOutline Outline(Outline outline) => new(outline.HalfWidthNm, outline.HalfHeightNm);
}
