using BarbuleOptics.Quantities;

namespace BarbuleOptics.Anatomy;

/// <summary>Number of rows: one count, or the counts of several units. Each 1 to 1,000.</summary>
public sealed record RowCount(ValueList<int> Counts)
{
    /// <summary>Most rows that a layer may have.</summary>
    public const int Most = 1000;

    /// <summary>One row.</summary>
    public static RowCount One { get; } = new([1]);

    /// <summary>The count that the mean geometry takes: the mean, rounded to the nearest whole number (halves up).</summary>
    public int Central => (int)Math.Floor(Counts.Average() + 0.5);
}
