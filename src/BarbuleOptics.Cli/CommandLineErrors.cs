using System.CommandLine;
using System.CommandLine.Parsing;
using BarbuleOptics.Files;

namespace BarbuleOptics.Cli;

/// <summary>Says what is wrong with a command line, one line a mistake, and what was probably meant.</summary>
internal static class CommandLineErrors
{
    public static void Write(ParseResult result, TextWriter error)
    {
        // After a command that is not there, nothing that follows can be judged.
        IEnumerable<string> unmatched = result.CommandResult.Command.Subcommands.Count > 0 ? result.UnmatchedTokens.Take(1) : result.UnmatchedTokens;
        IEnumerable<string> unknown = unmatched.Select(token => Unmatched(token, result.CommandResult.Command));
        // The parser's own line for a word that it does not know says less than ours.
        IEnumerable<string> others = result.Errors.Select(mistake => mistake.Message)
            .Where(message => !result.UnmatchedTokens.Any(token => message.Contains(token, StringComparison.Ordinal)));
        string[] lines = [.. unknown.Concat(others).Distinct()];
        if (lines.Length == 0)
            lines = [.. result.Errors.Select(mistake => mistake.Message)];
        foreach (string line in lines)
            error.WriteLine(OneLine.Escape($"barbule: {line}"));
    }

    /// <summary>What to say of an option that a command does not have.</summary>
    public static string UnknownOption(string text, Command command)
        => Unknown("option", text, command, command.Options.Select(option => option.Name).Append("--help"));

    /// <summary>Refuses options within an argument: the parser takes one that it does not know for one more value.</summary>
    public static void RefuseOptions(ArgumentResult argument, Command command)
    {
        foreach (string text in argument.Tokens.Select(token => token.Value).Where(text => text.StartsWith('-')))
            argument.AddError(UnknownOption(text, command));
    }

    /// <summary>Refuses names without a letter.</summary>
    public static void RefuseEmpty(SymbolResult result, string what, IEnumerable<Token> tokens, string allowed)
    {
        if (tokens.Any(token => string.IsNullOrWhiteSpace(token.Value)))
            result.AddError($"{what}: found an empty name; allowed {allowed}");
    }

    /// <summary>Refuses options without a value: the parser counts values, so that `--out here --out` would pass.</summary>
    public static void RefuseMissingValues(CommandResult result)
    {
        foreach (OptionResult option in result.Children.OfType<OptionResult>().Where(option => option.Option.Arity.MinimumNumberOfValues > 0))
        {
            if (option.Tokens.Count > 0 && option.IdentifierTokenCount > option.Tokens.Count)
                result.AddError($"Required argument missing for option: '{option.Option.Name}'.");
        }
    }

    private static string Unmatched(string token, Command command)
    {
        if (token.StartsWith('-'))
            return UnknownOption(token, command);
        return command.Subcommands.Count > 0
            ? Unknown("command", token, command, command.Subcommands.Select(candidate => candidate.Name))
            : Unknown("further argument", token, command, []);
    }

    private static string Unknown(string kind, string text, Command command, IEnumerable<string> known)
    {
        string? near = NearMiss.Find(text.Split('=')[0], known);
        string hint = near is null ? $"see barbule {(command is RootCommand ? "" : command.Name + " ")}--help" : $"did you mean {near}?";
        return $"there is no {kind} {OneLine.Quote(text)}; {hint}";
    }
}
