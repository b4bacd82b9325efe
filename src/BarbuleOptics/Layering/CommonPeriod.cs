namespace BarbuleOptics.Layering;

/// <summary>The shortest length that is a whole number of several spacings.</summary>
internal static class CommonPeriod
{
    /// <summary>Most cells of one spacing that a common period may hold.</summary>
    public const int MostCells = 6;

    private const double Tolerance = 1e-9;

    /// <summary>The common period of two spacings in nm; null when there is none of at most six cells of each.</summary>
    public static double? Of(double firstNm, double secondNm)
    {
        for (int cells = 1; cells <= MostCells; cells++)
        {
            double ratio = cells * firstNm / secondNm;
            double whole = Math.Round(ratio);
            if (whole is >= 1 and <= MostCells && Math.Abs(ratio - whole) <= Tolerance * whole)
                return cells * firstNm;
        }
        return null;
    }

    /// <summary>The common period of all runs in nm; null when there is none of at most six cells of each.</summary>
    public static double? Of(IEnumerable<SectionRun> runs)
    {
        double? period = null;
        foreach (double spacing in runs.Select(run => run.SpacingNm).Distinct())
        {
            period = period is double soFar ? Of(soFar, spacing) : spacing;
            if (period is null)
                return null;
        }
        return period;
    }
}
