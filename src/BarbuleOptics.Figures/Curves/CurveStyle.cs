using BarbuleOptics.Color;
using BarbuleOptics.Figures.Drawing;

namespace BarbuleOptics.Figures.Curves;

/// <summary>How the curve of one angle looks: in the color that it predicts, and told from its neighbors by its dashes in gray.</summary>
internal static class CurveStyle
{
    /// <summary>Lightness above which a color is darkened to stand out on white: 4.6 to 1 in contrast.</summary>
    /// <remarks>Web Content Accessibility Guidelines 2.1, criterion 1.4.3, ask for 4.5 to 1 for small text.</remarks>
    public const double Lightness = 49;

    private static readonly SrgbColor Colorless = new(0x44, 0x44, 0x44);

    private static readonly double[]?[] Dashes =
    [
        null, [5, 1.6], [1.2, 1.2], [6, 1.5, 1.2, 1.5], [2.6, 1.3], [6, 1.3, 1.2, 1.3, 1.2, 1.3],
    ];

    // Shorter than the dashes of a second curve, longer than the dots of a third.
    private static readonly double[] OtherDash = [3, 1.8];

    /// <summary>The line of curve number <paramref name="index"/>; dashes come again after six, then thinner.</summary>
    public static Stroke Of(int index, CieColor? color)
        => new(InkOf(color), index / Dashes.Length % 2 == 0 ? 1 : 0.6, Dashes[index % Dashes.Length]);

    /// <summary>The line of what the other solver says.</summary>
    public static Stroke OfOther(CieColor? color) => new(InkOf(color), 0.8, OtherDash);

    /// <summary>The brightened color, darkened in turn where it would be pale on white.</summary>
    public static SrgbColor InkOf(CieColor? color)
    {
        if (color is null)
            return Colorless;
        SrgbColor bright = color.SrgbBrightened;
        (double red, double green, double blue) = (Linear(bright.Red), Linear(bright.Green), Linear(bright.Blue));
        double luminance = 0.2126 * red + 0.7152 * green + 0.0722 * blue;
        double factor = Math.Min(1, LuminanceAtLightness / luminance);
        return double.IsFinite(factor) ? new SrgbColor(Encoded(factor * red), Encoded(factor * green), Encoded(factor * blue)) : Colorless;
    }

    // ISO/CIE 11664-4: Y/Yn = ((L* + 16)/116)^3.
    private static double LuminanceAtLightness => Math.Pow((Lightness + 16) / 116, 3);

    // IEC 61966-2-1, the transfer function and its inverse.
    private static double Linear(byte channel)
    {
        double share = channel / 255.0;
        return share <= 0.04045 ? share / 12.92 : Math.Pow((share + 0.055) / 1.055, 2.4);
    }

    private static byte Encoded(double linear)
        => (byte)Math.Round(255 * (linear <= 0.0031308 ? 12.92 * linear : 1.055 * Math.Pow(linear, 1 / 2.4) - 0.055));
}
