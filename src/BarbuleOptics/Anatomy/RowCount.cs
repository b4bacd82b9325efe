using BarbuleOptics.Quantities;

namespace BarbuleOptics.Anatomy;

/// <summary>Number of rows: one count, or the counts of several units. Each 1 to 1,000.</summary>
public sealed record RowCount
{
    /// <summary>From one count or more.</summary>
    /// <exception cref="ArgumentException">There is none, or one lies outside 1 to 1,000.</exception>
    public RowCount(ValueList<int> counts)
    {
        ArgumentNullException.ThrowIfNull(counts);
        if (counts.Count == 0 || counts.Any(count => count is < 1 or > Most))
            throw new ArgumentException("Must be one count or more, each 1 to 1,000.", nameof(counts));
        Counts = counts;
    }

    /// <summary>The counts, one for each unit.</summary>
    public ValueList<int> Counts { get; }

    /// <summary>Most rows that a layer may have.</summary>
    public const int Most = 1000;

    /// <summary>One row.</summary>
    public static RowCount One { get; } = new([1]);

    /// <summary>The count that the mean geometry takes: the mean, rounded to the nearest whole number (halves up).</summary>
    public int Central => (int)Math.Floor(Counts.Average() + 0.5);
}
