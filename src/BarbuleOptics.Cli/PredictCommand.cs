using System.CommandLine;
using System.CommandLine.Parsing;
using BarbuleOptics.Color;
using BarbuleOptics.Layering.Mixing;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Cli;

/// <summary>The command line of <c>barbule predict</c>.</summary>
internal sealed class PredictCommand
{
    private static readonly PredictionConditions Standard = new();

    private readonly Argument<string[]> _files = new("FILE") { Description = "Structure files, one barbule each", Arity = ArgumentArity.OneOrMore };
    private readonly CheckedOption<WavelengthGrid> _wavelengths = new("--wavelengths", "from:to:step", "Vacuum wavelengths in nm [300:780:1]", Standard.Wavelengths, OptionReaders.Wavelengths);
    private readonly CheckedOption<ValueList<Angle>> _angles = new("--angles", "list|range", "Angles of incidence in degrees, 0,30,60 or 0:60:15 [0]", Standard.Incidences, OptionReaders.Angles);
    private readonly CheckedOption<Polarizations?> _polarization = new("--polarization", "unpolarized|s|p", "Of table, views and color [unpolarized]; spectra.csv holds all three unless it is given", null, OptionReaders.Polarization);
    private readonly CheckedOption<string> _solver = new("--solver", "auto|multilayer", "How the section is solved [auto, which is multilayer]", "auto", OptionReaders.Solver);
    private readonly CheckedOption<double> _accuracy = new("--accuracy", "number", "Largest absolute error in R, T and A [1e-4]", Standard.Accuracy, OptionReaders.Accuracy);
    private readonly CheckedOption<IMixingRule> _mixing = new("--mixing", "rule", $"How rows are averaged into films: {string.Join(", ", MixingRules.All.Select(rule => rule.Name))} [{MixingRules.Default.Name}]", Standard.Mixing, OptionReaders.Mixing);
    private readonly CheckedOption<Illuminant> _illuminant = new("--illuminant", "name", $"{string.Join(", ", Illuminant.All.Select(light => light.Name))} [D65]", Standard.Illuminant, OptionReaders.IlluminantName);
    private readonly CheckedOption<StandardObserver> _observer = new("--observer", "name", $"{string.Join(" or ", StandardObservers.Names)} [1931-2deg]", Standard.Observer, OptionReaders.Observer);
    private readonly CheckedOption<int> _threads = new("--threads", "N", "Most processors used [all]; results do not depend on it", Standard.Threads, OptionReaders.Threads);
    private readonly Option<string?> _output = new("--out") { Description = "Folder for spectra.csv and prediction.json; with several files, a folder each within it", HelpName = "DIR" };
    private readonly Option<bool> _force = new("--force") { Description = "Replace results that exist" };
    private readonly Option<bool> _json = new("--json") { Description = "Print one JSON document and nothing else" };
    private readonly Option<string?> _materials = new("--materials") { Description = "Folder of material tables of your own; their names win", HelpName = "DIR" };
    private readonly Option<string[]> _sets = new("--set") { Description = "Replace a value of the structure, such as barbule.surround=water or layer1.lumen=0; several allowed", HelpName = "KEY=VALUE" };

    public static Command Create()
    {
        var options = new PredictCommand();
        var command = new Command("predict", "Reflectance, CIE color and hue of measured structures")
        {
            options._files, options._wavelengths.Option, options._angles.Option, options._polarization.Option, options._solver.Option,
            options._accuracy.Option, options._mixing.Option, options._illuminant.Option, options._observer.Option, options._output,
            options._force, options._json, options._materials, options._sets, options._threads.Option,
        };
        options._files.Validators.Add(result =>
        {
            // The parser takes an option that it does not know for one more file.
            foreach (string text in result.Tokens.Select(token => token.Value).Where(text => text.StartsWith('-')))
                result.AddError(CommandLineErrors.UnknownOption(text, command));
        });
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
            () => new PredictRun(options.Request(parse), parse.InvocationConfiguration.Output, parse.InvocationConfiguration.Error).Execute(cancellation),
            CancellationToken.None));
        return command;
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
            Mixing = _mixing.Of(parse),
            Illuminant = _illuminant.Of(parse),
            Observer = _observer.Of(parse),
            Threads = _threads.Of(parse),
        };
        return new PredictRequest(
            parse.GetRequiredValue(_files), conditions, parse.GetValue(_output), parse.GetValue(_force), parse.GetValue(_json),
            parse.GetValue(_materials), parse.GetValue(_sets) ?? []);
    }
}
