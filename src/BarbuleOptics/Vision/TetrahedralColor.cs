using BarbuleOptics.Quantities;

namespace BarbuleOptics.Vision;

/// <summary>A color as a place in the tetrahedron whose corners are light that excites one kind of single cone alone; gray is its center.</summary>
/// <remarks>
/// <para>With relative catches u, s, m, l (shortest to long cone, sum 1): x = (1 - 2s - m - u)/2 sqrt(3/2), y = (-1 + 3m + u)/(2 sqrt 2), z = u - 1/4.
/// Source: Endler and Mielke 2005, Biol. J. Linn. Soc. 86:405, 10.1111/j.1095-8312.2005.00540.x (formulas from memory; the tests check that the corners
/// are those of a regular tetrahedron, 3/4 from its center).</para>
/// <para>Axes: z points to the shortest cone; seen from there the medium cone lies at azimuth 90 degrees, the short one at 210, the long one at 330. Azimuth
/// is atan2(y, x), elevation the angle above the plane of those three corners.</para>
/// </remarks>
public readonly record struct TetrahedralColor
{
    private readonly double _least;

    /// <param name="catches">Adapted catches of the four single cones, from the shortest. What lies below 0 counts as 0; all 0 is gray.</param>
    /// <exception cref="ArgumentException">There are not four, or one is NaN or infinite.</exception>
    public TetrahedralColor(ReadOnlySpan<double> catches)
    {
        Span<double> relative = stackalloc double[VisualSystem.SingleCount];
        RelativeCatches(catches, relative);
        (double u, double s, double m) = (relative[0], relative[1], relative[2]);
        X = (1 - 2 * s - m - u) / 2 * Math.Sqrt(1.5);
        Y = (-1 + 3 * m + u) / (2 * Math.Sqrt(2));
        Z = u - Equal;
        // The far face is met where the least catch reaches 0. The default value is gray, too.
        _least = Equal - Math.Min(Math.Min(u, s), Math.Min(m, relative[3]));
    }

    /// <summary>The relative catch of each cone that gray has.</summary>
    internal const double Equal = 1.0 / VisualSystem.SingleCount;

    /// <summary>Greatest chroma of all: that of a corner.</summary>
    public const double CornerChroma = 0.75;

    /// <summary>x, from the short cone's side towards the long one's.</summary>
    public double X { get; }

    /// <summary>y, towards the medium cone.</summary>
    public double Y { get; }

    /// <summary>z, towards the shortest cone: its relative catch less 1/4.</summary>
    public double Z { get; }

    /// <summary>Distance from gray, 0 to 3/4.</summary>
    public double Chroma => Math.Sqrt(X * X + Y * Y + Z * Z);

    /// <summary>The chroma as a share of the largest that is possible in its direction, 0 to 1: 1 - 4 times the least relative catch.</summary>
    public double ChromaShare => _least / Equal;

    /// <summary>atan2(y, x) in degrees, at least 0 and below 360; 0 on the axis itself.</summary>
    public double AzimuthDegrees
    {
        get
        {
            double degrees = double.RadiansToDegrees(Math.Atan2(Y, X));
            return degrees >= 0 ? degrees : degrees + 360 < 360 ? degrees + 360 : 0;
        }
    }

    /// <summary>asin(z/chroma) in degrees, -90 to 90; 0 for gray.</summary>
    public double ElevationDegrees => Chroma > 0 ? double.RadiansToDegrees(Math.Asin(Math.Clamp(Z / Chroma, -1, 1))) : 0;

    /// <summary>Catches as shares of their sum; what lies below 0 counts as 0, and where nothing is caught all are equal.</summary>
    /// <exception cref="ArgumentException">There are not four of each, or one is NaN or infinite.</exception>
    public static void RelativeCatches(ReadOnlySpan<double> catches, Span<double> relative)
    {
        Guard.SameLength(VisualSystem.SingleCount, catches.Length, nameof(catches));
        Guard.SameLength(VisualSystem.SingleCount, relative.Length, nameof(relative));
        double sum = 0;
        foreach (double value in catches)
            sum += Math.Max(0, Guard.Finite(value, nameof(catches)));
        for (int i = 0; i < relative.Length; i++)
            relative[i] = sum > LeastSum ? Math.Max(0, catches[i]) / sum : Equal;
    }

    // The rounding of a solver: nothing has a color below.
    private const double LeastSum = 1e-9;
}
