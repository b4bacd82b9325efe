namespace BarbuleOptics.Ensembles.Statistics;

/// <summary>The range of a histogram, from the first values that it will hold.</summary>
internal static class ColumnRange
{
    /// <summary>Share of the first values beyond each end of what counts as their core.</summary>
    private const double Tail = 0.005;

    /// <summary>The core of <paramref name="values"/> and as much again, within some bounds.</summary>
    /// <param name="values">At least one; sorted here.</param>
    /// <param name="least">Lowest value possible.</param>
    /// <param name="most">Highest value possible.</param>
    public static (double From, double To) Of(Span<double> values, double least, double most)
    {
        values.Sort();
        int outside = (int)(Tail * values.Length);
        double low = values[outside], high = values[values.Length - 1 - outside];
        // Draws that agree but for rounding are one bin wide.
        double room = Math.Max((high - low) / 2, 1e-9 * Math.Max(1, Math.Abs(high)));
        return (Math.Max(least, low - room), Math.Min(most, high + room));
    }
}
