using System.Globalization;

namespace BarbuleOptics.Files.Specimens;

/// <summary>Numbers as people type them into tables.</summary>
internal static class SheetNumber
{
    private const NumberStyles Style = NumberStyles.AllowLeadingSign | NumberStyles.AllowDecimalPoint | NumberStyles.AllowExponent;

    /// <summary>Whether a text is a number with a decimal comma.</summary>
    public static bool HasDecimalComma(string text)
        => text.Count(c => c == ',') == 1 && TryParse(text.Replace(',', '.'), 0, out _) && !text.Contains('.', StringComparison.Ordinal);

    /// <summary>Reads a number with a decimal point, times a power of ten, rounded once.</summary>
    public static bool TryParse(string text, int powerOfTen, out double value)
    {
        bool plain = !text.Contains('e', StringComparison.OrdinalIgnoreCase);
        if (!double.TryParse(plain ? string.Create(CultureInfo.InvariantCulture, $"{text}e{powerOfTen}") : text, Style, CultureInfo.InvariantCulture, out value) || !double.IsFinite(value))
            return false;
        if (!plain)
            value *= Math.Pow(10, powerOfTen);
        return text.Any(char.IsAsciiDigit);
    }

    /// <summary>A number as a whole one; null where it is none.</summary>
    public static long? Whole(string text) => long.TryParse(text, NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture, out long whole) ? whole : null;
}
