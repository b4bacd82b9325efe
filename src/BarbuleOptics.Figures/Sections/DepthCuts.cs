using BarbuleOptics.Layering;

namespace BarbuleOptics.Figures.Sections;

/// <summary>Chooses what a deep section is drawn without: first what holds nothing but matrix, then the rows in the middle.</summary>
internal static class DepthCuts
{
    private const int MostBareCuts = 2;
    private const double KeptPt = 16;
    private const double LeastCutPt = 14;
    private const double TopShare = 0.62;
    private const double LongNm = 1000;
    private const double LongKeptNm = 150;

    /// <summary>The parts left out, from the top down; none when everything fits.</summary>
    /// <param name="section">The section.</param>
    /// <param name="bottomNm">Depth down to which it is drawn.</param>
    /// <param name="roomNm">Depth that there is room for.</param>
    /// <param name="ptPerNm">Scale.</param>
    public static IReadOnlyList<(double FromNm, double ToNm)> Find(Section section, double bottomNm, double roomNm, double ptPerNm)
    {
        double excessNm = bottomNm - roomNm;
        if (excessNm <= 0 && SpareNm(section, bottomNm) == 0)
            return [];
        var cuts = new List<(double FromNm, double ToNm)>();
        double keptNm = KeptPt / ptPerNm;
        foreach ((double fromNm, double toNm) in Bare(section, bottomNm).OrderByDescending(bare => bare.ToNm - bare.FromNm).ThenBy(bare => bare.FromNm).Take(MostBareCuts))
        {
            double lengthNm = Math.Max(Math.Min(toNm - fromNm - 2 * keptNm, excessNm), SpareNm(section, (fromNm, toNm), bottomNm));
            if (lengthNm < LeastCutPt / ptPerNm)
                continue;
            double startNm = (fromNm + toNm - lengthNm) / 2;
            cuts.Add((startNm, startNm + lengthNm));
            excessNm -= lengthNm;
        }
        cuts.Sort();
        return excessNm > LeastCutPt / ptPerNm ? WithMiddle(cuts, bottomNm, roomNm) : cuts;
    }

    /// <summary>How much of the depth is left out even where there is room: the middle of what is bare, long and more than all the rest.</summary>
    /// <remarks>A barbule's thick back would else take the page from its rows.</remarks>
    public static double SpareNm(Section section, double bottomNm) => Bare(section, bottomNm).Sum(bare => SpareNm(section, bare, bottomNm));

    private static double SpareNm(Section section, (double FromNm, double ToNm) bare, double bottomNm)
    {
        double lengthNm = bare.ToNm - bare.FromNm;
        bool isSpare = section.Runs.Count + section.Films.Count > 0 && lengthNm > LongNm && lengthNm > bottomNm - lengthNm;
        return isSpare ? lengthNm - 2 * LongKeptNm : 0;
    }

    /// <summary>Stretches of depth without bodies and films.</summary>
    public static IEnumerable<(double FromNm, double ToNm)> Bare(Section section, double bottomNm)
    {
        IEnumerable<(double From, double To)> rows = section.Runs.SelectMany(run => run.Rows.Select(row => (row.CenterNm + run.CellTopNm, row.CenterNm + run.CellBottomNm)));
        IEnumerable<(double From, double To)> films = section.Films.Select(film => (film.TopNm, film.BottomNm));
        double freeFrom = 0;
        foreach ((double from, double to) in rows.Concat(films).Order())
        {
            if (from > freeFrom)
                yield return (freeFrom, from);
            freeFrom = Math.Max(freeFrom, to);
        }
        if (bottomNm > freeFrom)
            yield return (freeFrom, bottomNm);
    }

    /// <summary>Adds one cut that leaves as much of the top and of the bottom as there is room for, and takes in cuts that it meets.</summary>
    private static List<(double FromNm, double ToNm)> WithMiddle(List<(double FromNm, double ToNm)> cuts, double bottomNm, double roomNm)
    {
        double fromNm = TopShare * roomNm, toNm = bottomNm - (1 - TopShare) * roomNm;
        foreach ((double cutFromNm, double cutToNm) in cuts)
        {
            if (cutFromNm < fromNm)
                fromNm += cutToNm - cutFromNm;
        }
        foreach ((double cutFromNm, double cutToNm) in Enumerable.Reverse(cuts))
        {
            if (cutToNm > toNm)
                toNm -= cutToNm - cutFromNm;
        }
        if (toNm <= fromNm)
            return cuts;
        return [.. cuts.Where(cut => cut.ToNm < fromNm), (fromNm, toNm), .. cuts.Where(cut => cut.FromNm > toNm)];
    }
}
