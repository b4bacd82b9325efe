namespace BarbuleOptics.Spectra.Instruments;

/// <summary>Directions of rods that are normally distributed about their mean, as few turns with their shares.</summary>
/// <remarks>Gauss-Hermite rule of five points, right for polynomials of degree 9 in the turn. Source: Abramowitz and Stegun, Handbook of Mathematical Functions,
/// table 25.10 (from memory); x there is the turn over sqrt(2) standard deviations.</remarks>
internal static class RodTurns
{
    private static readonly (double At, double Share)[] Rule =
    [
        (-2.0201828704560856, 0.01995324205904591), (-0.9585724646138185, 0.3936193231522412), (0, 0.9453087204829419),
        (0.9585724646138185, 0.3936193231522412), (2.0201828704560856, 0.01995324205904591),
    ];

    /// <summary>Turns in radians and their shares, which add up to 1; one of no turn for rods that are all alike.</summary>
    /// <param name="deviation">Standard deviation, in radians, 0 or above.</param>
    public static (double Turn, double Share)[] Of(double deviation)
        => deviation == 0 ? [(0, 1)] : [.. Rule.Select(point => (Math.Sqrt(2) * deviation * point.At, point.Share / Math.Sqrt(Math.PI)))];
}
