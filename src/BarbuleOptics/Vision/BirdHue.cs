using BarbuleOptics.Quantities;

namespace BarbuleOptics.Vision;

/// <summary>The hue of a color to a bird, in a word made of the cones that it excites most.</summary>
/// <remarks>
/// <para>The words and boundaries are this program's own; no standard fixes them (common practice, no source). With p the relative catches (gray has 1/4 each)
/// and p1 the largest, the word names, from short to long wavelengths and joined by hyphens, every cone with p - 1/4 at least half of p1 - 1/4:
/// "medium", "ultraviolet-short", "short-medium-long". Where the <see cref="TetrahedralColor.Chroma"/> is below 0.03 - about a tenth more or less in one cone,
/// near what a Weber fraction of 0.1 lets it notice - it is "achromatic".</para>
/// <para>Nonspectral: no single wavelength looks like it, since the cones with the two largest relative catches are not neighbors. Never said of an
/// achromatic color.</para>
/// </remarks>
/// <param name="Term">The word.</param>
/// <param name="IsNonspectral">Whether the two largest relative catches are not neighbors.</param>
public readonly record struct BirdHue(string Term, bool IsNonspectral)
{
    /// <summary>Chroma below which a color counts as achromatic.</summary>
    public const double AchromaticChroma = 0.03;

    /// <summary>The word for an achromatic color.</summary>
    public const string Achromatic = "achromatic";

    private const double LeastShareOfLargest = 0.5;

    /// <summary>The hue of a color by its relative catches.</summary>
    /// <param name="relative">Of the four single cones, from the shortest.</param>
    /// <param name="names">What the cones are called, in the same order.</param>
    /// <exception cref="ArgumentException">There are not four.</exception>
    public static BirdHue Of(ReadOnlySpan<double> relative, IReadOnlyList<string> names)
    {
        int cones = ConesOf(relative, out bool isNonspectral);
        return new BirdHue(TermOf(cones, names), isNonspectral);
    }

    /// <summary>The cones that name the hue, for many colors: allocates nothing.</summary>
    /// <param name="relative">Relative catches of the four single cones, from the shortest.</param>
    /// <param name="isNonspectral">Whether the two largest are not neighbors.</param>
    /// <returns>Bit 0 for the shortest cone, to bit 3 for the long one; 0 for an achromatic color. <see cref="TermOf"/> makes the word.</returns>
    /// <exception cref="ArgumentException">There are not four.</exception>
    public static int ConesOf(ReadOnlySpan<double> relative, out bool isNonspectral)
    {
        Guard.SameLength(VisualSystem.SingleCount, relative.Length, nameof(relative));
        isNonspectral = false;
        if (new TetrahedralColor(relative).Chroma < AchromaticChroma)
            return 0;
        int first = 0;
        for (int i = 1; i < relative.Length; i++)
            first = relative[i] > relative[first] ? i : first;
        int second = first == 0 ? 1 : 0;
        for (int i = 0; i < relative.Length; i++)
            second = i != first && relative[i] > relative[second] ? i : second;
        isNonspectral = Math.Abs(first - second) > 1;
        double least = LeastShareOfLargest * (relative[first] - TetrahedralColor.Equal);
        int cones = 0;
        for (int i = 0; i < relative.Length; i++)
            cones |= relative[i] - TetrahedralColor.Equal >= least ? 1 << i : 0;
        return cones;
    }

    /// <summary>The word for the cones that <see cref="ConesOf"/> found.</summary>
    /// <exception cref="ArgumentException">There are not four names.</exception>
    public static string TermOf(int cones, IReadOnlyList<string> names)
    {
        ArgumentNullException.ThrowIfNull(names);
        Guard.SameLength(VisualSystem.SingleCount, names.Count, nameof(names));
        return cones == 0 ? Achromatic : string.Join('-', names.Where((_, i) => (cones >> i & 1) == 1));
    }
}
