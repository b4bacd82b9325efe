using BarbuleOptics.Grating.Joining;
using BarbuleOptics.Grating.Multipoles.Lanes;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Grating.Batches;

/// <summary>Solves a block of wavelengths in packs, at resolutions that a few of the wavelengths choose.</summary>
/// <remarks>
/// A group is up to <see cref="Group"/> wavelengths. <see cref="Probes"/> of them, from the first to the last, climb the ladder until the next finer
/// step changes none by more than the accuracy: that change is the error of the step before. The others, in cells of as many, take the first
/// step whose error at the probes around them, with a margin, is small enough. Groups, probes and cells do not depend on the width of the vectors.
/// </remarks>
internal sealed class BatchSolver<TLanes> : IBatchSolver
    where TLanes : struct, ILanes<TLanes>
{
    private const int Probes = ProbeErrors.Count;
    private const int Group = Probes * Probes;

    private readonly BatchPlan _plan;
    private readonly BatchLadder _ladder;
    private readonly PackSolver<TLanes> _solver;
    private readonly PackLanes<TLanes>[] _probePacks = MakePacks(Probes);
    private readonly List<PackLanes<TLanes>> _packs = [];
    private readonly ProbeErrors[] _errors;
    private readonly int[] _probes = new int[Probes];
    private readonly int[] _wavelengths = new int[TLanes.Count];
    private readonly double[][][] _climbed = [new double[BatchLadder.MostSteps][], new double[BatchLadder.MostSteps][]];
    private int _start;
    private object? _known, _probed;
    private (int First, int Count) _knownBlock, _probedBlock;

    public BatchSolver(BatchPlan plan)
    {
        (_plan, _ladder, _solver) = (plan, new BatchLadder(plan.Stack), new PackSolver<TLanes>(plan));
        _errors = [_ladder.NewErrors(), _ladder.NewErrors()];
    }

    /// <inheritdoc/>
    public void Solve(in BatchRequest request, Span<double> electric, Span<double> magnetic)
    {
        _start = _ladder.StartFor(request.Accuracy);
        bool same = ReferenceEquals(_known, request.Structure) && _knownBlock == (request.First, request.Count);
        (_known, _knownBlock) = (request.Structure, (request.First, request.Count));
        int length = request.Layout.Length;
        for (int first = 0; first < request.Count; first += Group)
        {
            int count = Math.Min(Group, request.Count - first);
            Span<double> e = electric.IsEmpty ? [] : electric.Slice(first * length, count * length);
            Span<double> m = magnetic.IsEmpty ? [] : magnetic.Slice(first * length, count * length);
            SolveGroup(request with { First = request.First + first, Count = count }, same, first / TLanes.Count, e, m);
        }
    }

    private void SolveGroup(in BatchRequest request, bool packsAreKnown, int firstPack, Span<double> electric, Span<double> magnetic)
    {
        int probes = Math.Min(Probes, request.Count);
        for (int i = 0; i < probes; i++)
            _probes[i] = request.First + (probes == 1 ? 0 : i * (request.Count - 1) / (probes - 1));
        bool areKnown = ReferenceEquals(_probed, request.Structure) && _probedBlock == (request.First, request.Count);
        (_probed, _probedBlock) = (request.Structure, (request.First, request.Count));
        int leastOrders = SetProbePacks(request, probes, areKnown);
        if (_ladder.At(_start + 2, leastOrders).Orders > BatchPlan.MostOrder || _ladder.LeastError > request.Accuracy)
        {
            Leave(electric, request.Layout.Length);
            Leave(magnetic, request.Layout.Length);
            return;
        }
        if (!electric.IsEmpty)
            ClimbProbes(request, RodField.Electric, probes, leastOrders);
        if (!magnetic.IsEmpty)
            ClimbProbes(request, RodField.Magnetic, probes, leastOrders);
        if (request.Count <= Probes)
        {
            DeliverProbes(request, RodField.Electric, electric);
            DeliverProbes(request, RodField.Magnetic, magnetic);
            return;
        }
        electric = LeaveWithoutProbes(electric, RodField.Electric, request.Layout.Length);
        magnetic = LeaveWithoutProbes(magnetic, RodField.Magnetic, request.Layout.Length);
        for (int cell = 0; cell < request.Count; cell += Probes)
            SolveCell(request, packsAreKnown, firstPack, cell, electric, magnetic);
    }

    // Where no probe could be solved nothing is tried between them.
    private Span<double> LeaveWithoutProbes(Span<double> outcomes, RodField field, int length)
    {
        ProbeErrors errors = _errors[(int)field];
        if (outcomes.IsEmpty || (errors.Steps > 0 && errors.Largest(errors.Steps - 1) > 0))
            return outcomes;
        Leave(outcomes, length);
        return [];
    }

    private static void Leave(Span<double> outcomes, int length)
    {
        for (int first = 0; first < outcomes.Length; first += length)
            outcomes[first + OutcomeLayout.Error] = double.NaN;
    }

    // Returns the largest order that travels.
    private int SetProbePacks(in BatchRequest request, int probes, bool areKnown)
    {
        int leastOrders = 0;
        for (int i = 0; i < probes; i++)
            leastOrders = Math.Max(leastOrders, BatchLadder.LeastOrders(request.Structure, _probes[i], request.Sine, _plan.PeriodNm));
        for (int first = 0; first < probes && !areKnown; first += TLanes.Count)
            _probePacks[first / TLanes.Count].Set(request.Structure, _probes.AsSpan(first, Math.Min(TLanes.Count, probes - first)));
        return leastOrders;
    }

    private void ClimbProbes(in BatchRequest request, RodField field, int probes, int leastOrders)
    {
        ProbeErrors errors = _errors[(int)field];
        errors.Start(_probes.AsSpan(0, probes));
        double[][] climbed = _climbed[(int)field];
        int length = request.Layout.Length;
        for (int step = 0; ; step++)
        {
            if (climbed[step] is null || climbed[step].Length < Probes * length)
                climbed[step] = new double[Probes * length];
            Resolution resolution = _ladder.At(_start + 2 * step, leastOrders);
            for (int first = 0; first < probes; first += TLanes.Count)
                _solver.Solve(_probePacks[first / TLanes.Count], request, resolution, field, climbed[step].AsSpan(first * length));
            if (step > 0)
                errors.Add(climbed[step - 1], climbed[step], length);
            bool suffices = step > 0 && (request.Count > Probes ? errors.LargestCarried(step - 1) : errors.Largest(step - 1)) <= request.Accuracy;
            if (suffices || !_ladder.HasNext(_start, step, leastOrders))
                return;
        }
    }

    // Each wavelength was a probe.
    private void DeliverProbes(in BatchRequest request, RodField field, Span<double> outcomes)
    {
        int length = request.Layout.Length;
        for (int at = 0; at < request.Count && !outcomes.IsEmpty; at++)
        {
            Span<double> outcome = outcomes.Slice(at * length, length);
            ProbeErrors errors = _errors[(int)field];
            int step = 0;
            while (step + 1 < errors.Steps && !(errors.At(step, at) <= request.Accuracy))
                step++;
            double error = errors.Steps == 0 ? double.NaN : errors.At(step, at);
            _climbed[(int)field][step].AsSpan(at * length, length).CopyTo(outcome);
            outcome[OutcomeLayout.Error] = error <= request.Accuracy ? error : double.NaN;
        }
    }

    private void SolveCell(in BatchRequest request, bool packsAreKnown, int firstPack, int cell, Span<double> electric, Span<double> magnetic)
    {
        int count = Math.Min(Probes, request.Count - cell), length = request.Layout.Length, leastOrders = 0;
        for (int i = 0; i < count; i++)
            leastOrders = Math.Max(leastOrders, BatchLadder.LeastOrders(request.Structure, request.First + cell + i, request.Sine, _plan.PeriodNm));
        int electricStep = electric.IsEmpty ? 0 : _errors[0].StepFor(request.First + cell, count, request.Accuracy);
        int magneticStep = magnetic.IsEmpty ? 0 : _errors[1].StepFor(request.First + cell, count, request.Accuracy);
        for (int first = cell; first < cell + count; first += TLanes.Count)
        {
            PackLanes<TLanes> pack = PackFor(firstPack + first / TLanes.Count, request, first, Math.Min(TLanes.Count, cell + count - first), packsAreKnown);
            if (!electric.IsEmpty)
                SolvePack(pack, request, electricStep, RodField.Electric, leastOrders, first, electric[(first * length)..]);
            if (!magnetic.IsEmpty)
                SolvePack(pack, request, magneticStep, RodField.Magnetic, leastOrders, first, magnetic[(first * length)..]);
        }
    }

    private void SolvePack(
        PackLanes<TLanes> pack, in BatchRequest request, int step, RodField field, int leastOrders, int first, Span<double> outcomes)
    {
        int length = request.Layout.Length;
        _solver.Solve(pack, request, _ladder.At(_start + 2 * step, leastOrders), field, outcomes);
        for (int lane = 0; lane < pack.Count; lane++)
        {
            double error = _errors[(int)field].Carried(step, request.First + first + lane);
            if (!(error <= request.Accuracy))
                error = double.NaN;
            outcomes[lane * length + OutcomeLayout.Error] += error;
        }
    }

    private PackLanes<TLanes> PackFor(int number, in BatchRequest request, int first, int count, bool isKnown)
    {
        while (_packs.Count <= number)
            _packs.Add(new PackLanes<TLanes>(_probePacks.Length + _packs.Count));
        PackLanes<TLanes> pack = _packs[number];
        if (isKnown)
            return pack;
        for (int i = 0; i < count; i++)
            _wavelengths[i] = request.First + first + i;
        pack.Set(request.Structure, _wavelengths.AsSpan(0, count));
        return pack;
    }

    private static PackLanes<TLanes>[] MakePacks(int wavelengths)
        => [.. Enumerable.Range(0, (wavelengths + TLanes.Count - 1) / TLanes.Count).Select(number => new PackLanes<TLanes>(number))];
}
