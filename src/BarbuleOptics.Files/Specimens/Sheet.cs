using BarbuleOptics.Files.Toml;

namespace BarbuleOptics.Files.Specimens;

/// <summary>A table as it stands in a file: rows of text.</summary>
/// <param name="Header">The first row that is neither blank nor a comment.</param>
/// <param name="Rows">The rows below it that are not blank.</param>
/// <param name="HasDecimalComma">Whether numbers are written with a decimal comma; a point in a number is then ambiguous.</param>
internal sealed record Sheet(SheetRow Header, IReadOnlyList<SheetRow> Rows, bool HasDecimalComma)
{
    /// <summary>Largest file, in bytes.</summary>
    public const int MostBytes = 50_000_000;

    /// <summary>The sheet of a file; null when it was refused.</summary>
    public static Sheet? Read(string path, ReadingLog log, out byte[] bytes)
    {
        if (SourceText.TryReadFile(path, out bytes, MostBytes) is not { } reason)
            return Parse(bytes, log);
        log.Refuse(SourceLocation.Whole(log.Source), null, reason);
        return null;
    }

    /// <summary>The sheet of a file's bytes; null when it was refused.</summary>
    public static Sheet? Parse(ReadOnlySpan<byte> bytes, ReadingLog log)
    {
        if (SourceText.Decode(bytes, log, MostBytes) is not { } text)
            return null;
        string body = text;
        char? named = Named(ref body);
        char separator = named ?? Separator(body);
        IReadOnlyList<SheetRow>? rows = DelimitedText.Parse(body, separator, named is null ? 1 : 2, log);
        return rows is null ? null : Of(rows, separator != ',', log);
    }

    private static Sheet? Of(IReadOnlyList<SheetRow> raw, bool mayHaveDecimalComma, ReadingLog log)
    {
        List<SheetRow> rows = [.. raw.SkipWhile(row => row.IsBlank || row.Cell(0).StartsWith('#'))];
        if (rows.Count == 0)
        {
            log.Refuse(SourceLocation.Whole(log.Source), null, "found no row; needed a row of column names, then one row a specimen");
            return null;
        }
        List<SheetRow> data = [.. rows.Skip(1).Where(row => !row.IsBlank)];
        if (data.Count == 0)
        {
            log.Refuse(new SourceLocation(log.Source, rows[0].Number, 1), null, "found no row below the column names; needed one at least");
            return null;
        }
        return new Sheet(rows[0], data, mayHaveDecimalComma && data.Any(row => row.Cells.Any(SheetNumber.HasDecimalComma)));
    }

    // Spreadsheets may name the separator in a first line of its own: sep=;
    private static char? Named(ref string text)
    {
        int end = text.IndexOf('\n', StringComparison.Ordinal);
        string first = (end < 0 ? text : text[..end]).TrimEnd('\r');
        if (first.Length != 5 || !first.StartsWith("sep=", StringComparison.OrdinalIgnoreCase))
            return null;
        text = end < 0 ? "" : text[(end + 1)..];
        return first[4];
    }

    // No name of a column holds a separator, so that the first line with one decides; a tab, then a semicolon, count before a comma.
    private static char Separator(string text)
    {
        foreach (string line in text.Split('\n'))
        {
            string trimmed = line.Trim();
            if (trimmed.Length == 0 || trimmed.StartsWith('#'))
                continue;
            return line.Contains('\t', StringComparison.Ordinal) ? '\t' : line.Contains(';', StringComparison.Ordinal) ? ';' : ',';
        }
        return ',';
    }
}
