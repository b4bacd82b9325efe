using System.Numerics;
using static BarbuleOptics.Multilayer.StableFunctions;

namespace BarbuleOptics.Grating.Joining;

/// <summary>All powers at one wavelength, direction and resolution.</summary>
internal sealed class PointSolver
{
    private readonly StackSolver _stack;
    private readonly AveragedBack? _back;
    private Complex[] _entering = [];
    private Complex[] _leaving = [];
    private double[] _lost = [];

    public PointSolver(StackPlan plan)
    {
        _stack = new StackSolver(plan);
        _back = plan.HasAveragedBack ? new AveragedBack(_stack) : null;
    }

    /// <summary>The plan.</summary>
    public StackPlan Plan => _stack.Plan;

    /// <summary>Solves for light of one polarization, or of both where the rods couple them.</summary>
    /// <param name="light">The incident light.</param>
    /// <param name="media">Permittivities of all media.</param>
    /// <param name="resolution">How finely.</param>
    /// <param name="field">Which fields are followed.</param>
    /// <param name="periodNm">The period of all rows; null when each group keeps its own.</param>
    /// <param name="orderPeriodNm">The period that orders are counted by; 0 without rows.</param>
    /// <param name="layout">Where the answers go.</param>
    /// <param name="first">Receives the answer: for s with both fields.</param>
    /// <param name="second">Receives that for p with both fields.</param>
    /// <returns>False where there is no finite solution.</returns>
    public bool TrySolve(
        in PointLight light, ReadOnlySpan<Complex> media, in Resolution resolution, RodField field, double? periodNm, double orderPeriodNm,
        in OutcomeLayout layout, Span<double> first, Span<double> second)
    {
        // A descent through an averaged back leaves no fields to come back to.
        if (!_stack.TryPrepare(light, media, resolution with { SplitsLosses = _back is not null }, field, periodNm))
            return false;
        if (_back is not null && !_back.TryPrepare())
            return false;
        if (!_stack.TryClimb(fromBelow: false))
            return false;
        Reserve(_stack.Top.Channels);
        bool both = field == RodField.Both;
        // What is reflected is read before the amplitudes, whose search may use the same memory.
        Start(layout, first, isP: false, orderPeriodNm);
        if (both)
            Start(layout, second, isP: true, orderPeriodNm);
        if (!TryFinish(layout, first, isP: false, orderPeriodNm) || (both && !TryFinish(layout, second, isP: true, orderPeriodNm)))
            return false;
        return _back is null
            || (_back.TryAdd(layout, first, 0, orderPeriodNm) && (!both || _back.TryAdd(layout, second, 1, orderPeriodNm)));
    }

    /// <summary>Tells the losses of the point just solved apart by material, of which only the sum is known before.</summary>
    /// <returns>False where there is no finite solution.</returns>
    public bool TrySplitLosses(in OutcomeLayout layout, Span<double> first, Span<double> second, bool both)
        => _back is not null || (TrySplitLosses(layout, first, isP: false) && (!both || TrySplitLosses(layout, second, isP: true)));

    private bool TrySplitLosses(in OutcomeLayout layout, Span<double> outcome, bool isP)
    {
        _stack.SplitLosses();
        ChannelTable table = _stack.Top;
        Array.Clear(_lost);
        if (!_stack.TryDescend(Enter(table, isP), _leaving.AsSpan(0, table.Channels), _lost))
            return false;
        outcome.Slice(OutcomeLayout.FirstMaterial, layout.Materials).Clear();
        double lost = outcome[OutcomeLayout.Lost];
        layout.AddLost(outcome, _lost, table.Eta(Plan.Surround)[table.Incident(isP)].Real);
        outcome[OutcomeLayout.Lost] = lost;
        return true;
    }

    private void Reserve(int channels)
    {
        if (_entering.Length < channels)
            (_entering, _leaving) = (new Complex[channels], new Complex[channels]);
        int materials = Plan.Section.Materials.Count + 1;
        if (_lost.Length != materials)
            _lost = new double[materials];
    }

    private Span<Complex> Enter(ChannelTable table, bool isP)
    {
        Span<Complex> entering = _entering.AsSpan(0, table.Channels);
        entering.Clear();
        entering[table.Incident(isP)] = Complex.One;
        return entering;
    }

    private void Start(in OutcomeLayout layout, Span<double> outcome, bool isP, double orderPeriodNm)
    {
        outcome.Clear();
        ChannelTable table = _stack.Top;
        int incident = table.Incident(isP);
        ReadOnlySpan<Complex> eta = table.Eta(Plan.Surround);
        int cells = CellsOf(table, orderPeriodNm);
        for (int channel = 0; channel < table.Channels; channel++)
        {
            double power = eta[channel].Real / eta[incident].Real * Norm(_stack.Total[channel, incident]);
            if (power > 0)
                layout.AddReflected(outcome, table.OrderOf(channel) * cells, power);
        }
    }

    private bool TryFinish(in OutcomeLayout layout, Span<double> outcome, bool isP, double orderPeriodNm)
    {
        ChannelTable table = _stack.Top, below = _stack.Bottom;
        double incident = table.Eta(Plan.Surround)[table.Incident(isP)].Real;
        Span<Complex> leaving = _leaving.AsSpan(0, table.Channels);
        Array.Clear(_lost);
        if (!_stack.TryDescend(Enter(table, isP), leaving, _lost))
            return false;
        layout.AddLost(outcome, _lost, incident);
        if (_back is not null)
        {
            _back.Take(leaving, isP ? 1 : 0);
            return true;
        }
        ReadOnlySpan<Complex> eta = below.Eta(Plan.Section.Back is null ? Plan.Backing : Plan.Behind);
        int cells = CellsOf(below, orderPeriodNm);
        for (int channel = 0; channel < below.Channels; channel++)
        {
            double power = eta[channel].Real / incident * Norm(leaving[channel]);
            if (power > 0)
                layout.AddTransmitted(outcome, below.OrderOf(channel) * cells, power);
        }
        return true;
    }

    /// <summary>Number of a table's periods in that which orders are counted by.</summary>
    internal static int CellsOf(ChannelTable table, double orderPeriodNm)
        => orderPeriodNm > 0 ? Math.Max(1, (int)Math.Round(orderPeriodNm / table.Waves.PeriodNm)) : 1;
}
