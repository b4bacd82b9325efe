using System.CommandLine;
using System.CommandLine.Help;
using System.CommandLine.Invocation;

namespace BarbuleOptics.Cli;

/// <summary>The stock help, with an example under it.</summary>
internal sealed class CommandHelp : SynchronousCommandLineAction
{
    private readonly HelpAction _stock = new();
    private readonly Dictionary<Command, string> _examples = [];

    /// <summary>The example shown under the help of a command.</summary>
    public void AddExample(Command command, string example) => _examples.Add(command, example);

    /// <inheritdoc/>
    public override int Invoke(ParseResult parseResult)
    {
        int code = _stock.Invoke(parseResult);
        if (_examples.TryGetValue(parseResult.CommandResult.Command, out string? example))
            parseResult.InvocationConfiguration.Output.WriteLine($"Example:{Environment.NewLine}  {example}{Environment.NewLine}");
        return code;
    }
}
