using BarbuleOptics.Anatomy;

namespace BarbuleOptics.Ensembles.Spreads;

/// <summary>How draws of a structure are made: which lengths and row counts vary, by which laws, which of them together.</summary>
/// <remarks>One number between 0 and 1 for each length that varies and each list of row counts makes a draw. Immutable and safe to share between threads.</remarks>
internal sealed class DrawPlan
{
    private readonly int[] _dimensionOfSlot;
    private readonly int[] _counted;
    private readonly CommonScale? _common;

    internal DrawPlan(Barbule barbule, Spread spread, DrawSlot[] slots, IReadOnlyList<CorrelatedGroup> groups, int[] counted)
        : this(barbule, spread, slots, groups, counted, [.. Enumerable.Range(0, slots.Length).Where(slot => slots[slot].Law is not null)], double.PositiveInfinity, shares: false)
    {
    }

    private DrawPlan(Barbule barbule, Spread spread, DrawSlot[] slots, IReadOnlyList<CorrelatedGroup> groups, int[] counted, int[] order, double degrees, bool shares)
    {
        (Barbule, Spread, Slots, Groups, _counted, Drawn, EffectiveDegrees) = (barbule, spread, slots, groups, counted, order, degrees);
        _common = shares ? new CommonScale(degrees) : null;
        Scale = new StudentScale(shares ? double.PositiveInfinity : degrees);
        _dimensionOfSlot = new int[slots.Length];
        Array.Fill(_dimensionOfSlot, -1);
        for (int i = 0; i < order.Length; i++)
            _dimensionOfSlot[order[i]] = counted.Length + i;
    }

    /// <summary>The structure as measured.</summary>
    public Barbule Barbule { get; }

    /// <summary>Which spread is drawn from.</summary>
    public Spread Spread { get; }

    /// <summary>Whether each row has lengths of its own.</summary>
    public bool SeparateRows => Spread == Spread.Within;

    /// <summary>Every length in its order.</summary>
    public DrawSlot[] Slots { get; }

    /// <summary>Lengths that vary together.</summary>
    public IReadOnlyList<CorrelatedGroup> Groups { get; }

    /// <summary>Places of the lengths that vary, those that matter most first: the first coordinates of a sequence are its most even ones.</summary>
    public IReadOnlyList<int> Drawn { get; }

    /// <summary>Degrees of freedom of Student's t that normal lengths are drawn from; infinity for normal ones.</summary>
    public double EffectiveDegrees { get; }

    /// <summary>Layers whose number of rows varies.</summary>
    public IReadOnlyList<int> Counted => _counted;

    /// <summary>Numbers that a draw takes.</summary>
    public int Dimensions => _counted.Length + Drawn.Count + (_common is null ? 0 : 1);

    private StudentScale Scale { get; }

    /// <summary>What varies by itself: measurements with their dimensions, those drawn together and the rows of one measurement as one.</summary>
    public IEnumerable<(string Key, int[] Dimensions)> Inputs()
    {
        var taken = new HashSet<int>();
        for (int i = 0; i < _counted.Length; i++)
            yield return (FormattableString.Invariant($"layer{_counted[i] + 1}.rows"), [i]);
        foreach (CorrelatedGroup group in Groups)
        {
            taken.UnionWith(group.Slots);
            yield return (string.Join(" + ", group.Slots.Select(slot => Slots[slot].Key)), [.. group.Slots.Select(slot => _dimensionOfSlot[slot])]);
        }
        foreach (IGrouping<string, int> slots in Drawn.Order().Where(slot => !taken.Contains(slot)).GroupBy(slot => Slots[slot].Key))
            yield return (slots.Key, [.. slots.Select(slot => _dimensionOfSlot[slot])]);
    }

    /// <summary>A length that is drawn, in words and numbers.</summary>
    public DrawnLength Described(int slot, double truncatedShare, double bias)
    {
        string law = Slots[slot].Law is LengthLaw.Uniform ? "uniform" : double.IsFinite(EffectiveDegrees) ? "t" : "normal";
        return new DrawnLength(Slots[slot].Key, Slots[slot].Unit, Slots[slot].Length.CentralNm, Slots[slot].Law!.DeviationNm, law, truncatedShare, bias);
    }

    /// <summary>The same draws of a structure that differs in its materials alone.</summary>
    public DrawPlan Of(Barbule barbule) => new(barbule, Spread, Slots, Groups, _counted, [.. Drawn], EffectiveDegrees, _common is not null);

    /// <summary>The mean geometry.</summary>
    public void Center(Span<double> lengthsNm, Span<int> rowCounts)
    {
        for (int slot = 0; slot < Slots.Length; slot++)
            lengthsNm[slot] = Slots[slot].Length.CentralNm;
        for (int layer = 0; layer < rowCounts.Length; layer++)
            rowCounts[layer] = Barbule.Layers[layer].Rows.Central;
    }

    /// <summary>One draw.</summary>
    /// <param name="coordinates">Numbers above 0 and below 1, one a dimension.</param>
    /// <param name="lengthsNm">Receives the length of every slot.</param>
    /// <param name="rowCounts">Receives the rows of every layer.</param>
    /// <param name="scores">Scratch, one a slot.</param>
    public void Draw(ReadOnlySpan<double> coordinates, Span<double> lengthsNm, Span<int> rowCounts, Span<double> scores)
    {
        Center(lengthsNm, rowCounts);
        for (int i = 0; i < _counted.Length; i++)
        {
            var counts = Barbule.Layers[_counted[i]].Rows.Counts;
            rowCounts[_counted[i]] = counts[(int)(coordinates[i] * counts.Count)];
        }
        scores.Clear();
        double common = _common is null ? 1 : _common.Of(StudentScale.Score(coordinates[Dimensions - 1]));
        foreach (int slot in Drawn)
        {
            double coordinate = coordinates[_dimensionOfSlot[slot]];
            if (Slots[slot].Law is LengthLaw.Uniform uniform)
            {
                lengthsNm[slot] = uniform.LeastNm + (uniform.MostNm - uniform.LeastNm) * coordinate;
                continue;
            }
            scores[slot] = StudentScale.Score(coordinate);
            lengthsNm[slot] += Slots[slot].Law!.DeviationNm * common * Scale.Of(scores[slot]);
        }
        foreach (CorrelatedGroup group in Groups)
        {
            for (int member = 0; member < group.Slots.Count; member++)
            {
                int slot = group.Slots[member];
                lengthsNm[slot] = Slots[slot].Length.CentralNm + Slots[slot].Law!.DeviationNm * common * Scale.Of(group.Score(member, scores));
            }
        }
    }

    /// <summary>The same plan with the lengths that matter most first, and with the degrees of freedom that the whole has.</summary>
    /// <param name="changes">For each slot how the outcome that counts changes over one standard deviation of the length, one or more numbers.</param>
    /// <param name="shares">Whether one factor makes all lengths of a draw Student's t together (<see cref="CommonScale"/>), as intervals ask for; otherwise each is by itself,
    /// as shares of variance ask for.</param>
    /// <remarks>
    /// Welch and Satterthwaite: nu = (sum V_k)^2 / sum(V_k^2/nu_k), V_k the variance that the k-th independent mean gives the outcome, nu_k its degrees of
    /// freedom (Welch 1947, Biometrika 34:28; Satterthwaite 1946, Biometrics Bull. 2:110). With one length measured this is its own n - 1. Several lengths drawn
    /// each from Student's t of its own n - 1 would make intervals too wide: they are hardly all badly estimated at once.
    /// </remarks>
    public DrawPlan Weighted(ReadOnlySpan<double[]> changes, bool shares = false)
    {
        var variances = new double[Slots.Length];
        for (int slot = 0; slot < Slots.Length; slot++)
            variances[slot] = changes[slot].Sum(change => change * change);
        double sum = 0, divided = 0;
        var grouped = new bool[Slots.Length];
        foreach (CorrelatedGroup group in Groups)
        {
            double together = 0;
            var deviations = new double[group.Slots.Count];
            for (int outcome = 0; outcome < changes[group.Slots[0]].Length; outcome++)
            {
                for (int member = 0; member < deviations.Length; member++)
                    deviations[member] = changes[group.Slots[member]][outcome];
                together += group.VarianceOfSum(deviations);
            }
            sum += together;
            divided += together * together / DegreesOf(group.Slots[0]);
            foreach (int slot in group.Slots)
                grouped[slot] = true;
        }
        foreach (int slot in Drawn)
        {
            if (grouped[slot])
                continue;
            sum += variances[slot];
            divided += variances[slot] * variances[slot] / DegreesOf(slot);
        }
        double least = Drawn.Count == 0 ? double.PositiveInfinity : Drawn.Min(DegreesOf);
        double degrees = divided > 0 ? Math.Max(least, sum * sum / divided) : least;
        return new DrawPlan(Barbule, Spread, Slots, Groups, _counted, [.. Drawn.OrderByDescending(slot => variances[slot]).ThenBy(slot => slot)], degrees, shares && double.IsFinite(degrees) && IsSeveral);
    }

    /// <summary>Whether more than one normal length or group is drawn: one alone is Student's t as it is.</summary>
    private bool IsSeveral => Groups.Count + Drawn.Count(slot => Slots[slot].Law is LengthLaw.Normal && !Groups.Any(group => group.Slots.Contains(slot))) > 1;

    private double DegreesOf(int slot) => Slots[slot].Law is LengthLaw.Normal normal ? normal.Degrees : double.PositiveInfinity;
}
