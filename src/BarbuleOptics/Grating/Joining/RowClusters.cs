using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Joining;

/// <summary>Finds rows that must be solved together because they share depths.</summary>
/// <remarks>Rows of round rods may share depths with each other: waves between them are exact off the lines of centers, and only rows whose
/// centers lie too close in depth need too many orders.</remarks>
internal static class RowClusters
{
    /// <summary>Overlap in depth that is taken for touching, in nm.</summary>
    private const double TouchingNm = 1e-6;

    /// <summary>Least distance in depth of the centers of two rows of rods that are solved one by one, as a share of the sum of their radii.</summary>
    public const double LeastShare = 0.6;

    /// <summary>The clusters from the top down; most hold one row.</summary>
    public static List<List<PlannedRow>> Of(IEnumerable<PlannedRow> rows)
    {
        var clusters = rows.OrderBy(row => row.TopNm).ThenBy(row => row.CenterNm).Select(row => new List<PlannedRow> { row }).ToList();
        // A cluster grows over what it meets, which may make it meet more.
        for (bool grown = true; grown;)
        {
            grown = false;
            for (int i = 0; i + 1 < clusters.Count; i++)
            {
                double bottomNm = clusters[i].Max(row => row.BottomNm);
                for (int j = i + 1; j < clusters.Count && clusters[j][0].TopNm < bottomNm - TouchingNm;)
                {
                    if (!MustJoin(clusters[i], clusters[j]))
                    {
                        j++;
                        continue;
                    }
                    clusters[i].AddRange(clusters[j]);
                    clusters.RemoveAt(j);
                    bottomNm = clusters[i].Max(row => row.BottomNm);
                    grown = true;
                }
            }
        }
        return [.. clusters.OrderBy(cluster => cluster.Average(row => row.CenterNm))];
    }

    private static bool MustJoin(List<PlannedRow> first, List<PlannedRow> second)
    {
        if (first is not [{ Rods: not null } one] || second is not [{ Rods: not null } other])
            return true;
        // Rows of flattened rods are solved one by one where they do not overlap.
        double leastShare = one.Rods.All(IsRound) && other.Rods.All(IsRound) ? LeastShare : 1;
        return Math.Abs(other.CenterNm - one.CenterNm) < leastShare * (one.RadiusNm + other.RadiusNm) - TouchingNm;
    }

    private static bool IsRound(CellBody rod) => rod.Outer.HalfWidthNm == rod.Outer.HalfHeightNm;
}
