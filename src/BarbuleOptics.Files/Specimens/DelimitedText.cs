using System.Buffers;
using System.Text;
using BarbuleOptics.Files.Toml;

namespace BarbuleOptics.Files.Specimens;

/// <summary>Text of cells that a separator parts, quoted where they hold one; line ends of any kind.</summary>
/// <remarks>RFC 4180, section 2, with other separators; white space around a cell without quotes does not count.</remarks>
internal static class DelimitedText
{
    /// <summary>Most cells of a table.</summary>
    public const int MostCells = 5_000_000;

    /// <summary>What statistics programs write into a blank cell, without quotes.</summary>
    private const string NotAvailable = "NA";

    /// <summary>The rows, blank ones too; null when the text was refused.</summary>
    public static IReadOnlyList<SheetRow>? Parse(string text, char separator, int firstLine, ReadingLog log)
    {
        List<SheetRow> rows = [];
        List<string> cells = [];
        int line = firstLine, at = 0, count = 0;
        while (at < text.Length)
        {
            int startLine = line;
            if (!TryCell(text, separator, ref at, ref line, out string cell))
            {
                log.Refuse(new SourceLocation(log.Source, startLine, cells.Count + 1), null, "found a quote that is not closed, or text behind one that is; allowed \"text\", with a quote in it written twice");
                return null;
            }
            cells.Add(cell);
            if (++count > MostCells)
            {
                log.Refuse(new SourceLocation(log.Source, startLine, cells.Count), null, FormattableString.Invariant($"found more than {MostCells} cells"));
                return null;
            }
            bool ends = at >= text.Length || text[at] != separator;
            if (!ends && at + 1 == text.Length)
                cells.Add("");
            if (!ends)
            {
                at++;
                if (at < text.Length)
                    continue;
            }
            rows.Add(new SheetRow(startLine, [.. cells]));
            cells.Clear();
            SkipLineEnd(text, ref at, ref line);
        }
        return rows;
    }

    private static bool TryCell(string text, char separator, ref int at, ref int line, out string cell)
    {
        if (text[at] != '"')
        {
            int start = at;
            while (at < text.Length && text[at] != separator && text[at] is not ('\r' or '\n'))
                at++;
            cell = text[start..at].Trim();
            if (cell == NotAvailable)
                cell = "";
            return true;
        }
        var quoted = new StringBuilder();
        for (at++; at < text.Length; at++)
        {
            if (text[at] == '"' && at + 1 < text.Length && text[at + 1] == '"')
                at++;
            else if (text[at] == '"')
                break;
            if (text[at] == '\n')
                line++;
            quoted.Append(text[at]);
        }
        cell = quoted.ToString();
        bool closed = at < text.Length;
        at++;
        return closed && (at >= text.Length || text[at] == separator || text[at] is '\r' or '\n');
    }

    private static void SkipLineEnd(string text, ref int at, ref int line)
    {
        if (at < text.Length && text[at] == '\r')
            at++;
        if (at < text.Length && text[at] == '\n')
            at++;
        line++;
    }

    private static readonly SearchValues<char> Special = SearchValues.Create("\",;\t\r\n");

    /// <summary>A cell as comma-separated values hold it: quoted where it must be.</summary>
    public static string Quoted(string cell)
        => cell.AsSpan().ContainsAny(Special) || cell.AsSpan().Trim().Length < cell.Length || cell.StartsWith('#') || cell == NotAvailable
            ? $"\"{cell.Replace("\"", "\"\"", StringComparison.Ordinal)}\"" : cell;
}
