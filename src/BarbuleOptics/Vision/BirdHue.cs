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
        ArgumentNullException.ThrowIfNull(names);
        Guard.SameLength(VisualSystem.SingleCount, relative.Length, nameof(relative));
        Guard.SameLength(VisualSystem.SingleCount, names.Count, nameof(names));
        if (new TetrahedralColor(relative).Chroma < AchromaticChroma)
            return new BirdHue(Achromatic, false);
        int first = 0;
        for (int i = 1; i < relative.Length; i++)
            first = relative[i] > relative[first] ? i : first;
        int second = first == 0 ? 1 : 0;
        for (int i = 0; i < relative.Length; i++)
            second = i != first && relative[i] > relative[second] ? i : second;
        double least = LeastShareOfLargest * (relative[first] - TetrahedralColor.Equal);
        var excited = new List<string>();
        for (int i = 0; i < relative.Length; i++)
        {
            if (relative[i] - TetrahedralColor.Equal >= least)
                excited.Add(names[i]);
        }
        return new BirdHue(string.Join('-', excited), Math.Abs(first - second) > 1);
    }
}
