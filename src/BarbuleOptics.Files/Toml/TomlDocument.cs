using Tomlyn;
using Tomlyn.Parsing;
using Tomlyn.Syntax;

namespace BarbuleOptics.Files.Toml;

/// <summary>TOML text as a tree whose every value knows its place.</summary>
internal static class TomlDocument
{
    /// <summary>The tree of a file; null when the text is not TOML or writes a key twice, with the problems logged.</summary>
    public static TomlTable? Parse(ReadOnlySpan<byte> bytes, ReadingLog log)
        => SourceText.Decode(bytes, log) is { } text ? Parse(text, log) : null;

    /// <summary>The tree of a text; null when it is not TOML or writes a key twice, with the problems logged.</summary>
    public static TomlTable? Parse(string text, ReadingLog log)
    {
        if (NestingGuard.FirstTooDeep(text) is var (line, column))
        {
            string message = FormattableString.Invariant($"found more than {NestingGuard.Most} brackets one within another");
            log.Refuse(new SourceLocation(log.Source, line, column), null, message);
            return null;
        }
        if (ParseSyntax(text, log) is not { } syntax)
            return null;
        TomlTable root = new TomlTreeBuilder(log, span => At(log.Source, span)).Build(syntax);
        return log.HasProblems ? null : root;
    }

    /// <summary>The value that <paramref name="text"/> is in TOML, every part of it placed at <paramref name="location"/>;
    /// null when it is none.</summary>
    public static TomlNode? ParseValue(string text, string path, SourceLocation location)
    {
        var log = new ReadingLog(location.Source);
        if (text.AsSpan().ContainsAny("\r\n\0") || NestingGuard.FirstTooDeep(text) is not null || ParseSyntax($"value = {text}", log) is not { } syntax)
            return null;
        TomlNode? value = new TomlTreeBuilder(log, _ => location).BuildOnlyValue(syntax, path);
        return log.HasProblems ? null : value;
    }

    private static DocumentSyntax? ParseSyntax(string text, ReadingLog log)
    {
        DocumentSyntax syntax;
        try
        {
            // Keys written twice are found while the tree is built: the parser's own check passes over those between braces.
            syntax = SyntaxParser.Parse(text, log.Source, validate: false);
        }
        catch (Exception e) when (e is TomlException or ArgumentException or InvalidOperationException or IndexOutOfRangeException or FormatException or OverflowException)
        {
            // The parser throws on some damaged texts instead of reporting them.
            string reason = e is TomlException ? e.Message : "it breaks off, as within an escape such as \\u00E9";
            log.Refuse(SourceLocation.Whole(log.Source), null, $"is not valid TOML: {reason}");
            return null;
        }
        LogDiagnostics(syntax, text, log);
        return log.HasProblems ? null : syntax;
    }

    // What follows the first fault of a line is mostly its consequence.
    private static void LogDiagnostics(DocumentSyntax syntax, string text, ReadingLog log)
    {
        var errors = syntax.Diagnostics.Where(diagnostic => diagnostic.Kind == DiagnosticMessageKind.Error);
        foreach (DiagnosticMessage error in errors.OrderBy(error => error.Span.Start.Column).DistinctBy(error => error.Span.Start.Line))
            log.Refuse(At(log.Source, error.Span), null, $"is not valid TOML: {error.Message}{Hint(text, error.Span.Start.Offset)}");
    }

    // The two slips that people make who seldom write TOML.
    private static string Hint(string text, int offset)
    {
        if (offset <= 0 || offset >= text.Length)
            return "";
        if (text[offset] == ',' && char.IsAsciiDigit(text[offset - 1]) && offset + 1 < text.Length && char.IsAsciiDigit(text[offset + 1]))
            return "; the decimal sign is a point, not a comma";
        int end = offset;
        while (end < text.Length && (char.IsLetterOrDigit(text[end]) || text[end] is '-' or '_' or '.' or '/'))
            end++;
        return char.IsLetter(text[offset]) && text.AsSpan(0, offset).TrimEnd(' ').EndsWith("=")
            ? $"; a text stands in quotes: {OneLine.Quote(text[offset..end])}"
            : "";
    }

    private static SourceLocation At(string source, SourceSpan span) => new(source, span.Start.Line + 1, span.Start.Column + 1);
}
