using System.Collections.Concurrent;
using BarbuleOptics.Anatomy;
using BarbuleOptics.Color;
using BarbuleOptics.Files;
using BarbuleOptics.Figures;
using BarbuleOptics.Figures.Colors;
using BarbuleOptics.Figures.Curves;
using BarbuleOptics.Figures.Sections;
using BarbuleOptics.Layering.Mixing;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;
using BarbuleOptics.Tests.Layering;
using BarbuleOptics.Tests.Samples;
using BarbuleOptics.Vision;
using Xunit;

namespace BarbuleOptics.Tests.Figures;

/// <summary>Predictions to draw: every sample, and structures and conditions at the edge of what there is.</summary>
internal static class FigureCases
{
    private static readonly ConcurrentDictionary<string, StructurePrediction> Done = new();

    private const string ComparedPrefix = "compared-";

    private static readonly string[] ComparedNames = [ComparedPrefix + "one-angle", ComparedPrefix + "one-angle-rule", ComparedPrefix + "nine-angles"];

    private static readonly double[] Few = [0, 30, 60];

    /// <summary>Structures that are deep, wide, thin, bare, crowded or black.</summary>
    private static readonly Dictionary<string, string> Structures = new()
    {
        ["deep"] = "[cortex]\nthickness = 120\n[[layer]]\nform = \"rod\"\ndiameter = 100\nlumen = 50\nspacing = 120\nrows = 200\npitch = 130\nstacking = \"staggered\"",
        ["thick-cortex"] = "[cortex]\nthickness = 9000\n[[layer]]\nform = \"rod\"\ndiameter = 100\nspacing = 120\nrows = 2\npitch = 130",
        ["thick-back"] = "[cortex]\nthickness = 120\n[[layer]]\nform = \"rod\"\ndiameter = 100\nspacing = 120\nrows = 3\npitch = 130\n[back]\nthickness = 30000\nbehind = \"air\"",
        ["wide"] = "[cortex]\nthickness = 120\n[[layer]]\nform = \"platelet\"\nthickness = 60\nwidth = 8000\nwall = 10\nspacing = 8200\nrows = 4\npitch = 150\nstacking = \"staggered\"",
        ["thin-films"] = "[cortex]\nthickness = 3000\n[[layer]]\nform = \"film\"\nthickness = 0.5\nrows = 3\npitch = 400",
        ["only-cortex"] = "[cortex]\nthickness = 500",
        ["no-cortex"] = "[[layer]]\nform = \"rod\"\ndiameter = 100\nspacing = 100\nlumen = 60",
        ["black"] = "[barbule]\nbacking = \"air\"\nmatrix = \"air\"\n[cortex]\nthickness = 100",
        ["three-spacings"] = """
            [barbule]
            surround = "water"
            backing = "chitin"
            axis = "along"
            [cortex]
            thickness = 100
            [[layer]]
            form = "rod"
            diameter = 100
            spacing = 130
            rows = 2
            pitch = 120
            gap = 60
            [[layer]]
            form = "platelet"
            material = "melanin-older"
            thickness = 80
            width = 300
            wall = 20
            spacing = 350
            lumen_material = "resin"
            core_air = 0.5
            [[layer]]
            form = "flattened-rod"
            material = { n = 1.7123456, k = 0.0123456 }
            height = 40
            width = 90
            spacing = 100
            rows = 3
            pitch = 60
            """,
        ["many-films"] = string.Concat(new[] { "\"chitin\"", "\"melanin-older\"", "\"air\"", "{ n = 1.4 }", "{ n = 1.6, k = 0.123456789 }", "\"mgf2\"", "\"n-bk7\"", "\"silver\"", "\"water\"" }
            .Select(material => $"[[layer]]\nform = \"film\"\nmaterial = {material}\nthickness = 60\n")),
    };

    private static readonly Dictionary<string, PredictionConditions> Conditions = new()
    {
        ["one-angle"] = Seen([0]),
        ["twelve-angles"] = Seen([0, 5, 10, 15, 20, 25, 30, 35, 40, 45, 50, 55]),
        ["fractions-to-grazing"] = Seen([0, 7.25, 14.5, 21.75, 29, 60, 75, 80, 85, 87.5, 89, 89.99]),
        ["ninety-angles"] = Seen([.. Enumerable.Range(0, 90).Select(i => (double)i)]),
        ["one-wavelength"] = Seen([0, 20, 40, 60]) with { Wavelengths = Grid(500, 500, 1) },
        ["far-infrared"] = Seen([0, 45]) with { Wavelengths = Grid(250, 20000, 10) },
        ["four-eyes"] = Seen([0, 30, 60]) with { Eyes = [.. VisualSystems.All, VisualSystems.Violet with { Name = "marsh-singer with a name that is too long for its column" }], Illuminant = Illuminant.A },
        ["no-eyes"] = Seen([0, 30]) with { Eyes = [] },
        ["people-only"] = Seen([0, 30]) with { Wavelengths = Grid(400, 700, 5), Observer = StandardObserver.Cie1964TenDegree },
        ["p-polarized"] = Seen([0, 45]) with { Polarization = Polarizations.P },
    };

    /// <summary>Names of everything that <see cref="Predict"/> knows.</summary>
    public static TheoryData<string> All => [.. SampleFiles.Names, .. Structures.Keys, .. Conditions.Keys, .. ComparedNames];

    /// <summary>The prediction of a case; computed once for all tests.</summary>
    public static StructurePrediction Predict(string name) => Done.GetOrAdd(name, Compute);

    private static StructurePrediction Compute(string name)
    {
        if (Structures.TryGetValue(name, out string? text))
            return Predict(Layering.Structures.Load(text), Seen(Few));
        if (name.StartsWith(ComparedPrefix, StringComparison.Ordinal))
            return Compared("hollow-rods", name.Contains("rule", StringComparison.Ordinal) ? "mean-index" : "", name.Contains("one", StringComparison.Ordinal) ? [0] : [.. Enumerable.Range(0, 9).Select(i => 10.0 * i)]);
        return Conditions.TryGetValue(name, out PredictionConditions? conditions)
            ? Predict(SampleFiles.Load("hollow-rods"), conditions)
            : Predict(SampleFiles.Load(name), Seen(Few));
    }

    public static StructurePrediction Predict(string structure, params double[] degrees) => Predict(Layering.Structures.Load(structure), Seen(degrees));

    /// <summary>A sample by the grating solver, or by a rule that is named, compared with the other; the angles in degrees.</summary>
    public static StructurePrediction Compared(string sample, string rule, params double[] degrees)
        => Done.GetOrAdd($"{sample} {rule} {string.Join(' ', degrees)}", _ => Predict(SampleFiles.Load(sample), Seen(degrees) with
        {
            Solver = SolverChoice.Auto,
            Mixing = MixingRules.TryFind(rule, out IMixingRule? found) ? found : null,
        }));

    /// <summary>All figures, with the other solver's curves where there are any.</summary>
    public static IEnumerable<Figure> Figures(string name, FigureSize size)
    {
        StructurePrediction prediction = Predict(name);
        return [ReflectanceFigure.Draw(prediction, size, overlays: true), SectionFigure.Draw(prediction, size), .. ColorFigures(name, size)];
    }

    /// <summary>Those of color: chromaticity, space of birds, swatches.</summary>
    public static IEnumerable<Figure> ColorFigures(string name, FigureSize size)
    {
        StructurePrediction prediction = Predict(name);
        return [ChromaticityFigure.Draw(prediction, size), BirdSpaceFigure.Draw(prediction, size), SwatchFigure.Draw(prediction, size)];
    }

    // Coarse: figures are looked at here, not spectra.
    private static PredictionConditions Seen(double[] degrees)
        => new() { Incidences = [.. degrees.Select(Angle.FromDegrees)], Accuracy = 1e-2, Solver = SolverChoice.Multilayer, Wavelengths = Grid(300, 780, 4) };

    private static WavelengthGrid Grid(double fromNm, double toNm, double stepNm)
        => WavelengthGrid.FromRange(Length.FromNanometres(fromNm), Length.FromNanometres(toNm), Length.FromNanometres(stepNm));

    private static StructurePrediction Predict(LoadedStructure loaded, PredictionConditions conditions)
    {
        Assert.True(Predictor.TryPredict(loaded.Barbule, conditions, loaded.Catalog, out StructurePrediction? prediction, out IReadOnlyList<AnatomyProblem> problems), string.Join('\n', problems));
        return prediction;
    }
}
