using BarbuleOptics.Quantities;

namespace BarbuleOptics.Color;

/// <summary>One plain word for every color: exactly one for each L*a*b*.</summary>
/// <remarks>
/// The words and angles are this program's own; no standard fixes them (common practice, no source). They lie about half-way between the
/// CIELAB hue angles of the principal Munsell hues (from memory: 5R 27, 5YR 63, 5Y 90, 5GY 120, 5G 165, 5BG 205, 5B 240, 5PB 280, 5P 320,
/// 5RP 355 degrees), moved where that would call a color of the web's CSS list by another name than its own: green begins at 130, so that
/// the green primary of sRGB (136) is green, and blue reaches to 308, since lines of one hue bend in CIELAB and the blue primary
/// stands at 306. Below the chroma limit, near Munsell chroma 1, a color has no hue; black and white end near Munsell value 2.5 and 8.5.
/// </remarks>
public static class HueTerms
{
    /// <summary>C*ab below which a color counts as achromatic.</summary>
    public const double AchromaticChroma = 5;

    /// <summary>The terms for colors with a hue, around the circle.</summary>
    public static ValueList<HueSector> Sectors { get; } =
    [
        new("red", 10, 45),
        new("orange", 45, 75),
        new("yellow", 75, 105),
        new("yellow-green", 105, 130),
        new("green", 130, 180),
        new("blue-green", 180, 225),
        new("blue", 225, 308),
        new("violet", 308, 322),
        new("purple", 322, 345),
        new("red-purple", 345, 10),
    ];

    /// <summary>The terms for achromatic colors, from dark to light.</summary>
    public static ValueList<LightnessBand> Achromatic { get; } =
    [
        new("black", double.NegativeInfinity, 25),
        new("gray", 25, 85),
        new("white", 85, double.PositiveInfinity),
    ];

    /// <summary>Whether <paramref name="color"/> has too little chroma to have a hue.</summary>
    public static bool IsAchromatic(CieLab color) => color.Chroma < AchromaticChroma;

    /// <summary>The term for <paramref name="color"/>.</summary>
    public static string Of(CieLab color) => IsAchromatic(color)
        ? Achromatic.First(band => band.Contains(color.L)).Term
        : Sectors.First(sector => sector.Contains(color.HueDegrees)).Term;
}
