using BarbuleOptics.Quantities;

namespace BarbuleOptics.Color;

/// <summary>The chromaticities of single wavelengths and the purple line that joins their ends: where dominant wavelengths are read.</summary>
/// <remarks>
/// 380 to 700 nm at 1 nm, straight lines between: beyond these ends the chromaticity hardly moves (and turns back, for the 1964 observer).
/// Source of the definitions: CIE 015 (dominant wavelength, complementary wavelength, excitation purity).
/// </remarks>
public sealed class SpectralLocus
{
    /// <summary>Wavelength of the first point, in nanometres.</summary>
    public const int FirstNm = 380;

    /// <summary>Wavelength of the last point, in nanometres.</summary>
    public const int LastNm = 700;

    // A chromaticity this near the white has no direction.
    private const double LeastDistance = 1e-9;

    private static readonly SpectralLocus TwoDegree = new(ColorMatchingFunctions.Of(StandardObserver.Cie1931TwoDegree));
    private static readonly SpectralLocus TenDegree = new(ColorMatchingFunctions.Of(StandardObserver.Cie1964TenDegree));

    private SpectralLocus(ColorMatchingFunctions observer)
    {
        var points = new Chromaticity[LastNm - FirstNm + 1];
        for (int i = 0; i < points.Length; i++)
        {
            int row = FirstNm - ColorMatchingFunctions.FirstNm + i;
            double sum = observer.X[row] + observer.Y[row] + observer.Z[row];
            points[i] = new Chromaticity(observer.X[row] / sum, observer.Y[row] / sum);
        }

        Points = [.. points];
    }

    /// <summary>The chromaticities of 380, 381 ... 700 nm.</summary>
    public ValueList<Chromaticity> Points { get; }

    /// <summary>The locus of <paramref name="observer"/>.</summary>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="observer"/> is no member of the enumeration.</exception>
    public static SpectralLocus Of(StandardObserver observer) => observer switch
    {
        StandardObserver.Cie1931TwoDegree => TwoDegree,
        StandardObserver.Cie1964TenDegree => TenDegree,
        _ => throw new ArgumentOutOfRangeException(nameof(observer), observer, "Must be a member of StandardObserver."),
    };

    /// <summary>Dominant wavelength, in nm, and excitation purity of <paramref name="color"/> relative to <paramref name="white"/>.</summary>
    /// <returns>
    /// The wavelength negative, as the complementary one, where the line meets the purples; null with purity 0 at the white itself. The purity
    /// is 0 at the white, 1 on the locus or the purple line.
    /// </returns>
    /// <remarks>The white must lie between the locus and the purple line.</remarks>
    public (double? WavelengthNm, double Purity) Locate(Chromaticity color, Chromaticity white)
    {
        double dx = color.X - white.X, dy = color.Y - white.Y;
        if (Math.Sqrt(dx * dx + dy * dy) < LeastDistance)
            return (null, 0);

        double onLocus = Meet(white, dx, dy, out double wavelengthNm);
        double onPurples = Crossing(white, dx, dy, Points[^1], Points[0], out _);
        if (onLocus <= onPurples)
            return (wavelengthNm, 1 / onLocus);
        Meet(white, -dx, -dy, out double complementaryNm);
        return (-complementaryNm, 1 / onPurples);
    }

    /// <summary>Where the ray first meets the locus, in lengths of (dx, dy); infinity when it does not.</summary>
    private double Meet(Chromaticity white, double dx, double dy, out double wavelengthNm)
    {
        double nearest = double.PositiveInfinity;
        wavelengthNm = double.NaN;
        for (int i = 0; i + 1 < Points.Count; i++)
        {
            double distance = Crossing(white, dx, dy, Points[i], Points[i + 1], out double share);
            if (distance < nearest)
                (nearest, wavelengthNm) = (distance, FirstNm + i + share);
        }

        return nearest;
    }

    /// <summary>Where white + t (dx, dy), t above 0, crosses the line from <paramref name="p"/> to <paramref name="q"/>: t, and the share of the line.</summary>
    private static double Crossing(Chromaticity white, double dx, double dy, Chromaticity p, Chromaticity q, out double share)
    {
        // A ray through a joint must not slip between its two lines.
        const double Slack = 1e-12;
        double ex = q.X - p.X, ey = q.Y - p.Y, fx = p.X - white.X, fy = p.Y - white.Y;
        double determinant = dx * ey - dy * ex;
        double t = (fx * ey - fy * ex) / determinant;
        share = (fx * dy - fy * dx) / determinant;
        return t > 0 && share >= -Slack && share <= 1 + Slack ? t : double.PositiveInfinity;
    }
}
