using System.CommandLine;
using System.CommandLine.Parsing;
using BarbuleOptics.Ensembles;

namespace BarbuleOptics.Cli;

/// <summary>The command line of <c>barbule batch</c>.</summary>
internal sealed class BatchCommand
{
    /// <summary>The command's name.</summary>
    public const string Name = "batch";

    private readonly ConditionOptions _conditions = new();
    private readonly Argument<string> _table = new("TABLE") { Description = "Table of specimens, one a row: comma, semicolon or tab; columns are named as the keys of a structure file" };
    private readonly CheckedOption<int> _draws = new("--draws", "N", $"Draw every specimen N times from the spread of its measurements ({DrawOptions.LeastDraws} to {DrawOptions.MostDraws}) and report intervals [none]", 0, OptionReaders.Draws);
    private readonly CheckedOption<Spread> _spread = new("--spread", "mean|between|within", "Which spread is drawn from: mean, between barbules, or within a section [mean]", Spread.Mean, OptionReaders.SpreadName, SpreadNames.All);
    private readonly CheckedOption<long> _seed = new("--seed", "S", "Names the random draws: the same seed, the same results [1]", 1, OptionReaders.Seed);
    private readonly Option<string> _output = new("--out") { Description = "Folder for the results", HelpName = "DIR", Required = true };
    private readonly Option<bool> _force = new("--force") { Description = "Replace results that are in the folder already", Arity = ArgumentArity.Zero };
    private readonly Option<bool> _resume = new("--resume") { Description = "Continue a run that was interrupted or killed, to the same bytes; without one, start afresh", Arity = ArgumentArity.Zero };

    public static Command Create(ProgressLine progress)
    {
        var options = new BatchCommand();
        var command = new Command(Name, "Predictions of a table of specimens, one a row") { options._table };
        options._conditions.AddTo(command);
        foreach (Option option in (Option[])[options._draws.Option, options._spread.Option, options._seed.Option, options._output, options._force, options._resume])
            command.Options.Add(option);
        options._table.Validators.Add(result => CommandLineErrors.RefuseOptions(result, command));
        options._table.Validators.Add(result => CommandLineErrors.RefuseEmpty(result, "TABLE", result.Tokens, "the name of a table"));
        options._output.Validators.Add(result => CommandLineErrors.RefuseEmpty(result, "--out", result.Tokens, "the name of a folder"));
        command.Validators.Add(options.RefuseSpreadOfNothing);
        command.Validators.Add(CommandLineErrors.RefuseMissingValues);
        // On a thread of its own, or nobody would listen for an interrupt before the work is done.
        command.SetAction((parse, cancellation) => Task.Run(
            () => new BatchRun(options.Request(parse), parse.InvocationConfiguration.Output, parse.InvocationConfiguration.Error, progress).Execute(cancellation),
            CancellationToken.None));
        return command;
    }

    /// <summary>Without draws a spread and a seed mean nothing.</summary>
    private void RefuseSpreadOfNothing(CommandResult result)
    {
        if (result.GetResult(_draws.Option) is not null)
            return;
        foreach (Option option in (Option[])[_spread.Option, _seed.Option])
        {
            if (result.GetResult(option) is not null)
                result.AddError($"{option.Name}: found without --draws; allowed beside --draws N");
        }
    }

    private BatchRequest Request(ParseResult parse) => new(
        parse.GetRequiredValue(_table), _conditions.Of(parse), _conditions.SeenBy(parse), parse.GetRequiredValue(_output), parse.GetValue(_force), parse.GetValue(_resume),
        _conditions.MaterialFolder(parse), _conditions.Sets(parse),
        _draws.Of(parse) is int draws and > 0 ? new DrawOptions { Draws = draws, Spread = _spread.Of(parse), Seed = _seed.Of(parse) } : null, OptionTexts(parse));

    /// <summary>Every option that may change a result, as typed.</summary>
    private string[] OptionTexts(ParseResult parse)
    {
        string[] without = [_output.Name, _force.Name, _resume.Name, "--threads"];
        return
        [
            .. parse.CommandResult.Children.OfType<OptionResult>().Where(option => !option.Implicit && !without.Contains(option.Option.Name))
                .OrderBy(option => option.Option.Name, StringComparer.Ordinal).SelectMany(option => (string[])[option.Option.Name, .. option.Tokens.Select(token => token.Value)]),
        ];
    }
}
