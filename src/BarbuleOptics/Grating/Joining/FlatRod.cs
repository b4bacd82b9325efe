using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Joining;

/// <summary>Which flattened rods are solved by multipoles: those for which few are enough.</summary>
/// <remarks>Limits within which the expansion was measured to converge: apart from their neighbors, not too flat, no thin wall.</remarks>
internal static class FlatRod
{
    private const double MostAspect = 4;
    private const double MostCoreAspect = 8;
    private const double MostCoreShare = 0.85;
    private const double LeastSpacing = 1.05;

    /// <summary>Whether the body, one in each cell of a period, is such a rod.</summary>
    public static bool Is(CellBody body, double spacingNm)
        => IsFlat(body.Outer, MostAspect) && spacingNm >= LeastSpacing * 2 * body.Outer.HalfWidthNm
            && (body.Core is not Outline core || (core.Shape == OutlineShape.Ellipse && Aspect(core) <= MostCoreAspect && Aspect(core) >= 1 / MostCoreAspect
                && core.HalfWidthNm <= MostCoreShare * body.Outer.HalfWidthNm && core.HalfHeightNm <= MostCoreShare * body.Outer.HalfHeightNm));

    private static bool IsFlat(Outline outline, double mostAspect)
        => outline.Shape == OutlineShape.Ellipse && Aspect(outline) >= 1 && Aspect(outline) <= mostAspect;

    private static double Aspect(Outline outline) => outline.HalfWidthNm / outline.HalfHeightNm;
}
