namespace BarbuleOptics.Layering;

/// <summary>Distance from surface to surface of two convex outlines.</summary>
/// <remarks>The distance of two convex bodies is the greatest, over all unit directions u, of d.u - h1(u) - h2(-u), with d the
/// vector between centers and h the support functions (separating-axis theorem); where they overlap that same maximum is
/// minus the least shift that parts them. Outlines here are symmetric, so one quadrant of directions serves. For two equal
/// ellipses it is zero exactly at the scaled distance 1. The best of 49 directions is refined between its neighbors, where the maximum is
/// single for outlines that do not overlap; for deep overlaps the value is a lower bound, and only its sign is used.</remarks>
internal static class Clearance
{
    private const int Samples = 48;
    private static readonly double GoldenSection = (Math.Sqrt(5) - 1) / 2;

    /// <summary>Distance in nm, negative where they overlap, of two outlines whose centers are (dx, dz) apart.</summary>
    public static double Between(in Outline first, in Outline second, double dxNm, double dzNm)
    {
        double dx = Math.Abs(dxNm), dz = Math.Abs(dzNm);
        if (first.IsCircle && second.IsCircle)
            return Math.Sqrt(dx * dx + dz * dz) - first.HalfWidthNm - second.HalfWidthNm;
        int best = 0;
        double most = double.NegativeInfinity;
        for (int i = 0; i <= Samples; i++)
        {
            double gap = Along(first, second, dx, dz, i * (Math.PI / 2 / Samples));
            if (gap > most)
                (most, best) = (gap, i);
        }

        double low = Math.Max(best - 1, 0) * (Math.PI / 2 / Samples);
        double high = Math.Min(best + 1, Samples) * (Math.PI / 2 / Samples);
        while (high - low > 1e-9)
        {
            double left = high - GoldenSection * (high - low), right = low + GoldenSection * (high - low);
            if (Along(first, second, dx, dz, left) > Along(first, second, dx, dz, right))
                high = right;
            else
                low = left;
        }
        return Math.Max(most, Along(first, second, dx, dz, (low + high) / 2));
    }

    /// <summary>How far below the first the second must lie, in nm, to clear it by <paramref name="clearanceNm"/>; null when they clear at any depth.</summary>
    public static double? LeastDepth(in Outline first, in Outline second, double dxNm, double clearanceNm)
    {
        // Side by side they are clear already: the direction along the surface alone shows it.
        if (Math.Abs(dxNm) - first.HalfWidthNm - second.HalfWidthNm >= clearanceNm || Between(first, second, dxNm, 0) >= clearanceNm)
            return null;
        if (first.IsCircle && second.IsCircle)
        {
            double reach = first.HalfWidthNm + second.HalfWidthNm + clearanceNm;
            return Math.Sqrt((reach - dxNm) * (reach + dxNm));
        }
        double low = 0, high = first.HalfHeightNm + second.HalfHeightNm + Math.Max(clearanceNm, 0);
        while (high - low > 1e-10 * high)
        {
            double middle = (low + high) / 2;
            if (Between(first, second, dxNm, middle) < clearanceNm)
                low = middle;
            else
                high = middle;
        }
        return high;
    }

    private static double Along(in Outline first, in Outline second, double dx, double dz, double direction)
    {
        (double uz, double ux) = Math.SinCos(direction);
        return dx * ux + dz * uz - first.Reach(ux, uz) - second.Reach(ux, uz);
    }
}
