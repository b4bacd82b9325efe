using System.Text;
using SkiaSharp;

namespace BarbuleOptics.Figures.Drawing;

/// <summary>The one typeface of all figures, carried inside: Liberation Sans, which has the widths of Arial.</summary>
/// <remarks>Neither hinted nor rounded to pixels, so that a text is equally wide in every format and at every size.</remarks>
internal static class FigureFont
{
    /// <summary>Height of capitals, as a share of the size.</summary>
    public const double CapHeight = 0.72;

    /// <summary>Depth of descenders, as a share of the size.</summary>
    public const double Descent = 0.21;

    /// <summary>Distance of lines, as a share of the size.</summary>
    public const double LineHeight = 1.2;

    private static readonly SKTypeface Typeface = Load();

    /// <summary>The font at a size; the caller disposes of it.</summary>
    public static SKFont OfSize(double sizePt) => new(Typeface, (float)sizePt)
    {
        Hinting = SKFontHinting.None,
        Subpixel = true,
        LinearMetrics = true,
        Edging = SKFontEdging.Antialias,
    };

    /// <summary>Width of a text in points.</summary>
    public static double WidthPt(string text, double sizePt)
    {
        // Measured at a size of 100, since widths grow in proportion.
        using SKFont font = OfSize(100);
        return font.MeasureText(text) * sizePt / 100;
    }

    /// <summary>The text without line breaks and control characters; a character that the font lacks becomes a question mark.</summary>
    public static string Printable(string text)
    {
        var printable = new StringBuilder(text.Length);
        foreach (Rune rune in text.EnumerateRunes())
        {
            if (Rune.IsControl(rune))
                printable.Append(' ');
            else
                printable.Append(Typeface.GetGlyph(rune.Value) == 0 ? "?" : rune.ToString());
        }
        return printable.ToString();
    }

    /// <summary>The text without line breaks and control characters, and with nothing that XML 1.0 forbids.</summary>
    public static string OneLine(string text)
    {
        var line = new StringBuilder(text.Length);
        foreach (Rune rune in text.EnumerateRunes())
        {
            // Lone surrogates come as the replacement character already.
            Rune allowed = Rune.IsControl(rune) ? new Rune(' ') : rune.Value is 0xfffe or 0xffff ? Rune.ReplacementChar : rune;
            line.Append(allowed.ToString());
        }
        return line.ToString();
    }

    private static SKTypeface Load()
    {
        using Stream stream = typeof(FigureFont).Assembly.GetManifestResourceStream("figure-font.ttf")
            ?? throw new InvalidOperationException("The figures' font is missing from the program.");
        using SKData data = SKData.Create(stream);
        return SKTypeface.FromData(data);
    }
}
