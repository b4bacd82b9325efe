namespace BarbuleOptics.Files.Toml;

/// <summary>Finds brackets nested deeper than any file of ours needs, before a parser descends into them.</summary>
internal static class NestingGuard
{
    /// <summary>Deepest nesting of lists, tables between braces and names joined by dots.</summary>
    public const int Most = 16;

    /// <summary>Where nesting passes <see cref="Most"/>: line and column from 1; null when it never does.</summary>
    /// <remarks>Skips comments and texts. Where a text is not closed its end is the end of the line, so that a broken
    /// file can only be taken as deeper than it is.</remarks>
    public static (int Line, int Column)? FirstTooDeep(ReadOnlySpan<char> text)
    {
        int depth = 0, line = 1, lineStart = 0;
        for (int i = 0; i < text.Length; i++)
        {
            switch (text[i])
            {
                case '\n':
                    (line, lineStart) = (line + 1, i + 1);
                    break;
                case '#':
                    i += LengthToLineEnd(text[i..]) - 1;
                    break;
                case '"' or '\'':
                    ReadOnlySpan<char> quoted = text.Slice(i, QuotedLength(text[i..]));
                    line += quoted.Count('\n');
                    if (quoted.LastIndexOf('\n') is var last and >= 0)
                        lineStart = i + last + 1;
                    i += quoted.Length - 1;
                    break;
                case '[' or '{':
                    if (++depth > Most)
                        return (line, i - lineStart + 1);
                    break;
                case ']' or '}':
                    depth = Math.Max(0, depth - 1);
                    break;
            }
        }
        return null;
    }

    private static int QuotedLength(ReadOnlySpan<char> text)
    {
        char mark = text[0];
        bool isLong = text.Length >= 3 && text[1] == mark && text[2] == mark;
        int end = isLong ? text.Length : LengthToLineEnd(text);
        for (int i = isLong ? 3 : 1; i < end; i++)
        {
            if (text[i] == '\\' && mark == '"')
                i++;
            else if (text[i] == mark && !isLong)
                return i + 1;
            else if (text[i] == mark && i + 2 < end && text[i + 1] == mark && text[i + 2] == mark)
                return i + 3;
        }
        return end;
    }

    private static int LengthToLineEnd(ReadOnlySpan<char> text)
    {
        int end = text.IndexOf('\n');
        return end < 0 ? text.Length : end;
    }
}
