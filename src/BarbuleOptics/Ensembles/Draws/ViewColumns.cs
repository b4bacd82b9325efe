using BarbuleOptics.Ensembles.Statistics;

namespace BarbuleOptics.Ensembles.Draws;

/// <summary>What was taken in of all draws at one angle.</summary>
internal sealed class ViewColumns
{
    private readonly int _angle;
    private readonly int _replicates;
    private readonly DrawColumn?[] _reflectance;
    private readonly DrawColumn?[] _outcomes;
    private readonly IReadOnlyList<DrawOutcome> _kinds;
    private readonly int _bins;
    private readonly long[][] _terms;

    /// <summary>Bins of an outcome: there are few of them.</summary>
    private const int OutcomeBins = 2048;

    public ViewColumns(int angle, int replicates, int wavelengths, IReadOnlyList<DrawOutcome> outcomes, int bins)
    {
        (_angle, _replicates, _kinds, _bins) = (angle, replicates, outcomes, bins);
        (_reflectance, _outcomes) = (new DrawColumn?[wavelengths], new DrawColumn?[outcomes.Count]);
        _terms = [.. Enumerable.Range(0, replicates).Select(_ => new long[HueTermList.Terms.Count])];
    }

    /// <summary>Number of columns, each to be taken in by itself.</summary>
    public int Count => _reflectance.Length + _outcomes.Length + 1;

    /// <summary>Draws whose peak was lost.</summary>
    public long Lost { get; private set; }

    /// <summary>Draws in which another peak was the highest.</summary>
    public long OtherHighest { get; private set; }

    /// <summary>Draws that were solved.</summary>
    public long Solved { get; private set; }

    /// <summary>Draws that have a color.</summary>
    public long Colored => _terms.Sum(counts => counts.Sum());

    /// <summary>Takes one column of a round in, draw after draw; different columns from different threads.</summary>
    /// <param name="column">Number of the column.</param>
    /// <param name="round">The draws.</param>
    /// <param name="first">Number of the round's first draw.</param>
    /// <param name="count">Number of draws in the round.</param>
    public void Fold(int column, DrawRound round, long first, int count)
    {
        if (column < _reflectance.Length)
        {
            Fold(ref _reflectance[column], place => round.ReflectanceAt(place, _angle, column), first, count, _bins, false, 0, 1);
            return;
        }
        int outcome = column - _reflectance.Length;
        if (outcome < _outcomes.Length)
            Fold(ref _outcomes[outcome], place => round.OutcomeAt(place, _angle, outcome), first, count, OutcomeBins, _kinds[outcome].IsAngle, double.MinValue, double.MaxValue);
        else
            FoldMarks(round, first, count);
    }

    /// <summary>How the reflectance at one wavelength scatters.</summary>
    public DrawnValue? Reflectance(int wavelength) => _reflectance[wavelength]?.Summary();

    /// <summary>How an outcome scatters.</summary>
    public DrawnValue? Outcome(int outcome) => _outcomes[outcome]?.Summary();

    /// <summary>Share of the draws with a color that have each term, and its standard error.</summary>
    public IEnumerable<(string Term, double Share, double Error)> Terms()
    {
        long all = Colored;
        for (int term = 0; term < HueTermList.Terms.Count; term++)
        {
            long count = _terms.Sum(counts => counts[term]);
            if (count > 0)
                yield return (HueTermList.Terms[term], (double)count / all, ReplicateError.Of(_terms.Where(counts => counts.Sum() > 0).Select(counts => (double)counts[term] / counts.Sum())));
        }
    }

    private void Fold(ref DrawColumn? column, Func<int, double> valueAt, long first, int count, int bins, bool isAngle, double least, double most)
    {
        if (column is null)
        {
            var values = new double[count];
            for (int place = 0; place < count; place++)
                values[place] = valueAt(place);
            column = new DrawColumn(values, _replicates, bins, isAngle, least, most);
        }
        for (int place = 0; place < count; place++)
            column.Add(first + place, valueAt(place));
    }

    private void FoldMarks(DrawRound round, long first, int count)
    {
        for (int place = 0; place < count; place++)
        {
            DrawMarks marks = round.Marks(place, _angle);
            Solved += marks.IsFailed ? 0 : 1;
            Lost += marks.IsLost ? 1 : 0;
            OtherHighest += marks.IsOtherHighest ? 1 : 0;
            if (marks.Term >= 0)
                _terms[(first + place) % _replicates][marks.Term]++;
        }
    }
}
