using BarbuleOptics.Anatomy;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Ensembles.Spreads;

/// <summary>Reads a structure for the spread that is asked for, and says by name what it lacks.</summary>
internal sealed class DrawPlanner
{
    /// <summary>Units from which on lists are taken as paired: two give a correlation of 1 or -1 whatever they are.</summary>
    private const int LeastPaired = 3;

    private static readonly string[] LateralKeys = ["spacing", "separation"];

    private readonly Barbule _barbule;
    private readonly Spread _spread;
    private readonly List<AnatomyProblem> _problems = [];
    private readonly List<PredictionWarning> _warnings = [];

    private DrawPlanner(Barbule barbule, Spread spread) => (_barbule, _spread) = (barbule, spread);

    /// <summary>The plan; null when there are problems.</summary>
    public static DrawPlan? Plan(Barbule barbule, Spread spread, PredictionConditions conditions, out IReadOnlyList<AnatomyProblem> problems, out IReadOnlyList<PredictionWarning> warnings)
    {
        DrawPlan? plan = Plan(barbule, spread, out problems, out warnings);
        if (conditions.Instrument is not null)
            warnings = [.. warnings, new PredictionWarning(WarningCodes.DrawsOneDirection, "draws are of the reflectance at each angle by itself, without the instrument; compare them with the reflectance, and read how far the instrument's signal is from it in the prediction")];
        return plan;
    }

    /// <summary>The plan without a look at conditions.</summary>
    public static DrawPlan? Plan(Barbule barbule, Spread spread, out IReadOnlyList<AnatomyProblem> problems, out IReadOnlyList<PredictionWarning> warnings)
    {
        var planner = new DrawPlanner(barbule, spread);
        DrawPlan plan = planner.Plan();
        (problems, warnings) = (planner._problems, planner._warnings);
        return problems.Count == 0 ? plan : null;
    }

    private DrawPlan Plan()
    {
        bool separate = _spread == Spread.Within;
        var readings = new Dictionary<string, LengthReading>(StringComparer.Ordinal);
        DrawSlot[] slots = [.. StructureSlots.Of(_barbule, separate).Select(slot => slot with { Law = LawOf(slot, readings) })];
        int[] counted = separate ? [] : [.. Enumerable.Range(0, _barbule.Layers.Count).Where(layer => _barbule.Layers[layer].Rows.Counts.Distinct().Count() > 1)];
        if (_problems.Count == 0 && counted.Length == 0 && slots.All(slot => slot.Law is null))
            _problems.Add(new AnatomyProblem(slots.Length > 0 ? slots[0].Key : "cortex.thickness", NothingToDraw()));
        CorrelatedGroup[] groups = separate ? [] : [.. Groups(slots)];
        foreach (CorrelatedGroup group in groups)
        {
            Warn(WarningCodes.ReplicatesPaired, FormattableString.Invariant(
                $"{string.Join(", ", group.Slots.Select(slot => slots[slot].Key))} have {group.Units} replicates each, which were taken as measured on the same {group.Units} units in one order, so that their correlations count; give {{ mean, sd, n }} where they were not"));
        }
        if (separate && _barbule.Layers.Any(layer => layer.Lateral is not null))
            Warn(WarningCodes.RowsPeriodic, "every row was drawn by itself, and within a row all bodies are alike at one spacing, for the model repeats a row without end; disorder along a row is left out, and it scatters light besides");
        return new DrawPlan(_barbule, _spread, slots, groups, counted);
    }

    private LengthLaw? LawOf(DrawSlot slot, Dictionary<string, LengthReading> readings)
    {
        if (!readings.TryGetValue(slot.Key, out LengthReading? reading))
        {
            reading = readings[slot.Key] = Reading(slot);
            if (reading.Refusal is string refusal)
                _problems.Add(new AnatomyProblem(slot.Key, refusal));
            if (reading.Note is string note)
                Warn(CodeOf(reading), $"{slot.Key} {note}");
        }
        return reading.Law;
    }

    private LengthReading Reading(DrawSlot slot)
    {
        if (slot.Factor is not null)
            return LengthSpread.Of(slot.Factor, _spread, slot.Unit);
        LengthReading reading = LengthSpread.Of(slot.Length, _spread);
        bool isLateral = LateralKeys.Contains(slot.Key[(slot.Key.LastIndexOf('.') + 1)..]);
        return _spread == Spread.Within && isLateral && reading.Law is not null
            ? new LengthReading(null, Note: "was kept at its mean, for rows of one layer share one period") : reading;
    }

    private static string CodeOf(LengthReading reading)
        => reading.Law is LengthLaw.Uniform ? WarningCodes.RangeDrawn : reading.Law is null ? WarningCodes.LengthKept : WarningCodes.FewUnits;

    private string NothingToDraw() => _spread switch
    {
        Spread.Mean => "found no length with a spread, so that all draws would be alike; needed { mean, sd, n }, { min, max } or replicates somewhere",
        Spread.Between => "found no length with a spread between barbules; needed { mean, sd, n, sd_between } or replicates somewhere",
        _ => "found no length with a spread within a section; needed an sd or lists of replicates, one inner list a unit, somewhere",
    };

    private static IEnumerable<CorrelatedGroup> Groups(DrawSlot[] slots)
    {
        var paired = new List<(int Slot, ValueList<double> Units)>();
        for (int slot = 0; slot < slots.Length; slot++)
        {
            if (slots[slot].Law is not null && LengthSpread.UnitsOf(slots[slot].Length) is { Count: >= LeastPaired } units && units.Distinct().Count() > 1)
                paired.Add((slot, units));
        }
        return paired.GroupBy(one => one.Units.Count).Where(group => group.Count() > 1)
            .Select(group => new CorrelatedGroup([.. group.Select(one => one.Slot)], [.. group.Select(one => one.Units.ToArray())]));
    }

    private void Warn(string code, string message) => _warnings.Add(new PredictionWarning(code, message, null));
}
