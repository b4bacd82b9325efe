using BarbuleOptics.Anatomy;

namespace BarbuleOptics.Layering;

/// <summary>How close rows of one layer can lie in depth.</summary>
internal static class RowNesting
{
    /// <summary>The least pitch, in nm, at which every body clears those of the other rows by <paramref name="clearanceNm"/>.</summary>
    /// <remarks>Rows j and j + 1, and j and j + 2, decide: a row further down has the sideways place of one of these and lies deeper.</remarks>
    public static double LeastPitchNm(IReadOnlyList<CellBody> cell, double spacingNm, Stacking stacking, double clearanceNm)
    {
        double least = 0;
        for (int apart = 1; apart <= 2; apart++)
        {
            double shift = stacking == Stacking.Staggered && apart == 1 ? spacingNm / 2 : 0;
            foreach (CellBody upper in cell)
            {
                foreach (CellBody lower in cell)
                    least = Math.Max(least, LeastDepthNm(upper, lower, shift, spacingNm, clearanceNm) / apart);
            }
        }
        return least;
    }

    /// <summary>Depth of the lower body's row below the upper body's, in nm, at which they clear; negative infinity when they always do.</summary>
    public static double LeastDepthNm(CellBody upper, CellBody lower, double shiftNm, double periodNm, double clearanceNm)
    {
        double least = double.NegativeInfinity;
        double offset = Math.IEEERemainder(lower.XNm - upper.XNm + shiftNm, periodNm);
        for (int image = -1; image <= 1; image++)
        {
            double? depth = Clearance.LeastDepth(upper.Outer, lower.Outer, offset + image * periodNm, clearanceNm);
            if (depth is double needed)
                least = Math.Max(least, needed + upper.ZNm - lower.ZNm);
        }
        return least;
    }
}
