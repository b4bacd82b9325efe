namespace BarbuleOptics.Color;

/// <summary>The chromaticities of single wavelengths and the purple line that joins their ends: where dominant wavelengths are read.</summary>
/// <remarks>
/// 380 to 700 nm at 1 nm, straight lines between: beyond these ends the chromaticity hardly moves (and turns back, for the 1964 observer).
/// Source of the definitions: CIE 015 (dominant wavelength, complementary wavelength, excitation purity).
/// </remarks>
internal sealed class SpectralLocus
{
    private const int FirstNm = 380;
    private const int LastNm = 700;

    // A chromaticity this near the white has no direction.
    private const double LeastDistance = 1e-9;

    private static readonly SpectralLocus TwoDegree = new(ColorMatchingFunctions.Of(StandardObserver.Cie1931TwoDegree));
    private static readonly SpectralLocus TenDegree = new(ColorMatchingFunctions.Of(StandardObserver.Cie1964TenDegree));

    private readonly Chromaticity[] _points = new Chromaticity[LastNm - FirstNm + 1];

    private SpectralLocus(ColorMatchingFunctions observer)
    {
        for (int i = 0; i < _points.Length; i++)
        {
            int row = FirstNm - ColorMatchingFunctions.FirstNm + i;
            double sum = observer.X[row] + observer.Y[row] + observer.Z[row];
            _points[i] = new Chromaticity(observer.X[row] / sum, observer.Y[row] / sum);
        }
    }

    /// <summary>The locus of <paramref name="observer"/>.</summary>
    public static SpectralLocus Of(StandardObserver observer)
        => observer == StandardObserver.Cie1964TenDegree ? TenDegree : TwoDegree;

    /// <summary>Dominant wavelength, in nm, and excitation purity of <paramref name="color"/> relative to <paramref name="white"/>.</summary>
    /// <returns>
    /// The wavelength negative, as the complementary one, where the line meets the purples; null with purity 0 at the white itself. The purity
    /// is 0 at the white, 1 on the locus or the purple line.
    /// </returns>
    public (double? WavelengthNm, double Purity) Locate(Chromaticity color, Chromaticity white)
    {
        double dx = color.X - white.X, dy = color.Y - white.Y;
        if (Math.Sqrt(dx * dx + dy * dy) < LeastDistance)
            return (null, 0);

        double onLocus = Meet(white, dx, dy, out double wavelengthNm);
        double onPurples = Crossing(white, dx, dy, _points[^1], _points[0], out _);
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
        for (int i = 0; i + 1 < _points.Length; i++)
        {
            double distance = Crossing(white, dx, dy, _points[i], _points[i + 1], out double share);
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
