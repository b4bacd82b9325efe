using System.Globalization;
using System.Text;

namespace BarbuleOptics.Files;

/// <summary>Text from outside, made fit for a message of one line.</summary>
public static class OneLine
{
    private const int MostQuoted = 60;

    /// <summary>Control characters and line separators as \uXXXX; nothing else changes.</summary>
    public static string Escape(string text)
    {
        if (!text.Any(MustEscape))
            return text;
        var line = new StringBuilder(text.Length + 16);
        foreach (char c in text)
        {
            if (MustEscape(c))
                line.Append(CultureInfo.InvariantCulture, $"\\u{(int)c:X4}");
            else
                line.Append(c);
        }
        return line.ToString();
    }

    /// <summary>In quotes, shortened where it is long.</summary>
    public static string Quote(string text)
        => text.Length <= MostQuoted ? $"\"{Escape(text)}\"" : $"\"{Escape(text[..MostQuoted])}...\"";

    /// <summary>A number as the files write it.</summary>
    public static string Number(double value) => value.ToString("R", CultureInfo.InvariantCulture);

    /// <summary>A number that was computed, without the digits that only rounding gave it.</summary>
    internal static string Rounded(double value) => Number(Math.Round(value, 6));

    private static bool MustEscape(char c) => char.IsControl(c) || c is '\u2028' or '\u2029';
}
