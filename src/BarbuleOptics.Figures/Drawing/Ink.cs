using BarbuleOptics.Color;

namespace BarbuleOptics.Figures.Drawing;

/// <summary>The colors and sizes that all figures share.</summary>
internal static class Ink
{
    /// <summary>Size of labels, in points.</summary>
    public const double LabelPt = 7.5;

    /// <summary>Size of numbers along axes and of notes, in points.</summary>
    public const double SmallPt = 7;

    /// <summary>Width of axes and leaders, in points.</summary>
    public const double HairPt = 0.35;

    /// <summary>Width of outlines that carry weight, in points.</summary>
    public const double LinePt = 0.5;

    public static SrgbColor Text { get; } = new(0x22, 0x22, 0x22);

    public static SrgbColor Note { get; } = new(0x55, 0x55, 0x55);

    public static SrgbColor Axis { get; } = new(0x33, 0x33, 0x33);

    public static SrgbColor Outline { get; } = new(0x8a, 0x8a, 0x8a);

    public static SrgbColor Tint { get; } = new(0xf3, 0xf3, 0xf3);

    public static SrgbColor White { get; } = new(0xff, 0xff, 0xff);
}
