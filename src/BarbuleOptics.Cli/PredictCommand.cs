using System.CommandLine;
using System.CommandLine.Parsing;
using BarbuleOptics.Ensembles;
using BarbuleOptics.Figures;

namespace BarbuleOptics.Cli;

/// <summary>The command line of <c>barbule predict</c>.</summary>
internal sealed class PredictCommand
{
    private readonly ConditionOptions _conditions = new();
    private readonly Argument<string[]> _files = new("FILE") { Description = "Structure files, one barbule each; `barbule sample DIR` writes some to start from", Arity = ArgumentArity.OneOrMore };
    private readonly CheckedOption<FigureSize> _width = new("--width", "mm", "Printed width of the figures, such as 85 or 170 mm for one or two columns [85]", FigureSize.OneColumn, OptionReaders.FigureWidth);
    private readonly Option<bool> _overlay = new("--overlay") { Description = "Draw into the reflectance figure, dashed, what the layer model says beside the grating solver, or the grating solver beside --mixing", Arity = ArgumentArity.Zero };
    private readonly CheckedOption<int> _draws = new("--draws", "N", $"Draw the structure N times from the spread of its measurements ({DrawOptions.LeastDraws} to {DrawOptions.MostDraws}) and report intervals and the probability of each hue term [none]", 0, OptionReaders.Draws);
    private readonly CheckedOption<Spread> _spread = new("--spread", "mean|between|within", "Which spread is drawn from: mean, sd/sqrt(n), how sure is this color; between barbules, sd_between, what an instrument sees over a spot; within a section, sd, what disorder of the rows does [mean]", Spread.Mean, OptionReaders.SpreadName, SpreadNames.All);
    private readonly CheckedOption<long> _seed = new("--seed", "S", "Names the random draws: the same seed, the same results [1]", 1, OptionReaders.Seed);
    private readonly Option<string?> _output = new("--out") { Description = "Folder for spectra.csv, prediction.json and figures; with several files, a folder each within it", HelpName = "DIR" };
    private readonly Option<bool> _force = new("--force") { Description = "Replace results that are in the folder already", Arity = ArgumentArity.Zero };
    private readonly Option<bool> _json = new("--json") { Description = "Print one JSON document and nothing else", Arity = ArgumentArity.Zero };

    public static Command Create(TerminalColors colors, ProgressLine progress)
    {
        var options = new PredictCommand();
        var command = new Command("predict", "Reflectance, CIE color and hue of measured structures") { options._files };
        options._conditions.AddTo(command);
        foreach (Option option in (Option[])[options._draws.Option, options._spread.Option, options._seed.Option, options._output, options._force, options._json, options._width.Option, options._overlay])
            command.Options.Add(option);
        options._files.Validators.Add(result => CommandLineErrors.RefuseOptions(result, command));
        options._files.Validators.Add(result => CommandLineErrors.RefuseEmpty(result, "FILE", result.Tokens, "the name of a structure file"));
        options._output.Validators.Add(result => CommandLineErrors.RefuseEmpty(result, "--out", result.Tokens, "the name of a folder"));
        command.Validators.Add(options.RefuseSpreadOfNothing);
        command.Validators.Add(CommandLineErrors.RefuseMissingValues);
        // On a thread of its own, or nobody would listen for an interrupt before the work is done.
        command.SetAction((parse, cancellation) => Task.Run(
            () => new PredictRun(options.Request(parse), parse.InvocationConfiguration.Output, parse.InvocationConfiguration.Error, colors, progress).Execute(cancellation),
            CancellationToken.None));
        return command;
    }

    /// <summary>Without draws a spread and a seed mean nothing.</summary>
    private void RefuseSpreadOfNothing(CommandResult result)
    {
        if (result.GetResult(_draws.Option) is not null)
        {
            _conditions.RefuseInstrument(result, "--draws");
            return;
        }
        foreach (Option option in (Option[])[_spread.Option, _seed.Option])
        {
            if (result.GetResult(option) is not null)
                result.AddError($"{option.Name}: found without --draws; allowed beside --draws N");
        }
    }

    private PredictRequest Request(ParseResult parse)
    {
        return new PredictRequest(
            parse.GetRequiredValue(_files), _conditions.Of(parse), _conditions.SeenBy(parse), parse.GetValue(_output), parse.GetValue(_force), parse.GetValue(_json),
            _conditions.MaterialFolder(parse), _conditions.Sets(parse), _width.Of(parse), parse.GetValue(_overlay))
        {
            Draws = _draws.Of(parse) is int draws and > 0 ? new DrawOptions { Draws = draws, Spread = _spread.Of(parse), Seed = _seed.Of(parse) } : null,
        };
    }
}
