using BarbuleOptics.Quantities;

namespace BarbuleOptics.Figures.Curves;

/// <summary>The samples of a curve that can be told apart on the page.</summary>
internal static class CurveTrace
{
    // Finer than a printer's dot.
    private const double ColumnPt = 0.1;

    /// <summary>Every sample; where several fall into one narrow column, its first, least, greatest and last.</summary>
    public static IReadOnlyList<int> Of(Spectrum reflectance, PlotFrame frame)
    {
        var kept = new List<int>();
        ReadOnlySpan<double> wavelengthsNm = reflectance.Grid.Nanometres;
        int first = 0;
        for (int i = 1; i <= wavelengthsNm.Length; i++)
        {
            if (i < wavelengthsNm.Length && Column(frame.X(wavelengthsNm[i])) == Column(frame.X(wavelengthsNm[first])))
                continue;
            kept.AddRange(Extremes(reflectance.Values, first, i - 1));
            first = i;
        }
        return kept;
    }

    private static long Column(double x) => (long)Math.Floor(x / ColumnPt);

    private static SortedSet<int> Extremes(ReadOnlySpan<double> values, int first, int last)
    {
        (int least, int greatest) = (first, first);
        for (int i = first; i <= last; i++)
        {
            if (values[i] < values[least])
                least = i;
            if (values[i] > values[greatest])
                greatest = i;
        }
        return [first, least, greatest, last];
    }
}
