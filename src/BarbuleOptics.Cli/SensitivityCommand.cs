using System.CommandLine;
using BarbuleOptics.Ensembles;
using BarbuleOptics.Figures;

namespace BarbuleOptics.Cli;

/// <summary>The command line of <c>barbule sensitivity</c>.</summary>
internal sealed class SensitivityCommand
{
    private const int StandardDraws = 2000;

    private readonly ConditionOptions _conditions = new();
    private readonly Argument<string> _file = new("FILE") { Description = "Structure file whose lengths have spreads: { mean, sd, n }, { min, max } or replicates" };
    private readonly CheckedOption<int> _draws = new("--draws", "N", $"Draws in all ({DrawOptions.LeastDraws} to {DrawOptions.MostDraws}), shared among the measurements [{StandardDraws}]", StandardDraws, OptionReaders.Draws);
    private readonly CheckedOption<Spread> _spread = new("--spread", "mean|between|within", "Whose variance is shared out: that of the mean, between barbules, or within a section [mean]", Spread.Mean, OptionReaders.SpreadName, SpreadNames.All);
    private readonly CheckedOption<long> _seed = new("--seed", "S", "Names the random draws: the same seed, the same results [1]", 1, OptionReaders.Seed);
    private readonly CheckedOption<FigureSize> _width = new("--width", "mm", "Printed width of the figure, such as 85 or 170 mm for one or two columns [85]", FigureSize.OneColumn, OptionReaders.FigureWidth);
    private readonly Option<string?> _output = new("--out") { Description = "Folder for sensitivity.csv, sensitivity.json and the figure", HelpName = "DIR" };
    private readonly Option<bool> _force = new("--force") { Description = "Replace results that are in the folder already", Arity = ArgumentArity.Zero };
    private readonly Option<bool> _json = new("--json") { Description = "Print one JSON document and nothing else", Arity = ArgumentArity.Zero };

    public static Command Create(ProgressLine progress)
    {
        var options = new SensitivityCommand();
        var command = new Command("sensitivity", "Which measurement decides peak, hue and chroma: shares of the variance") { options._file };
        options._conditions.AddTo(command);
        command.Validators.Add(result => options._conditions.RefuseInstrument(result, "sensitivity"));
        foreach (Option option in (Option[])[options._draws.Option, options._spread.Option, options._seed.Option, options._output, options._force, options._json, options._width.Option])
            command.Options.Add(option);
        options._file.Validators.Add(result => CommandLineErrors.RefuseOptions(result, command));
        options._file.Validators.Add(result => CommandLineErrors.RefuseEmpty(result, "FILE", result.Tokens, "the name of a structure file"));
        options._output.Validators.Add(result => CommandLineErrors.RefuseEmpty(result, "--out", result.Tokens, "the name of a folder"));
        command.Validators.Add(CommandLineErrors.RefuseMissingValues);
        // On a thread of its own, or nobody would listen for an interrupt before the work is done.
        command.SetAction((parse, cancellation) => Task.Run(
            () => new SensitivityWork(options.Request(parse), parse.InvocationConfiguration.Output, parse.InvocationConfiguration.Error, progress).Execute(cancellation),
            CancellationToken.None));
        return command;
    }

    private SensitivityRequest Request(ParseResult parse) => new(
        parse.GetRequiredValue(_file), _conditions.Of(parse), _conditions.SeenBy(parse),
        new DrawOptions { Draws = _draws.Of(parse), Spread = _spread.Of(parse), Seed = _seed.Of(parse) },
        parse.GetValue(_output), parse.GetValue(_force), parse.GetValue(_json), _conditions.MaterialFolder(parse), _conditions.Sets(parse), _width.Of(parse));
}
