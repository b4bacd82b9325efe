using System.CommandLine;
using System.CommandLine.Parsing;

namespace BarbuleOptics.Cli;

/// <summary>An option with a default, whose text is checked while the command line is read.</summary>
/// <remarks>The default is kept here and not in the option: the stock help would print it as the type writes it, not as a user types it.</remarks>
internal sealed class CheckedOption<T>
{
    private readonly T _standard;

    /// <summary>Reads a text: the value, or what is allowed instead.</summary>
    public delegate bool Reader(string text, out T value, out string allowed);

    public CheckedOption(string name, string valueName, string description, T standard, Reader read, IEnumerable<string>? completions = null)
    {
        _standard = standard;
        Option = new Option<T>(name)
        {
            Description = description,
            HelpName = valueName,
            CustomParser = result => Parse(name, result, standard, read),
            Arity = ArgumentArity.ExactlyOne,
        };
        // Those of the type would offer the names that it has in the code.
        Option.CompletionSources.Clear();
        if (completions is not null)
            Option.CompletionSources.Add([.. completions]);
    }

    /// <summary>The option, to be added to a command.</summary>
    public Option<T> Option { get; }

    /// <summary>The value given, or the default.</summary>
    public T Of(ParseResult parse) => parse.GetResult(Option) is null ? _standard : parse.GetValue(Option)!;

    private static T Parse(string name, ArgumentResult result, T standard, Reader read)
    {
        string text = result.Tokens[^1].Value;
        if (read(text, out T value, out string allowed))
            return value;
        result.AddError($"{name}: found '{text}'; allowed {allowed}");
        return standard;
    }
}
