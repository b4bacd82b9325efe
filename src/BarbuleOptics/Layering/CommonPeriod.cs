namespace BarbuleOptics.Layering;

/// <summary>The shortest length that is a whole number of several spacings.</summary>
internal static class CommonPeriod
{
    /// <summary>Most cells of one spacing that a common period may hold.</summary>
    public const int MostCells = 6;

    /// <summary>Least common multiple of the numbers up to six: the longest spacing's cells in a period of spacings that agree pair by pair.</summary>
    private const int MostCombinedCells = 60;

    private const double Tolerance = 1e-9;

    /// <summary>The common period of spacings in nm; null when there is none of at most six cells of each.</summary>
    public static double? Of(params ReadOnlySpan<double> spacingsNm) => Find(spacingsNm, MostCells, MostCells, Tolerance);

    /// <summary>The common period of spacings in nm any two of which have one (<see cref="Of"/>), however many cells of each it holds.</summary>
    public static double OfPairwise(params ReadOnlySpan<double> spacingsNm)
        => Find(spacingsNm, MostCombinedCells, MostCombinedCells * MostCells, 4 * Tolerance)
            ?? throw new ArgumentException("Spacings without a common period share a depth.", nameof(spacingsNm));

    private static double? Find(ReadOnlySpan<double> spacingsNm, int mostOfLongest, int mostOfAny, double tolerance)
    {
        double longest = 0;
        foreach (double spacing in spacingsNm)
            longest = Math.Max(longest, spacing);
        for (int cells = 1; cells <= mostOfLongest; cells++)
        {
            if (IsWhole(cells * longest, spacingsNm, mostOfAny, tolerance))
                return cells * longest;
        }
        return null;
    }

    private static bool IsWhole(double periodNm, ReadOnlySpan<double> spacingsNm, int mostCells, double tolerance)
    {
        foreach (double spacing in spacingsNm)
        {
            double ratio = periodNm / spacing, whole = Math.Round(ratio);
            if (whole > mostCells || Math.Abs(ratio - whole) > tolerance * whole)
                return false;
        }
        return true;
    }
}
