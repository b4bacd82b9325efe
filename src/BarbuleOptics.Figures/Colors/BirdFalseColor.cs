using BarbuleOptics.Color;
using BarbuleOptics.Vision;

namespace BarbuleOptics.Figures.Colors;

/// <summary>A color for the screen that stands for one that only birds see.</summary>
/// <remarks>Red is the mean of the medium and long cones, green the short one, blue the shortest, so that gray is gray and ultraviolet blue; all three are
/// scaled until the largest has <see cref="Largest"/> of the screen's light. Brightness is not shown.</remarks>
internal static class BirdFalseColor
{
    /// <summary>Share of the screen's light that the largest channel has.</summary>
    public const double Largest = 0.75;

    /// <summary>What the notes of figures say of it.</summary>
    public const string Note = "Bird colors are false colors: blue stands for the shortest cone, green for the short, red for the medium and long; brightness is not shown.";

    /// <summary>The false color.</summary>
    public static SrgbColor Of(BirdColor color)
    {
        double red = (color.RelativeCatches[2] + color.RelativeCatches[3]) / 2, green = color.RelativeCatches[1], blue = color.RelativeCatches[0];
        double scale = Largest / Math.Max(red, Math.Max(green, blue));
        return new SrgbColor(Encoded(scale * red), Encoded(scale * green), Encoded(scale * blue));
    }

    // IEC 61966-2-1, the transfer function.
    private static byte Encoded(double linear)
        => (byte)Math.Round(255 * (linear <= 0.0031308 ? 12.92 * linear : 1.055 * Math.Pow(linear, 1 / 2.4) - 0.055), MidpointRounding.AwayFromZero);
}
