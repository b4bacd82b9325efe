namespace BarbuleOptics.Ensembles.Draws;

/// <summary>Shares one progress among runs that follow each other.</summary>
internal sealed class DrawProgress(IProgress<double>? progress, int mainDraws, int melaninDraws)
{
    private readonly double _total = mainDraws + (double)melaninDraws * MelaninSets.Names.Count;
    private double _before;

    /// <summary>The progress of the next run.</summary>
    public IProgress<double>? Next(int draws)
    {
        if (progress is null)
            return null;
        double from = _before / _total, share = draws / _total;
        _before += draws;
        return new Part(progress, from, share);
    }

    private sealed class Part(IProgress<double> whole, double from, double share) : IProgress<double>
    {
        public void Report(double value) => whole.Report(Math.Min(1, from + share * value));
    }
}
