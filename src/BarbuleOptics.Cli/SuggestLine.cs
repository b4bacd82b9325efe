using System.Text.RegularExpressions;

namespace BarbuleOptics.Cli;

/// <summary>Puts a line to be completed into a form in which the parser finds all that can follow; positions in it stay.</summary>
internal static partial class SuggestLine
{
    private const string Directive = "[suggest";

    /// <summary>The arguments, with the line changed where they ask for completions.</summary>
    public static string[] Prepare(string[] args)
        => args.Length == 2 && args[0].StartsWith(Directive, StringComparison.Ordinal) ? [args[0], Separate(WithoutSets(args[1]))] : args;

    // After an option that may be repeated the parser would offer nothing but more values of it.
    private static string WithoutSets(string line) => Set().Replace(line, match => new string(' ', match.Length));

    // A value is completed only when it stands behind a space.
    private static string Separate(string line)
    {
        int start = line.LastIndexOf(' ') + 1, equals = line.IndexOf('=', start);
        return equals > 0 && line.AsSpan(start).StartsWith("--") ? $"{line[..equals]} {line[(equals + 1)..]}" : line;
    }

    [GeneratedRegex("""(?<=\s)--set(=|\s+)("[^"]*"|'[^']*'|\S+)(?=\s)""")]
    private static partial Regex Set();
}
