using BarbuleOptics.Ensembles;
using BarbuleOptics.Files;
using BarbuleOptics.Prediction;
using BarbuleOptics.Tests.Layering;
using Xunit;

namespace BarbuleOptics.Tests.Ensembles;

/// <summary>Draws of a structure given as the text of a structure file.</summary>
internal static class Ensemble
{
    /// <summary>A film of index 2 in air on glass of index 1.5: R is greatest where 4 n d = 3 wavelengths, at 520 nm for 195 nm.</summary>
    public static string Film(string thickness) => $$"""
        [barbule]
        matrix = { n = 1.5 }
        backing = { n = 1.5 }
        [[layer]]
        form = "film"
        material = { n = 2.0 }
        thickness = {{thickness}}
        """;

    /// <summary>Melanin films in keratin, each length with every spread.</summary>
    public const string Films = """
        [cortex]
        thickness = { mean = 120, sd = 8, n = 12, sd_between = 5 }
        [[layer]]
        form = "film"
        thickness = { mean = 90, sd = 9, n = 12, sd_between = 6 }
        rows = 6
        pitch = { mean = 175, sd = 12, n = 12, sd_between = 9 }
        """;

    public static EnsemblePrediction Of(string text, DrawOptions options, PredictionConditions conditions)
    {
        LoadedStructure loaded = Structures.Load(text);
        Assert.True(
            EnsemblePredictor.TryPredict(
                loaded.Barbule, conditions, options, loaded.Catalog, out EnsemblePrediction? ensemble, out var problems, cancellation: TestContext.Current.CancellationToken),
            string.Join('\n', problems));
        return ensemble;
    }

    /// <summary>The one problem of draws that cannot be made.</summary>
    public static BarbuleOptics.Anatomy.AnatomyProblem Problem(string text, DrawOptions options, PredictionConditions conditions)
    {
        LoadedStructure loaded = Structures.Load(text);
        Assert.False(EnsemblePredictor.TryPredict(
            loaded.Barbule, conditions, options, loaded.Catalog, out _, out var problems, cancellation: TestContext.Current.CancellationToken));
        return Assert.Single(problems);
    }

    public static DrawOptions Draws(int count, Spread spread = Spread.Mean) => new() { Draws = count, Spread = spread, ComparesMelanins = false };
}
