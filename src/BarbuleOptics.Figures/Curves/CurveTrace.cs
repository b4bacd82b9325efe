using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Figures.Curves;

/// <summary>The points of a curve on the page, no more of them than can be told apart.</summary>
internal static class CurveTrace
{
    // Finer than a printer's dot.
    private const double ColumnPt = 0.1;

    /// <summary>Every sample; where several fall into one narrow column, its first, least, greatest and last.</summary>
    public static IReadOnlyList<Point> Of(Spectrum reflectance, PlotFrame frame)
    {
        var points = new List<Point>();
        ReadOnlySpan<double> wavelengthsNm = reflectance.Grid.Nanometres;
        int first = 0;
        for (int i = 1; i <= wavelengthsNm.Length; i++)
        {
            if (i < wavelengthsNm.Length && Column(frame.X(wavelengthsNm[i])) == Column(frame.X(wavelengthsNm[first])))
                continue;
            foreach (int kept in Extremes(reflectance.Values, first, i - 1))
                points.Add(frame.At(wavelengthsNm[kept], reflectance[kept]));
            first = i;
        }
        return points;
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
