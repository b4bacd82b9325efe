namespace BarbuleOptics.Ensembles.Statistics;

/// <summary>The standard error of an estimate from independent replicates of it: their standard deviation over the root of their number.</summary>
internal static class ReplicateError
{
    /// <summary>The standard error of the mean of <paramref name="estimates"/>; 0 where there is one or none.</summary>
    public static double Of(IEnumerable<double> estimates)
    {
        double[] all = [.. estimates];
        if (all.Length < 2)
            return 0;
        double mean = all.Average(), squares = all.Sum(estimate => (estimate - mean) * (estimate - mean));
        return Math.Sqrt(squares / (all.Length - 1) / all.Length);
    }
}
