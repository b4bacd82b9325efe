using System.CommandLine;
using System.CommandLine.Parsing;
using BarbuleOptics.Color;
using BarbuleOptics.Ensembles;
using BarbuleOptics.Figures;
using BarbuleOptics.Layering.Mixing;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;
using BarbuleOptics.Vision;

namespace BarbuleOptics.Cli;

/// <summary>The command line of <c>barbule predict</c>.</summary>
internal sealed class PredictCommand
{
    private static readonly PredictionConditions Standard = new();

    private readonly Argument<string[]> _files = new("FILE") { Description = "Structure files, one barbule each; `barbule sample DIR` writes some to start from", Arity = ArgumentArity.OneOrMore };
    private readonly CheckedOption<WavelengthGrid> _wavelengths = new("--wavelengths", "from:to:step", "Vacuum wavelengths in nm: first, last and step [300:780:1]", Standard.Wavelengths, OptionReaders.Wavelengths);
    private readonly CheckedOption<ValueList<Angle>> _angles = new("--angles", "list|range", "Angles of incidence in degrees, from the normal: a list (0,30,60) or first, last and step (0:60:15) [0]", Standard.Incidences, OptionReaders.Angles);
    private readonly CheckedOption<Polarizations?> _polarization = new("--polarization", "unpolarized|s|p", "Polarization of the light for table and color [unpolarized]; spectra.csv holds all three unless it is given", null, OptionReaders.Polarization, PolarizationNames.All);
    private readonly CheckedOption<SolverChoice> _solver = new("--solver", "auto|multilayer|grating", "How the section is solved: multilayer averages rows into films, grating solves rows as they are, auto takes films by the one and rows by the other [auto]; multilayer without --mixing leaves out the comparison of the two", Standard.Solver, OptionReaders.Solver, SolverNames.All);
    private readonly CheckedOption<double> _accuracy = new("--accuracy", "number", "Largest absolute error allowed in reflectance, transmittance, absorptance and diffracted reflectance [1e-4]; the reflectance of films keeps 2e-5 in any case", Standard.Accuracy, OptionReaders.Accuracy);
    private readonly CheckedOption<IMixingRule?> _mixing = new("--mixing", "rule", $"Ask for the layer model, with rows averaged into films by a rule: {string.Join(", ", MixingRules.All.Select(rule => rule.Name))} [none; {MixingRules.Default.Name} with --solver multilayer and where layer model and grating solver are compared]", Standard.Mixing, OptionReaders.Mixing, MixingRules.All.Select(rule => rule.Name));
    private readonly CheckedOption<string> _illuminant = new("--illuminant", "NAME|FILE", $"Light that color is computed for, to people and to birds: {string.Join(", ", Illuminant.All.Select(light => light.Name))}, or the path of a table of your own (with a / or ending in .toml) [D65]", Standard.Illuminant.Name, OptionReaders.Light, Illuminant.All.Select(light => light.Name));
    private readonly CheckedOption<StandardObserver> _observer = new("--observer", "name", $"Eye that color is computed for: {string.Join(" or ", StandardObservers.Names)} [1931-2deg]", Standard.Observer, OptionReaders.Observer, StandardObservers.Names);
    private readonly CheckedOption<SummationStep> _summation = new("--summation", "1|5", "Step in nm of the sums that give X, Y and Z [1]", Standard.Summation, OptionReaders.Summation, ["1", "5"]);
    private readonly Option<string[]> _vision = new("--vision") { Description = $"Eye of a bird to compute color for, beside {string.Join(" and ", VisualSystems.Averages.Select(eye => eye.Name))}: {string.Join(", ", VisualSystems.All.Except(VisualSystems.Averages).Select(eye => eye.Name))}, or the path of a file of your own (with a / or ending in .toml); may be repeated", HelpName = "NAME|FILE", Arity = ArgumentArity.OneOrMore };
    private readonly Option<string?> _background = new("--background") { Description = "File with the reflectance of what the eyes of birds are adapted to [flat, a perfect mirror]", HelpName = "FILE" };
    private readonly InstrumentOptions _instrument = new();
    private readonly CheckedOption<int> _threads = new("--threads", "N", "Most processors used [all]; results do not depend on it", Standard.Threads, OptionReaders.Threads);
    private readonly CheckedOption<FigureSize> _width = new("--width", "mm", "Printed width of the figures, such as 85 or 170 mm for one or two columns [85]", FigureSize.OneColumn, OptionReaders.FigureWidth);
    private readonly Option<bool> _overlay = new("--overlay") { Description = "Draw into the reflectance figure, dashed, what the layer model says beside the grating solver, or the grating solver beside --mixing", Arity = ArgumentArity.Zero };
    private readonly CheckedOption<int> _draws = new("--draws", "N", $"Draw the structure N times from the spread of its measurements ({DrawOptions.LeastDraws} to {DrawOptions.MostDraws}) and report intervals and the probability of each hue term [none]", 0, OptionReaders.Draws);
    private readonly CheckedOption<Spread> _spread = new("--spread", "mean|between|within", "Which spread is drawn from: mean, sd/sqrt(n), how sure is this color; between barbules, sd_between, what an instrument sees over a spot; within a section, sd, what disorder of the rows does [mean]", Spread.Mean, OptionReaders.SpreadName, SpreadNames.All);
    private readonly CheckedOption<long> _seed = new("--seed", "S", "Names the random draws: the same seed, the same results [1]", 1, OptionReaders.Seed);
    private readonly Option<string?> _output = new("--out") { Description = "Folder for spectra.csv, prediction.json and figures; with several files, a folder each within it", HelpName = "DIR" };
    private readonly Option<bool> _force = new("--force") { Description = "Replace results that are in the folder already", Arity = ArgumentArity.Zero };
    private readonly Option<bool> _json = new("--json") { Description = "Print one JSON document and nothing else", Arity = ArgumentArity.Zero };
    private readonly Option<string?> _materials = new("--materials") { Description = "Folder of material tables of your own; where a built-in material has the same name, yours is taken", HelpName = "DIR" };
    private readonly Option<string[]> _sets = new("--set") { Description = "Replace a value of the structure file, named by table and key: barbule.surround=water, cortex.thickness=150, layer1.lumen=0 (layer1 is the outermost); may be repeated", HelpName = "KEY=VALUE" };

    public static Command Create(TerminalColors colors, ProgressLine progress)
    {
        var options = new PredictCommand();
        var command = new Command("predict", "Reflectance, CIE color and hue of measured structures")
        {
            options._files, options._wavelengths.Option, options._angles.Option, options._polarization.Option, options._solver.Option,
            options._accuracy.Option, options._mixing.Option, options._illuminant.Option, options._observer.Option, options._output,
            options._vision, options._background, options._summation.Option, options._draws.Option, options._spread.Option, options._seed.Option,
            options._force, options._json, options._materials, options._sets, options._threads.Option, options._width.Option, options._overlay,
        };
        foreach (Option option in options._instrument.All)
            command.Options.Add(option);
        command.Validators.Add(options._instrument.Refuse);
        options._files.Validators.Add(result => CommandLineErrors.RefuseOptions(result, command));
        options._files.Validators.Add(result => CommandLineErrors.RefuseEmpty(result, "FILE", result.Tokens, "the name of a structure file"));
        options._output.Validators.Add(result => CommandLineErrors.RefuseEmpty(result, "--out", result.Tokens, "the name of a folder"));
        options._materials.Validators.Add(result => CommandLineErrors.RefuseEmpty(result, "--materials", result.Tokens, "the name of a folder"));
        options._background.Validators.Add(result => CommandLineErrors.RefuseEmpty(result, "--background", result.Tokens, "the name of a file"));
        options._vision.Validators.Add(OptionReaders.RefuseUnknownEyes);
        options._vision.CompletionSources.Add([.. VisualSystems.All.Select(eye => eye.Name)]);
        command.Validators.Add(options.RefuseRuleOfNothing);
        command.Validators.Add(options.RefuseSpreadOfNothing);
        // The parser counts values, so that `--out here --out` would pass.
        command.Validators.Add(result =>
        {
            foreach (OptionResult option in result.Children.OfType<OptionResult>().Where(option => option.Option.Arity.MinimumNumberOfValues > 0))
            {
                if (option.Tokens.Count > 0 && option.IdentifierTokenCount > option.Tokens.Count)
                    result.AddError($"Required argument missing for option: '{option.Option.Name}'.");
            }
        });
        // On a thread of its own, or nobody would listen for an interrupt before the work is done.
        command.SetAction((parse, cancellation) => Task.Run(
            () => new PredictRun(options.Request(parse), parse.InvocationConfiguration.Output, parse.InvocationConfiguration.Error, colors, progress).Execute(cancellation),
            CancellationToken.None));
        return command;
    }

    /// <summary>The grating solver averages nothing.</summary>
    private void RefuseRuleOfNothing(CommandResult result)
    {
        if (ValueOf(_mixing.Option) is string rule && ValueOf(_solver.Option) == SolverNames.Grating)
            result.AddError($"--mixing: found '{rule}' with --solver {SolverNames.Grating}, which averages nothing; allowed with auto or {SolverNames.Multilayer}");

        string? ValueOf(Option option) => result.GetResult(option) is { Tokens.Count: > 0 } found ? found.Tokens[^1].Value : null;
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

    private PredictRequest Request(ParseResult parse)
    {
        Polarizations? polarization = _polarization.Of(parse);
        var conditions = new PredictionConditions
        {
            Wavelengths = _wavelengths.Of(parse),
            Incidences = _angles.Of(parse),
            Polarization = polarization ?? Polarizations.Unpolarized,
            AllPolarizations = polarization is null,
            Accuracy = _accuracy.Of(parse),
            Solver = _solver.Of(parse),
            Mixing = _mixing.Of(parse),
            Observer = _observer.Of(parse),
            Summation = _summation.Of(parse),
            Instrument = _instrument.Of(parse),
            Threads = _threads.Of(parse),
        };
        return new PredictRequest(
            parse.GetRequiredValue(_files), conditions, new SeenBy(_illuminant.Of(parse), parse.GetValue(_background), parse.GetValue(_vision) ?? []), parse.GetValue(_output), parse.GetValue(_force), parse.GetValue(_json),
            parse.GetValue(_materials), parse.GetValue(_sets) ?? [], _width.Of(parse), parse.GetValue(_overlay))
        {
            Draws = _draws.Of(parse) is int draws and > 0 ? new DrawOptions { Draws = draws, Spread = _spread.Of(parse), Seed = _seed.Of(parse) } : null,
        };
    }
}
