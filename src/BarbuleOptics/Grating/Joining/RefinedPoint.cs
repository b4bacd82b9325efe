using System.Numerics;

namespace BarbuleOptics.Grating.Joining;

/// <summary>Solves at rising resolutions until the answers agree, and tells how far they may still be off.</summary>
/// <remarks>With d the largest change of R, diffracted R, T and A in the last step and rho the ratio by which changes fall from step
/// to step there, what all further steps would change is d rho/(1 - rho); rho is measured at neighboring wavelengths by going one
/// step further than needed.</remarks>
internal sealed class RefinedPoint(StackPlan plan)
{
    /// <summary>Factor on the estimate that covers changes which happen to be small.</summary>
    private const double Safety = 1.3;

    /// <summary>The same for slabs, whose errors fall slowly and unevenly.</summary>
    private const double SlabSafety = 2.0;

    /// <summary>No larger fall of the change from one step to the next is believed.</summary>
    private const double LeastFall = 0.01;

    /// <summary>The same for slabs.</summary>
    private const double LeastSlabFall = 0.3;

    /// <summary>Part of the accuracy that the mesh in depth may take.</summary>
    private const double DepthShare = 0.2;

    /// <summary>Factor on the change that a finer mesh in depth made.</summary>
    private const double DepthSafety = 1.5;

    /// <summary>Wavelengths between those that are solved a step further than needed.</summary>
    private const int ProbeEvery = 8;

    /// <summary>No estimate is smaller: rounding.</summary>
    private const double Rounding = 1e-12;

    /// <summary>No mesh in depth was chosen yet; any wavelength is shorter than the one it was chosen at.</summary>
    private static readonly (int Depth, double Error, double WavelengthNm) NoDepth = (-1, 0, double.PositiveInfinity);

    private readonly PointSolver _point = new(plan);
    private readonly ResolutionLadder _ladder = new(plan);
    private readonly RefinementMemory[] _memories = [MemoryFor(plan), MemoryFor(plan), MemoryFor(plan)];
    private readonly (int Depth, double Error, double WavelengthNm)[] _depths = [NoDepth, NoDepth, NoDepth];
    private double[][] _current = [[], []];
    private double[][] _previous = [[], []];

    /// <summary>The plan.</summary>
    public StackPlan Plan => plan;

    /// <summary>Forgets what neighboring wavelengths taught, so that answers do not depend on what was solved before.</summary>
    public void StartBlock()
    {
        foreach (RefinementMemory memory in _memories)
            memory.Clear();
        Array.Fill(_depths, NoDepth);
    }

    /// <summary>Solves for light of one polarization, or of both where the rods couple them.</summary>
    /// <param name="light">The incident light.</param>
    /// <param name="media">Permittivities of all media.</param>
    /// <param name="field">Which fields are followed.</param>
    /// <param name="periods">The period of all rows, the one orders are counted by, the largest order that travels.</param>
    /// <param name="accuracy">Error to stop at.</param>
    /// <param name="layout">Where the answers stand.</param>
    /// <param name="first">Receives the answer: for s with both fields.</param>
    /// <param name="second">Receives that for p with both fields.</param>
    /// <returns>False where no resolution gave a finite solution.</returns>
    public bool TrySolve(
        in PointLight light, ReadOnlySpan<Complex> media, RodField field, in PointPeriods periods, double accuracy, in OutcomeLayout layout,
        Span<double> first, Span<double> second)
    {
        Reserve(layout.Length);
        RefinementMemory memory = _memories[(int)field];
        // A mesh that was fine enough is so for longer waves; a shorter one needs it found anew.
        if (_ladder.HasSlabs && light.WavelengthNm < _depths[(int)field].WavelengthNm)
            _depths[(int)field] = FindDepth(light, media, field, periods, accuracy, layout);
        (int depth, double depthError, _) = _depths[(int)field];
        bool stands = false, failed = false;
        Resolution solved = default;
        double lastChange = double.NaN, error = double.NaN;
        int step = Math.Max(0, memory.Accepted - 1), accepted = -1;
        for (; step < _ladder.Count; step++)
        {
            (_current, _previous) = (_previous, _current);
            Resolution resolution = _ladder.At(step, periods.MostOrder, periods.PeriodNm, depth);
            if (!_point.TrySolve(light, media, resolution, field, periods.PeriodNm, periods.OrderPeriodNm, layout, _current[0], _current[1]))
            {
                (_current, _previous) = (_previous, _current);
                lastChange = double.NaN;
                failed = true;
                continue;
            }
            (solved, failed) = (resolution, false);
            if (!stands)
            {
                stands = true;
                if (plan.Kinds.Length > 0)
                    continue;
                error = Rounding;
                break;
            }
            double plain = Change(field == RodField.Both), change = plain;
            if (!double.IsNaN(lastChange) && lastChange > Rounding)
                memory.Note(step - 1, change / lastChange);
            double ratio = Math.Min(0.8, memory.Ratio(step));
            // A change much smaller than the one before may be so by accident.
            if (lastChange > 0)
                change = Math.Max(change, (_ladder.HasSlabs ? LeastSlabFall : LeastFall) * lastChange);
            change = memory.Smooth(step, change);
            error = Math.Max(Rounding, (_ladder.HasSlabs ? SlabSafety : Safety) * change * ratio / (1 - ratio)) + depthError;
            if (error <= accuracy)
            {
                if (accepted < 0)
                    accepted = step;
                // One step further, now and then, measures how fast changes fall here.
                bool probe = !memory.Knows(step) || memory.SinceProbe >= ProbeEvery;
                if (accepted < step || !probe || step + 1 == _ladder.Count)
                    break;
                memory.SinceProbe = -1;
            }
            lastChange = plain;
        }
        if (!stands)
            return false;
        if (failed && !_point.TrySolve(light, media, solved, field, periods.PeriodNm, periods.OrderPeriodNm, layout, _current[0], _current[1]))
            return false;
        if (_ladder.HasSlabs && !_point.TrySplitLosses(layout, _current[0], _current[1], field == RodField.Both))
            return false;
        memory.SinceProbe++;
        memory.Accepted = accepted >= 0 ? accepted : _ladder.Count - 1;
        Deliver(double.IsNaN(error) ? 1 : Math.Min(1, error), field, first, second);
        return true;
    }

    /// <summary>The coarsest mesh in depth that takes a small part of the accuracy, judged at few harmonics, and its error.</summary>
    /// <remarks>A finer mesh divides the error by four at least, and hardly knows the harmonics.</remarks>
    private (int Depth, double Error, double WavelengthNm) FindDepth(
        in PointLight light, ReadOnlySpan<Complex> media, RodField field, in PointPeriods periods, double accuracy, in OutcomeLayout layout)
    {
        double error = accuracy;
        bool stands = false;
        for (int depth = 0; depth <= ResolutionLadder.MostDepth; depth++)
        {
            Resolution resolution = _ladder.At(ResolutionLadder.DepthStep, periods.MostOrder, periods.PeriodNm, depth);
            (_current, _previous) = (_previous, _current);
            if (!_point.TrySolve(light, media, resolution, field, periods.PeriodNm, periods.OrderPeriodNm, layout, _current[0], _current[1]))
            {
                (_current, _previous) = (_previous, _current);
                continue;
            }
            if (stands)
            {
                double change = Change(field == RodField.Both);
                if (DepthSafety * change <= DepthShare * accuracy)
                    return (depth - 1, DepthSafety * change, light.WavelengthNm);
                error = DepthSafety * change / 4;
                if (error <= DepthShare * accuracy)
                    return (depth, error, light.WavelengthNm);
            }
            stands = true;
        }
        return (ResolutionLadder.MostDepth, error, light.WavelengthNm);
    }

    private static RefinementMemory MemoryFor(StackPlan plan)
        => new ResolutionLadder(plan).HasSlabs ? new RefinementMemory(12, 0.6, 0.4) : new RefinementMemory(12, 0.2, 0.012);

    private void Deliver(double error, RodField field, Span<double> first, Span<double> second)
    {
        _current[0][OutcomeLayout.Error] = error;
        _current[0].CopyTo(first);
        if (field != RodField.Both)
            return;
        _current[1][OutcomeLayout.Error] = error;
        _current[1].CopyTo(second);
    }

    private double Change(bool both)
    {
        double change = 0;
        for (int which = 0; which < (both ? 2 : 1); which++)
        {
            for (int i = 0; i < OutcomeLayout.Judged; i++)
                change = Math.Max(change, Math.Abs(_current[which][i] - _previous[which][i]));
        }
        return change;
    }

    private void Reserve(int length)
    {
        if (_current[0].Length == length)
            return;
        _current = [new double[length], new double[length]];
        _previous = [new double[length], new double[length]];
    }
}
