using System.Runtime.CompilerServices;
using BarbuleOptics.Grating.Joining;
using BarbuleOptics.Grating.Multipoles.Lanes;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Grating.Batches;

/// <summary>All powers for a pack of wavelengths at one direction, field and resolution.</summary>
internal sealed class PackSolver<TLanes>(BatchPlan plan)
    where TLanes : struct, ILanes<TLanes>
{
    private readonly StackLanes<TLanes> _stack = new(plan);
    private readonly LaneBuffer<TLanes> _powers = new();
    private readonly double[] _lost = new double[plan.Stack.Section.Materials.Count + 1];

    /// <summary>Fills the answers of the lanes in use, one after another; NaN is the error of those that are not to be trusted, 0 that of others.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void Solve(PackLanes<TLanes> pack, in BatchRequest request, in Resolution resolution, RodField field, Span<double> outcomes)
    {
        bool descends = request.FindsTransmitted || request.FindsLost;
        _stack.Prepare(pack, request.Sine, request.Cosine, resolution);
        _stack.Climb(field, descends);
        int orders = _stack.Channels.Orders;
        _powers.Reserve(orders + 1);
        SetPowers(_stack.Reflected, plan.Stack.Surround, 0);
        if (descends)
        {
            _stack.Descent.Run(request.FindsLost);
            SetPowers(_stack.Descent.Leaving, plan.Stack.Section.Back is null ? plan.Stack.Backing : plan.Stack.Behind, orders);
        }
        // The failed lanes behind the powers.
        _powers.SetReal(2 * orders, _stack.Failed);
        for (int lane = 0; lane < pack.Count; lane++)
            Deliver(request, lane, outcomes.Slice(lane * request.Layout.Length, request.Layout.Length));
    }

    // Re(eta)|phi|^2 in proportion to the incident wave, by order.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void SetPowers(LaneBuffer<TLanes> amplitudes, int medium, int first)
    {
        ChannelLanes<TLanes> channels = _stack.Channels;
        TLanes scale = TLanes.Broadcast(1) / channels.Eta(plan.Stack.Surround, channels.MostOrder).Real;
        for (int place = 0; place < channels.Orders; place++)
            _powers.SetReal(first + place, scale * channels.Eta(medium, place).Real * amplitudes[place].Norm);
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void Deliver(in BatchRequest request, int lane, Span<double> outcome)
    {
        outcome.Clear();
        int orders = _stack.Channels.Orders, most = _stack.Channels.MostOrder;
        for (int place = 0; place < orders; place++)
        {
            if (Power(place, lane) is double reflected and > 0)
                request.Layout.AddReflected(outcome, place - most, reflected);
            if (request.FindsTransmitted && Power(orders + place, lane) is double transmitted and > 0)
                request.Layout.AddTransmitted(outcome, place - most, transmitted);
        }
        if (request.FindsLost)
        {
            for (int material = 0; material < _lost.Length; material++)
                _lost[material] = Unsafe.Add(ref _stack.Descent.Lost.RealAt(material), lane);
            request.Layout.AddLost(outcome, _lost, Unsafe.Add(ref _stack.Channels.EtaAt(plan.Stack.Surround, most), lane));
        }
        bool failed = BitConverter.DoubleToInt64Bits(Power(2 * orders, lane)) != 0 || !double.IsFinite(Power(most, lane));
        for (int i = 0; i < OutcomeLayout.Judged; i++)
            failed |= !double.IsFinite(outcome[i]);
        outcome[OutcomeLayout.Error] = failed ? double.NaN : 0;
    }

    private double Power(int place, int lane) => Unsafe.Add(ref _powers.RealAt(place), lane);
}
