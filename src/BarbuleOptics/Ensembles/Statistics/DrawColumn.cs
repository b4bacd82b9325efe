namespace BarbuleOptics.Ensembles.Statistics;

/// <summary>One outcome of all draws, replicate by replicate: counts in bins and sums; memory does not grow with the draws.</summary>
/// <remarks>Values are taken in by the draws' numbers, so that sums are the same to the last bit however many threads drew. For an angle values are unrolled
/// around the mean direction of the first ones, and quantiles rolled up again.</remarks>
internal sealed class DrawColumn
{
    private readonly bool _isAngle;
    private readonly Histogram[] _counts;
    private readonly double[] _sums;
    private readonly CircularMean[] _directions;
    private readonly double _origin;
    private double _squares;
    private long _offered;

    /// <summary>A column whose bins fit its first values.</summary>
    /// <param name="first">The first values, draw after draw; NaN where a draw has none. Not taken in yet.</param>
    /// <param name="replicates">Number of replicates; draw d belongs to replicate d mod that number.</param>
    /// <param name="bins">Number of bins.</param>
    /// <param name="isAngle">Whether values are angles in degrees.</param>
    /// <param name="least">Lowest value possible.</param>
    /// <param name="most">Highest value possible.</param>
    public DrawColumn(ReadOnlySpan<double> first, int replicates, int bins, bool isAngle = false, double least = double.MinValue, double most = double.MaxValue)
    {
        _isAngle = isAngle;
        _sums = new double[replicates];
        _directions = new CircularMean[replicates];
        var values = new List<double>(first.Length);
        var direction = new CircularMean();
        foreach (double value in first)
        {
            if (double.IsNaN(value))
                continue;
            values.Add(value);
            direction.Add(value);
        }
        _origin = isAngle ? direction.Degrees : values.Count == 0 ? 0 : values[0];
        double[] unrolled = values.Count == 0 ? [_origin] : [.. values.Select(Unrolled)];
        (double from, double to) = isAngle ? ColumnRange.Of(unrolled, _origin - 180, _origin + 180) : ColumnRange.Of(unrolled, least, most);
        _counts = [.. Enumerable.Range(0, replicates).Select(_ => new Histogram(from, to, bins))];
    }

    /// <summary>Number of values taken in.</summary>
    public long Count => _counts.Sum(counts => counts.Count);

    /// <summary>Takes in the value of one draw; NaN where it has none.</summary>
    public void Add(long draw, double value)
    {
        _offered++;
        if (double.IsNaN(value))
            return;
        int replicate = (int)(draw % _counts.Length);
        double unrolled = Unrolled(value);
        _counts[replicate].Add(unrolled);
        _sums[replicate] += unrolled - _origin;
        _squares += (unrolled - _origin) * (unrolled - _origin);
        if (_isAngle)
            _directions[replicate].Add(value);
    }

    /// <summary>What came of it; null where no draw has a value.</summary>
    public DrawnValue? Summary()
    {
        var all = new Histogram(_counts[0]);
        double sum = 0;
        for (int replicate = 0; replicate < _counts.Length; replicate++)
        {
            all.Add(_counts[replicate]);
            sum += _sums[replicate];
        }
        if (all.Count == 0)
            return null;
        double mean = sum / all.Count, variance = Math.Max(0, _squares / all.Count - mean * mean) * all.Count / Math.Max(1, all.Count - 1);
        (double direction, double deviation) = _isAngle ? DirectionOfAll() : (_origin + mean, Math.Sqrt(variance));
        return new DrawnValue(
            Rolled(all.Quantile(0.5)), Rolled(all.Quantile(0.25)), Rolled(all.Quantile(0.75)), Rolled(all.Quantile(0.025)), Rolled(all.Quantile(0.975)),
            direction, deviation, (double)all.Count / _offered,
            ErrorOf(0.5), ErrorOf(0.025), ErrorOf(0.975), ReplicateError.Of(Means()));
    }

    private (double Degrees, double DeviationDegrees) DirectionOfAll()
    {
        var all = new CircularMean();
        foreach (CircularMean direction in _directions)
            all.Add(direction);
        return (all.Degrees, all.StandardDeviationDegrees);
    }

    private double Unrolled(double value) => _isAngle ? _origin + Circle.Difference(_origin, value) : value;

    private double Rolled(double value) => _isAngle ? Circle.Wrap(value) : value;

    private double ErrorOf(double share) => ReplicateError.Of(_counts.Where(counts => counts.Count > 0).Select(counts => counts.Quantile(share)));

    private IEnumerable<double> Means()
    {
        for (int replicate = 0; replicate < _counts.Length; replicate++)
        {
            if (_counts[replicate].Count > 0)
                yield return _sums[replicate] / _counts[replicate].Count;
        }
    }
}
