using BarbuleOptics.Color;

namespace BarbuleOptics.Ensembles.Draws;

/// <summary>The hue terms by number, so that they can be counted.</summary>
internal static class HueTermList
{
    /// <summary>All terms: those with a hue around the circle, then the achromatic ones.</summary>
    public static IReadOnlyList<string> Terms { get; } = [.. HueTerms.Sectors.Select(sector => sector.Term), .. HueTerms.Achromatic.Select(band => band.Term)];

    /// <summary>The number of the term of a color; the same as <see cref="HueTerms.Of"/> names.</summary>
    public static int NumberOf(CieLab color)
    {
        if (HueTerms.IsAchromatic(color))
        {
            ReadOnlySpan<LightnessBand> bands = HueTerms.Achromatic.AsSpan();
            for (int i = 0; i < bands.Length; i++)
            {
                if (bands[i].Contains(color.L))
                    return HueTerms.Sectors.Count + i;
            }
        }
        ReadOnlySpan<HueSector> sectors = HueTerms.Sectors.AsSpan();
        double degrees = color.HueDegrees;
        for (int i = 0; i < sectors.Length; i++)
        {
            if (sectors[i].Contains(degrees))
                return i;
        }
        throw new InvalidOperationException("A color without a term.");
    }
}
