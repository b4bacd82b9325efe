namespace BarbuleOptics.Color;

/// <summary>Tristimulus values of the 1931 observer to sRGB (IEC 61966-2-1), adapted to its white by Bradford.</summary>
/// <remarks>
/// <para>The white of the illuminant, whichever it is, becomes R = G = B = 1; for D65 as summed here this moves Z by 0.02 %.</para>
/// <para>Gamut rule: a color is in gamut when each encoded channel, before rounding, lies within half a step of 0 to 255. One outside
/// keeps its CIELAB lightness (limited to 0 to 100) and hue angle and loses chroma until it is in. Its red, green and blue are not
/// clipped one by one, which would turn the hue.</para>
/// </remarks>
public static class SrgbEncoder
{
    /// <summary>L* to which <see cref="EncodeBrightened"/> lifts a darker color.</summary>
    public const double BrightenedLightness = 60;

    private const int Halvings = 40;
    private const double HalfStep = 0.5 / 255;

    // IEC 61966-2-1, linear sRGB to XYZ as printed. The printed inverse is the rounded inverse of this matrix (see Published/SrgbTests).
    private static readonly Matrix3 ToXyz = new(new[,]
    {
        { 0.4124, 0.3576, 0.1805 },
        { 0.2126, 0.7152, 0.0722 },
        { 0.0193, 0.1192, 0.9505 },
    });

    private static readonly Matrix3 FromXyz = ToXyz.Inverse();

    /// <summary>The white of sRGB, Y = 100: the row sums of its matrix.</summary>
    public static Tristimulus White { get; } = new(95.05, 100, 108.90);

    /// <summary>The nearest sRGB color by the gamut rule of this class.</summary>
    /// <param name="color">Tristimulus values of the 1931 observer.</param>
    /// <param name="white">Those of a perfect mirror under the same illuminant.</param>
    /// <param name="inGamut">Whether sRGB holds the color itself.</param>
    public static SrgbColor Encode(Tristimulus color, Tristimulus white, out bool inGamut)
    {
        Tristimulus adapted = ChromaticAdaptation.Bradford(color, white, White);
        inGamut = TryEncode(adapted, out SrgbColor encoded);
        return inGamut ? encoded : WithLessChroma(CieLab.FromTristimulus(adapted, White));
    }

    /// <summary>
    /// The same chromaticity lifted to <see cref="BrightenedLightness"/>: X, Y and Z times one factor, then the gamut rule. A color as light
    /// or lighter stays as it is, up to white, beyond which a screen shows nothing but white: a signal against a matt white may lie there, and is brought down to the
    /// same lightness. One without luminance (Y not above zero) stays, too.
    /// </summary>
    /// <param name="color">Tristimulus values of the 1931 observer.</param>
    /// <param name="white">Those of a perfect mirror under the same illuminant.</param>
    public static SrgbColor EncodeBrightened(Tristimulus color, Tristimulus white)
    {
        double wantedY = new CieLab(BrightenedLightness, 0, 0).ToTristimulus(white).Y;
        bool moves = color.Y > Tristimulus.LeastY && (color.Y < wantedY || color.Y > white.Y);
        // The factor of an all but black color may overflow: there is nothing to brighten then.
        double factor = moves ? wantedY / color.Y : 1;
        return Encode(double.IsFinite(factor * (Math.Abs(color.X) + Math.Abs(color.Z))) ? color.Scale(factor) : color, white, out _);
    }

    /// <summary>The part of the way from gray to <paramref name="wanted"/> that stays in the cube, by halving.</summary>
    private static SrgbColor WithLessChroma(CieLab wanted)
    {
        double lightness = Math.Clamp(wanted.L, 0, 100);
        double inside = 0;
        double outside = 1;
        TryEncode(AtShare(0), out SrgbColor best);
        for (int i = 0; i < Halvings; i++)
        {
            double share = (inside + outside) / 2;
            if (TryEncode(AtShare(share), out SrgbColor encoded))
                (inside, best) = (share, encoded);
            else
                outside = share;
        }

        return best;

        Tristimulus AtShare(double share) => new CieLab(lightness, share * wanted.A, share * wanted.B).ToTristimulus(White);
    }

    /// <summary>False, with the channels clipped, when the color lies outside.</summary>
    private static bool TryEncode(Tristimulus color, out SrgbColor encoded)
    {
        var (red, green, blue) = FromXyz.Times(color.X / 100, color.Y / 100, color.Z / 100);
        (red, green, blue) = (Compand(red), Compand(green), Compand(blue));
        encoded = new SrgbColor(ToByte(red), ToByte(green), ToByte(blue));
        return IsInside(red) && IsInside(green) && IsInside(blue);
    }

    /// <summary>The transfer function of IEC 61966-2-1.</summary>
    private static double Compand(double linear)
        => linear <= 0.0031308 ? 12.92 * linear : 1.055 * Math.Pow(linear, 1 / 2.4) - 0.055;

    private static bool IsInside(double channel) => channel >= -HalfStep && channel <= 1 + HalfStep;

    private static byte ToByte(double channel) => (byte)Math.Round(255 * Math.Clamp(channel, 0, 1), MidpointRounding.AwayFromZero);
}
