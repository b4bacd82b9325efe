using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Joining;

/// <summary>Finds round bodies of one cell that make one row of rods: centers at one depth, at multiples of a small part of the spacing.</summary>
internal static class RodCells
{
    /// <summary>Most parts of the spacing.</summary>
    public const int MostParts = 4;

    /// <summary>Distance from such a place that is taken for rounding, as a share of the spacing.</summary>
    private const double Rounding = 1e-9;

    /// <summary>The rods of a cell of round bodies, those of one row together; bodies in no such places stay alone.</summary>
    public static IEnumerable<CellBody[]> Of(SectionRun run)
    {
        foreach (IGrouping<double, CellBody> level in run.Cell.GroupBy(body => Math.Round(body.ZNm / (Rounding * run.SpacingNm))))
        {
            CellBody[] bodies = [.. level];
            if (bodies.Length == 1 || PartsOf(bodies, run.SpacingNm) > 0)
            {
                yield return bodies;
                continue;
            }
            foreach (CellBody body in bodies)
                yield return [body];
        }
    }

    /// <summary>The least number of parts of the spacing whose multiples all distances along x are; 0 where there is none.</summary>
    public static int PartsOf(IReadOnlyList<CellBody> bodies, double spacingNm)
    {
        for (int parts = 1; parts <= MostParts; parts++)
        {
            if (bodies.All(body => Math.Abs(Offset(bodies[0], body, spacingNm, parts) - PlaceOf(bodies[0], body, spacingNm, parts)) <= parts * Rounding))
                return parts;
        }
        return 0;
    }

    /// <summary>Place of a body relative to the first, in parts of the spacing.</summary>
    public static int PlaceOf(CellBody first, CellBody body, double spacingNm, int parts) => (int)Math.Round(Offset(first, body, spacingNm, parts));

    private static double Offset(CellBody first, CellBody body, double spacingNm, int parts) => (body.XNm - first.XNm) / spacingNm * parts;
}
