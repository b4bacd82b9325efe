using System.Runtime.CompilerServices;
using BarbuleOptics.Grating.Joining;
using BarbuleOptics.Grating.Multipoles.Lanes;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Grating.Batches;

/// <summary>Joins the steps of a plan for a pack of wavelengths at one direction, without a wave vector along the rods.</summary>
/// <remarks>
/// The recursion of <see cref="StackSolver"/> with G = -(what the far side reflects): through an element Z = (1 + G R)^-1 G and
/// G' = -R + T' Z T, through an interface Z = (1 - G r)^-1 G and G' = -r + (1 - r) Z (1 + r). Elimination exchanges no rows, which
/// suits all lanes alike; small pivots are told by <see cref="Failed"/>. No factor grows.
/// Of the uppermost interface only the column of the incident wave is found.
/// </remarks>
internal sealed class StackLanes<TLanes>
    where TLanes : struct, ILanes<TLanes>
{
    /// <summary>Least |pivot|^2 of the joining, of elements near one.</summary>
    private const double LeastPivot = 1e-8;

    /// <summary>Least |kz|^2/|k|^2 in the matrix, where lattice sums keep eleven digits.</summary>
    private const double LeastDepthInMatrix = 1e-4;

    /// <summary>Least |kz|^2/k0^2 in the other media.</summary>
    private const double LeastDepth = 1e-10;

    private readonly BatchPlan _plan;
    private readonly IBatchElement<TLanes>[] _elements;
    private readonly DirectionLanes<TLanes> _direction = new();
    private readonly LaneBuffer<TLanes> _upFactors = new();
    private readonly LaneBuffer<TLanes> _downFactors = new();
    private readonly LaneBuffer<TLanes> _far = new();
    private readonly LaneBuffer<TLanes> _round = new();
    private readonly LaneBuffer<TLanes> _work = new();
    private readonly LaneBuffer<TLanes> _bounce = new();
    private readonly LaneBuffer<TLanes> _column = new();
    private readonly LaneBuffer<TLanes>[] _slots;
    private readonly StackDescent<TLanes> _descent;
    private (PackLanes<TLanes>? Pack, int Version, double Sine, Resolution Resolution) _set;
    private bool _isDiagonal;
    private bool _isDark;
    private int _orders;

    public StackLanes(BatchPlan plan)
    {
        _plan = plan;
        _elements = [.. plan.Stack.Kinds.Select(kind => BatchElements.Create<TLanes>(kind))];
        _slots = [.. plan.Steps.Select(_ => new LaneBuffer<TLanes>())];
        _descent = new StackDescent<TLanes>(this);
    }

    /// <summary>The plan.</summary>
    public BatchPlan Plan => _plan;

    /// <summary>The plane waves.</summary>
    public ChannelLanes<TLanes> Channels => _direction.Channels;

    /// <summary>The elements, by kind.</summary>
    public ReadOnlySpan<IBatchElement<TLanes>> Elements => _elements;

    /// <summary>exp(i kz d) of each layer and order with the phase of the move along the surface, for what goes down.</summary>
    public LaneBuffer<TLanes> DownFactors => _downFactors;

    /// <summary>What the whole stack reflects, by order, from the incident wave.</summary>
    public LaneBuffer<TLanes> Reflected { get; } = new();

    /// <summary>Whether the fields were kept for the way down: Z of full interfaces, Z T of elements, -G of diagonal interfaces.</summary>
    public LaneBuffer<TLanes> Slot(int step) => _slots[step];

    /// <summary>Whether what lies below a step is diagonal.</summary>
    public bool[] IsDiagonalBelow { get; private set; } = [];

    /// <summary>Mask of the lanes whose answer is not to be trusted.</summary>
    public TLanes Failed { get; private set; }

    /// <summary>The way down, valid after <see cref="Climb"/> with fields kept.</summary>
    public StackDescent<TLanes> Descent => _descent;

    /// <summary>Prepares one direction; what is known of the pack, the direction and the resolution stays.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void Prepare(PackLanes<TLanes> pack, double sine, double cosine, in Resolution resolution)
    {
        if (ReferenceEquals(_set.Pack, pack) && (_set.Version, _set.Sine, _set.Resolution) == (pack.Version, sine, resolution))
            return;
        bool sameSums = ReferenceEquals(_set.Pack, pack) && _set.Version == pack.Version && _set.Sine == sine;
        _set = (pack, pack.Version, sine, resolution);
        _direction.Set(pack, sine, cosine, _plan.PeriodNm, resolution.Orders, _plan.Stack.MediumCount, sameSums);
        _orders = Channels.Orders;
        Reserve();
        SetFactors();
        foreach (IBatchElement<TLanes> element in _elements)
            element.SetDirection(_direction, resolution);
    }

    /// <summary>Finds what the stack reflects of one field.</summary>
    /// <param name="field">The field along the rods.</param>
    /// <param name="keepsFields">Whether a way down will follow.</param>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void Climb(RodField field, bool keepsFields)
    {
        Channels.SetField(field);
        TLanes failed = TLanes.LessThan(Channels.LeastDepth, TLanes.Broadcast(LeastDepth));
        failed = Or(failed, TLanes.LessThan(_direction.LeastDepth, TLanes.Broadcast(LeastDepthInMatrix)));
        foreach (IBatchElement<TLanes> element in _elements)
            failed = Or(failed, element.Solve(field));
        Failed = failed;
        (_isDiagonal, _isDark) = (true, true);
        _far.Clear(_orders);
        for (int step = _plan.Steps.Length - 1; step > 0; step--)
            ClimbStep(step, keepsFields);
        FinishAtTop();
    }

    private static TLanes Or(TLanes mask, TLanes other) => TLanes.Select(mask, mask, other);

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void Reserve()
    {
        int square = _orders * _orders;
        _far.Reserve(square);
        _round.Reserve(square);
        _work.Reserve(square);
        _bounce.Reserve(_orders);
        _column.Reserve(_orders);
        Reflected.Reserve(_orders);
        _upFactors.Reserve(_orders * _plan.Layers.Length);
        _downFactors.Reserve(_orders * _plan.Layers.Length);
        if (IsDiagonalBelow.Length == 0)
            IsDiagonalBelow = new bool[_plan.Steps.Length];
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void SetFactors()
    {
        for (int layer = 0; layer < _plan.Layers.Length; layer++)
        {
            (int medium, double thicknessNm, _) = _plan.Layers[layer];
            for (int place = 0; place < _orders; place++)
            {
                ComplexLanes<TLanes> factor = (TLanes.Broadcast(thicknessNm) * Channels.Kz(medium, place)).ExpI();
                ComplexLanes<TLanes> phase = _plan.Phase<TLanes>(layer, place - Channels.MostOrder);
                _downFactors[layer * _orders + place] = factor * phase;
                _upFactors[layer * _orders + place] = factor * phase.Conjugate;
            }
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void ClimbStep(int step, bool keepsFields)
    {
        ref readonly BatchStep what = ref _plan.Steps[step];
        IsDiagonalBelow[step] = _isDiagonal;
        switch (what.Kind)
        {
            case BatchStepKind.Layer:
                ClimbLayer(what.Number * _orders);
                break;
            case BatchStepKind.Interface:
                SetBounces(what);
                ClimbInterface(keepsFields ? _slots[step] : null);
                break;
            default:
                ClimbElement(_elements[what.Number], keepsFields ? _slots[step] : null);
                break;
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void ClimbLayer(int first)
    {
        if (_isDark)
            return;
        if (_isDiagonal)
        {
            for (int place = 0; place < _orders; place++)
                _far[place] = _far[place] * (_upFactors[first + place] * _downFactors[first + place]);
            return;
        }
        for (int row = 0; row < _orders; row++)
        {
            ComplexLanes<TLanes> up = _upFactors[first + row];
            for (int column = 0; column < _orders; column++)
                _far[row * _orders + column] = up * _far[row * _orders + column] * _downFactors[first + column];
        }
    }

    /// <summary>(near - far)/(near + far) of the admittances at an interface.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ComplexLanes<TLanes> Bounce(in BatchStep what, int place)
    {
        ComplexLanes<TLanes> near = Channels.Eta(what.Medium, place), far = Channels.Eta(what.Below, place);
        return (near - far) * (near + far).Reciprocal();
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void SetBounces(in BatchStep what)
    {
        for (int place = 0; place < _orders; place++)
            _bounce[place] = Bounce(what, place);
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void ClimbInterface(LaneBuffer<TLanes>? slot)
    {
        ComplexLanes<TLanes> one = ComplexLanes<TLanes>.Broadcast(1);
        if (_isDiagonal)
        {
            slot?.Reserve(_orders * _orders);
            slot?.CopyFrom(_far, _orders);
            TLanes bounced = TLanes.Broadcast(0);
            for (int place = 0; place < _orders; place++)
            {
                ComplexLanes<TLanes> bounce = _bounce[place], far = _far[place];
                _far[place] = (far - bounce) * (one - bounce * far).Reciprocal();
                bounced += bounce.Norm;
            }
            // Below a backing of the matrix' index nothing comes back.
            _isDark &= !TLanes.Any(TLanes.LessThan(TLanes.Broadcast(0), bounced));
            return;
        }
        SetRoundAtInterface();
        Watch(LaneAlgebra<TLanes>.Solve(_round, _orders, _far, _orders));
        slot?.Reserve(_orders * _orders);
        slot?.CopyFrom(_far, _orders * _orders);
        for (int row = 0; row < _orders; row++)
        {
            ComplexLanes<TLanes> outward = one - _bounce[row];
            for (int column = 0; column < _orders; column++)
                _far[row * _orders + column] = outward * _far[row * _orders + column] * (one + _bounce[column]);
            _far[row * _orders + row] -= _bounce[row];
        }
    }

    // 1 - G r.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void SetRoundAtInterface()
    {
        for (int row = 0; row < _orders; row++)
        {
            for (int column = 0; column < _orders; column++)
                _round[row * _orders + column] = -(_far[row * _orders + column] * _bounce[column]);
            _round[row * _orders + row] += ComplexLanes<TLanes>.Broadcast(1);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void ClimbElement(IBatchElement<TLanes> element, LaneBuffer<TLanes>? slot)
    {
        if (_isDark)
        {
            PassDark(element, slot);
            return;
        }
        if (_isDiagonal)
            MakeFull();
        ComplexLanes<TLanes> one = ComplexLanes<TLanes>.Broadcast(1);
        _round.Clear(_orders * _orders);
        for (int row = 0; row < _orders; row++)
            _round[row * _orders + row] = one;
        LaneAlgebra<TLanes>.AddProduct(_round, _far, element.ReflectBottom, _orders);
        Watch(LaneAlgebra<TLanes>.Solve(_round, _orders, _far, _orders));
        LaneBuffer<TLanes> passed = slot ?? _work;
        passed.Reserve(_orders * _orders);
        LaneAlgebra<TLanes>.Multiply(passed, _far, element.TransmitDown, _orders);
        LaneBuffer<TLanes> own = element.ReflectTop;
        for (int i = 0; i < _orders * _orders; i++)
            _far[i] = -own[i];
        LaneAlgebra<TLanes>.AddProduct(_far, element.TransmitUp, passed, _orders);
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void PassDark(IBatchElement<TLanes> element, LaneBuffer<TLanes>? slot)
    {
        (_isDiagonal, _isDark) = (false, false);
        slot?.Reserve(_orders * _orders);
        slot?.Clear(_orders * _orders);
        for (int i = 0; i < _orders * _orders; i++)
            _far[i] = -element.ReflectTop[i];
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void MakeFull()
    {
        _isDiagonal = false;
        for (int row = _orders - 1; row >= 0; row--)
        {
            ComplexLanes<TLanes> value = _far[row];
            for (int column = 0; column < _orders; column++)
                _work[row * _orders + column] = ComplexLanes<TLanes>.Broadcast(0);
            _work[row * _orders + row] = value;
        }
        _far.CopyFrom(_work, _orders * _orders);
    }

    // Leaves Z (1 + r) of the incident wave in the first slot.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void FinishAtTop()
    {
        ref readonly BatchStep what = ref _plan.Steps[0];
        SetBounces(what);
        IsDiagonalBelow[0] = _isDiagonal;
        ComplexLanes<TLanes> one = ComplexLanes<TLanes>.Broadcast(1);
        int incident = Channels.MostOrder;
        for (int place = 0; place < _orders; place++)
            _column[place] = _isDiagonal ? ComplexLanes<TLanes>.Broadcast(0) : -_far[place * _orders + incident];
        if (_isDiagonal)
        {
            _column[incident] = -_far[incident] * (one - _bounce[incident] * _far[incident]).Reciprocal();
        }
        else
        {
            SetRoundAtInterface();
            Watch(LaneAlgebra<TLanes>.Solve(_round, _orders, _column, 1));
        }
        LaneBuffer<TLanes> back = _slots[0];
        back.Reserve(_orders);
        for (int place = 0; place < _orders; place++)
        {
            back[place] = (one + _bounce[incident]) * _column[place];
            Reflected[place] = (one - _bounce[place]) * back[place];
        }
        Reflected[incident] += _bounce[incident];
    }

    private void Watch(TLanes leastPivot) => Failed = Or(Failed, TLanes.LessThan(leastPivot, TLanes.Broadcast(LeastPivot)));
}
