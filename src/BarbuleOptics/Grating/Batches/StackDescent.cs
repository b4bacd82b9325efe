using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;
using BarbuleOptics.Grating.Multipoles.Lanes;

namespace BarbuleOptics.Grating.Batches;

/// <summary>Takes the incident wave down through the steps of a stack: what leaves at the far end, and what each step loses.</summary>
/// <remarks>Slots of the stack hold -Z T of elements, Z of full interfaces and G of diagonal ones, all with G = -(what is reflected).</remarks>
internal sealed class StackDescent<TLanes>(StackLanes<TLanes> stack)
    where TLanes : struct, ILanes<TLanes>
{
    private readonly LaneBuffer<TLanes> _down = new();
    private readonly LaneBuffer<TLanes> _back = new();
    private readonly LaneBuffer<TLanes> _up = new();
    private readonly LaneBuffer<TLanes> _entered = new();
    private readonly LaneBuffer<TLanes> _work = new();
    private int _orders;
    private int _openLayer;

    /// <summary>Amplitudes that leave at the far end, by order.</summary>
    public LaneBuffer<TLanes> Leaving => _down;

    /// <summary>Power lost by material, in units of Re(conj(phi) psi); the last is that of a coherent backing.</summary>
    public LaneBuffer<TLanes> Lost { get; } = new();

    /// <summary>Goes down.</summary>
    /// <param name="findsLoss">Whether losses are asked for.</param>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void Run(bool findsLoss)
    {
        _orders = stack.Channels.Orders;
        int materials = stack.Plan.Stack.Section.Materials.Count + 1;
        foreach (LaneBuffer<TLanes> buffer in (ReadOnlySpan<LaneBuffer<TLanes>>)[_down, _back, _up, _entered, _work])
            buffer.Reserve(_orders);
        Lost.Reserve(materials);
        Lost.Clear((materials + 1) / 2);
        _openLayer = -1;
        EnterAtTop();
        for (int step = 1; step < stack.Plan.Steps.Length; step++)
            Pass(step, findsLoss);
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void EnterAtTop()
    {
        ref readonly BatchStep what = ref stack.Plan.Steps[0];
        LaneBuffer<TLanes> back = stack.Slot(0);
        ComplexLanes<TLanes> one = ComplexLanes<TLanes>.Broadcast(1);
        for (int place = 0; place < _orders; place++)
            _down[place] = -(stack.Bounce(what, place) * back[place]);
        int incident = stack.Channels.MostOrder;
        _down[incident] += one + stack.Bounce(what, incident);
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void Pass(int step, bool findsLoss)
    {
        ref readonly BatchStep what = ref stack.Plan.Steps[step];
        switch (what.Kind)
        {
            case BatchStepKind.Layer:
                PassLayer(what, findsLoss);
                return;
            case BatchStepKind.Interface:
                PassInterface(what, step);
                break;
            default:
                PassElement(what, step, findsLoss);
                break;
        }
        if (_openLayer >= 0)
            AddLayerLoss();
        _openLayer = -1;
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void PassLayer(in BatchStep what, bool findsLoss)
    {
        int first = what.Number * _orders;
        if (findsLoss && stack.Channels.Pack.Absorbs(what.Medium))
        {
            _openLayer = what.Number;
            // Counted from the place below the layer, as what comes back there.
            for (int place = 0; place < _orders; place++)
                _entered[place] = stack.Plan.Phase<TLanes>(what.Number, place - stack.Channels.MostOrder) * _down[place];
        }
        for (int place = 0; place < _orders; place++)
            _down[place] = stack.DownFactors[first + place] * _down[place];
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void PassInterface(in BatchStep what, int step)
    {
        ComplexLanes<TLanes> one = ComplexLanes<TLanes>.Broadcast(1);
        LaneBuffer<TLanes> slot = stack.Slot(step);
        bool isDiagonal = stack.IsDiagonalBelow[step];
        for (int place = 0; place < _orders; place++)
            _work[place] = (one + stack.Bounce(what, place)) * _down[place];
        if (isDiagonal)
        {
            for (int place = 0; place < _orders; place++)
                _back[place] = slot[place] * (one - stack.Bounce(what, place) * slot[place]).Reciprocal() * _work[place];
        }
        else
        {
            LaneAlgebra<TLanes>.Apply(_back, slot, _work, _orders);
        }
        for (int place = 0; place < _orders; place++)
        {
            ComplexLanes<TLanes> bounce = stack.Bounce(what, place), back = -_back[place];
            _up[place] = bounce * _down[place] + (one - bounce) * back;
            _down[place] = _work[place] - bounce * back;
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void PassElement(in BatchStep what, int step, bool findsLoss)
    {
        IBatchElement<TLanes> element = stack.Elements[what.Number];
        LaneAlgebra<TLanes>.Apply(_back, stack.Slot(step), _down, _orders);
        for (int place = 0; place < _orders; place++)
            _back[place] = -_back[place];
        if (findsLoss && element.Absorbs(stack.Channels.Pack))
            element.AddLoss(_down, _back, Lost);
        if (_openLayer >= 0)
        {
            LaneAlgebra<TLanes>.Apply(_up, element.ReflectTop, _down, _orders);
            LaneAlgebra<TLanes>.Apply(_work, element.TransmitUp, _back, _orders);
            for (int place = 0; place < _orders; place++)
                _up[place] += _work[place];
        }
        LaneAlgebra<TLanes>.Apply(_work, element.TransmitDown, _down, _orders);
        LaneAlgebra<TLanes>.Apply(_down, element.ReflectBottom, _back, _orders);
        for (int place = 0; place < _orders; place++)
            _down[place] += _work[place];
    }

    // The closed form of LayerLoss.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void AddLayerLoss()
    {
        (int medium, double thicknessNm, _) = stack.Plan.Layers[_openLayer];
        ChannelLanes<TLanes> channels = stack.Channels;
        ComplexLanes<TLanes> permittivity = channels.Pack.Permittivity(medium);
        TLanes k0 = channels.Pack.K0, thickness = TLanes.Broadcast(thicknessNm), one = TLanes.Broadcast(1), least = TLanes.Broadcast(1e-3);
        bool isMagnetic = channels.Field == RodField.Magnetic;
        TLanes total = TLanes.Broadcast(0), inverse = one / (k0 * k0 * permittivity.Norm);
        for (int place = 0; place < _orders; place++)
        {
            ComplexLanes<TLanes> kz = channels.Kz(medium, place), first = _entered[place], second = _up[place];
            TLanes turn = TLanes.Max(thickness * TLanes.Abs(kz.Real), TLanes.Broadcast(1e-30)), decay = thickness * kz.Imaginary;
            TLanes kept = TLanes.Exp(-decay), twice = TLanes.Max(decay + decay, least);
            TLanes near = one - decay + decay * decay * (TLanes.Broadcast(2.0 / 3) - decay * TLanes.Broadcast(1.0 / 3));
            TLanes direct = thickness * TLanes.Select(TLanes.LessThan(decay + decay, least), near, (one - kept * kept) / twice);
            TLanes cross = kept * thickness * TLanes.SinCos(turn).Sine / turn;
            TLanes size = first.Norm + second.Norm, product = TLanes.Broadcast(2) * (first.Conjugate * second).Real;
            TLanes phi = size * direct + product * cross;
            if (isMagnetic)
            {
                TLanes kx = channels.Kx(place), psi = channels.Eta(medium, place).Norm * (size * direct - product * cross);
                phi = kx * kx * inverse * phi + psi;
            }
            total += phi;
        }
        // The backing, the only layer that is none of the section's materials, has the last place.
        int material = Math.Min(medium, stack.Plan.Stack.Section.Materials.Count);
        Lost.SetReal(material, Lost.Real(material) + k0 * permittivity.Imaginary * total);
    }
}
