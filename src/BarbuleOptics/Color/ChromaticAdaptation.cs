namespace BarbuleOptics.Color;

/// <summary>The color that looks the same under another white, by the linear Bradford transform.</summary>
/// <remarks>
/// Source: ICC.1 (profile specification), annex on chromatic adaptation: von Kries scaling in the Bradford cone space; matrix from memory,
/// checked against the D50-adapted sRGB primaries that ICC profiles carry.
/// </remarks>
public static class ChromaticAdaptation
{
    /// <summary>The name of the transform in output.</summary>
    public const string BradfordName = "Bradford";

    private static readonly Matrix3 ToCones = new(new[,]
    {
        { 0.8951, 0.2664, -0.1614 },
        { -0.7502, 1.7135, 0.0367 },
        { 0.0389, -0.0685, 1.0296 },
    });

    private static readonly Matrix3 FromCones = ToCones.Inverse();

    /// <summary>Carries <paramref name="color"/>, seen under <paramref name="from"/>, to the white <paramref name="to"/>.</summary>
    /// <param name="color">The color under the first white.</param>
    /// <param name="from">The white it was computed for; its cone responses must be above zero.</param>
    /// <param name="to">The white wanted.</param>
    /// <exception cref="ArgumentOutOfRangeException">A cone response of <paramref name="from"/> is not above zero.</exception>
    public static Tristimulus Bradford(Tristimulus color, Tristimulus from, Tristimulus to)
    {
        var (l, m, s) = ToCones.Times(color.X, color.Y, color.Z);
        var (fromL, fromM, fromS) = ToCones.Times(from.X, from.Y, from.Z);
        var (toL, toM, toS) = ToCones.Times(to.X, to.Y, to.Z);
        if (!(fromL > 0 && fromM > 0 && fromS > 0))
            throw new ArgumentOutOfRangeException(nameof(from), from, "Every cone response of the white must be above 0.");
        var (x, y, z) = FromCones.Times(l * toL / fromL, m * toM / fromM, s * toS / fromS);
        return new Tristimulus(x, y, z);
    }
}
