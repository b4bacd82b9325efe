using System.CommandLine;
using System.CommandLine.Parsing;
using BarbuleOptics.Color;
using BarbuleOptics.Layering.Mixing;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;
using BarbuleOptics.Vision;

namespace BarbuleOptics.Cli;

/// <summary>The options that say how structures are looked at, the same for every command.</summary>
internal sealed class ConditionOptions
{
    private static readonly PredictionConditions Standard = new();

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
    private readonly Option<string?> _materials = new("--materials") { Description = "Folder of material tables of your own; where a built-in material has the same name, yours is taken", HelpName = "DIR" };
    private readonly Option<string[]> _sets = new("--set") { Description = "Replace a value of the structure file, named by table and key: barbule.surround=water, cortex.thickness=150, layer1.lumen=0 (layer1 is the outermost); may be repeated", HelpName = "KEY=VALUE" };

    /// <summary>Refuses an instrument beside what is drawn.</summary>
    public void RefuseInstrument(CommandResult result, string drawing) => _instrument.RefuseBeside(result, drawing);

    /// <summary>Adds them all, with their checks.</summary>
    public void AddTo(Command command)
    {
        Option[] all =
        [
            _wavelengths.Option, _angles.Option, _polarization.Option, _solver.Option, _accuracy.Option, _mixing.Option, _illuminant.Option, _observer.Option,
            _vision, _background, _summation.Option, _materials, _sets, _threads.Option,
        ];
        foreach (Option option in all.Concat(_instrument.All))
            command.Options.Add(option);
        command.Validators.Add(_instrument.Refuse);
        _materials.Validators.Add(result => CommandLineErrors.RefuseEmpty(result, "--materials", result.Tokens, "the name of a folder"));
        _background.Validators.Add(result => CommandLineErrors.RefuseEmpty(result, "--background", result.Tokens, "the name of a file"));
        _vision.Validators.Add(OptionReaders.RefuseUnknownEyes);
        _vision.CompletionSources.Add([.. VisualSystems.All.Select(eye => eye.Name)]);
        command.Validators.Add(RefuseRuleOfNothing);
    }

    /// <summary>Light, background and eyes, which may stand in files.</summary>
    public SeenBy SeenBy(ParseResult parse) => new(_illuminant.Of(parse), parse.GetValue(_background), parse.GetValue(_vision) ?? []);

    /// <summary>Folder of the user's material tables; null for none.</summary>
    public string? MaterialFolder(ParseResult parse) => parse.GetValue(_materials);

    /// <summary>KEY=VALUE texts.</summary>
    public IReadOnlyList<string> Sets(ParseResult parse) => parse.GetValue(_sets) ?? [];

    /// <summary>The conditions, but for what <see cref="SeenBy"/> holds.</summary>
    public PredictionConditions Of(ParseResult parse)
    {
        Polarizations? polarization = _polarization.Of(parse);
        return new PredictionConditions
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
    }

    /// <summary>The grating solver averages nothing.</summary>
    private void RefuseRuleOfNothing(CommandResult result)
    {
        if (ValueOf(_mixing.Option) is string rule && ValueOf(_solver.Option) == SolverNames.Grating)
            result.AddError($"--mixing: found '{rule}' with --solver {SolverNames.Grating}, which averages nothing; allowed with auto or {SolverNames.Multilayer}");

        string? ValueOf(Option option) => result.GetResult(option) is { Tokens.Count: > 0 } found ? found.Tokens[^1].Value : null;
    }
}
