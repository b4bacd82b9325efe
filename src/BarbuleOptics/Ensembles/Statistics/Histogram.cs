using BarbuleOptics.Quantities;

namespace BarbuleOptics.Ensembles.Statistics;

/// <summary>Counts of values in equal bins, from which quantiles are read: as large for a million values as for ten.</summary>
/// <remarks>Counts are whole numbers, so that the order in which values came, and which thread brought them, leaves no trace. A quantile is found by a straight line
/// across its bin: it is off by less than a bin's width, for smooth spreads by far less. Values beyond the ends are counted and not placed.</remarks>
internal sealed class Histogram
{
    private readonly double _from;
    private readonly double _width;

    // One more at each end, for what lies beyond.
    private readonly int[] _counts;

    /// <summary>An empty histogram from <paramref name="from"/> to <paramref name="to"/>.</summary>
    public Histogram(double from, double to, int bins)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(bins, 1);
        _from = Guard.Finite(from);
        _width = Guard.Positive((Guard.Finite(to) - from) / bins, nameof(to));
        _counts = new int[bins + 2];
    }

    /// <summary>An empty histogram with the same bins.</summary>
    public Histogram(Histogram like)
    {
        (_from, _width) = (like._from, like._width);
        _counts = new int[like._counts.Length];
    }

    /// <summary>Number of values.</summary>
    public long Count { get; private set; }

    /// <summary>Counts one value.</summary>
    public void Add(double value)
    {
        _counts[(int)Math.Clamp(Math.Floor((value - _from) / _width) + 1, 0, _counts.Length - 1)]++;
        Count++;
    }

    /// <summary>Adds the counts of another histogram with the same bins.</summary>
    public void Add(Histogram other)
    {
        if (other._from != _from || other._width != _width || other._counts.Length != _counts.Length)
            throw new ArgumentException("Must have the same bins.", nameof(other));
        for (int i = 0; i < _counts.Length; i++)
            _counts[i] += other._counts[i];
        Count += other.Count;
    }

    /// <summary>The value that a share of all values lies below; an end of the range where it lies beyond.</summary>
    /// <param name="share">0 to 1.</param>
    /// <exception cref="InvalidOperationException">Nothing was counted.</exception>
    public double Quantile(double share)
    {
        if (Count == 0)
            throw new InvalidOperationException("Nothing was counted.");
        double wanted = Guard.Within(share, 0, 1) * Count, below = 0;
        for (int i = 0; i < _counts.Length; i++)
        {
            if (below + _counts[i] >= wanted && _counts[i] > 0)
                return _from + _width * Math.Clamp(i - 1 + (wanted - below) / _counts[i], 0, _counts.Length - 2);
            below += _counts[i];
        }
        return _from + _width * (_counts.Length - 2);
    }
}
