using BarbuleOptics.Ensembles;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;
using BarbuleOptics.Tests.Layering;
using BarbuleOptics.Tests.Prediction;
using Xunit;

namespace BarbuleOptics.Tests.Ensembles;

/// <summary>Variance shares of whole structures, and what is shown of things not known.</summary>
public sealed class SensitivityTests
{
    // The peak of a film is proportional to thickness times scale (Born and Wolf, section 1.6: 4 n d = 3 wavelengths). Coefficients of variation 2.25/195 and 0.02:
    // first-order share of the thickness 0.011538^2/(0.011538^2 + 0.02^2) = 0.2497, but for the product of both, 1e-4. The same t widens both.
    [Fact]
    public void Shares_of_a_product_are_those_of_its_relative_variances()
    {
        SensitivityResult result = Analyze(Ensemble.Film("{ mean = 195, sd = 9, n = 16 }") + "\n[preparation]\nmelanin_scale = { mean = 1, sd = 0.02 }\n", 8000, Predictions.At(400, 640, 4));
        OutcomeShares peak = result.Views[0].Outcomes.Single(outcome => outcome.Name == "peak_nm");
        Assert.Equal(["preparation.melanin_scale", "layer1.thickness"], peak.Inputs.Select(input => input.Key));
        Assert.Equal(0.7503, peak.Inputs[0].First, 0.03);
        Assert.Equal(0.7503, peak.Inputs[0].Total, 0.03);
        Assert.Equal(0.2497, peak.Inputs[1].First, 0.03);
        Assert.Equal(0.2497, peak.Inputs[1].Total, 0.03);
    }

    // The same product with the index in place of the scale: 4 n d = 3 wavelengths; coefficient of variation 0.02/2 = 0.01, and 0.011538 of the thickness:
    // the index has 0.01^2/(0.01^2 + 0.011538^2) = 0.4290.
    [Fact]
    public void An_index_may_carry_a_spread()
    {
        string text = Ensemble.Film("{ mean = 195, sd = 9, n = 16 }").Replace("{ n = 2.0 }", "{ n = 2.0, n_sd = 0.02 }", StringComparison.Ordinal);
        OutcomeShares peak = Analyze(text, 8000, Predictions.At(400, 640, 4)).Views[0].Outcomes.Single(outcome => outcome.Name == "peak_nm");
        Assert.Equal(0.4290, peak.Inputs.Single(input => input.Key == "layer1.material.n").Total, 0.03);
        Assert.Equal(0.5710, peak.Inputs.Single(input => input.Key == "layer1.thickness").Total, 0.03);

        var barbule = Structures.Load(text).Barbule;
        Assert.Equal(barbule, Structures.Load(BarbuleOptics.Files.StructureWriter.Write(barbule)["format = 1\n".Length..]).Barbule);
    }

    [Fact]
    public void Measurements_of_the_same_units_stand_together_and_threads_leave_no_trace()
    {
        const string text = """
            [cortex]
            thickness = [100, 103, 106, 97]
            [[layer]]
            form = "film"
            thickness = [82, 85, 79, 81]
            rows = [2, 3]
            pitch = { min = 150, max = 165 }
            """;
        SensitivityResult one = Analyze(text, 200, Predictions.At(400, 700, 20) with { Threads = 1 }), two = Analyze(text, 200, Predictions.At(400, 700, 20) with { Threads = 3 });
        Assert.Equal(
            ["cortex.thickness + layer1.thickness", "layer1.pitch", "layer1.rows"],
            one.Views[0].Outcomes.Single(outcome => outcome.Name == "h_deg").Inputs.Select(input => input.Key).Order(StringComparer.Ordinal));
        Assert.Equal(one.Views[0].Outcomes, two.Views[0].Outcomes);
    }

    // Two films in air: thicker ones peak at longer wavelengths, so that the sweep's hue runs one way, from its least value to its most.
    [Fact]
    public void Hue_is_shown_against_each_thing_not_known_and_terms_within_reach()
    {
        const string text = """
            [cortex]
            thickness = { min = 150, max = 210 }
            [[layer]]
            form = "film"
            thickness = 30
            rows = [1, 2]
            pitch = 100
            [preservation]
            melanosome_shrinkage = 0
            """;
        var loaded = Structures.Load(text);
        UnknownView view = UnknownReach.Of(loaded.Barbule, Predictions.At(300, 780, 2), loaded.Catalog, TestContext.Current.CancellationToken)!.Views[0];
        Assert.Equal([("layer1.rows", 2), ("cortex.thickness", 21)], view.Sweeps.Select(sweep => (sweep.Key, sweep.Points.Count)));
        Assert.Equal((150, 210), (view.Sweeps[1].Points[0].Value, view.Sweeps[1].Points[^1].Value));
        Assert.Equal([1, 2], view.Sweeps[0].Points.Select(point => point.Value));
        Assert.True(view.ReachableTerms.Count >= view.Sweeps[1].Points.Select(point => point.Term).Distinct().Count());
        Assert.Equal(1, view.ReachableTerms.Sum(term => term.Share), 1e-12);

        // The end of the sweep is the structure with that value.
        StructurePrediction end = Predictions.Of(text, Predictions.At(300, 780, 5), "cortex.thickness=210");
        Assert.Equal(end.Views[0].Color!.Lab.HueDegrees, view.Sweeps[1].Points[^1].HueDegrees!.Value, 1e-4);
        // A list of rows of a living barbule is no lack of knowledge.
        Assert.Null(UnknownReach.Of(Structures.Load("[cortex]\nthickness = 100\n[[layer]]\nform = 'film'\nthickness = 30\nrows = [1, 2]\npitch = 100\n").Barbule, Predictions.At(400, 700, 20), loaded.Catalog, TestContext.Current.CancellationToken));
    }

    private static SensitivityResult Analyze(string text, int draws, PredictionConditions conditions)
    {
        var loaded = Structures.Load(text);
        Assert.True(
            SensitivityAnalysis.TryAnalyze(loaded.Barbule, conditions, new DrawOptions { Draws = draws }, loaded.Catalog, out SensitivityResult? result, out var problems, cancellation: TestContext.Current.CancellationToken),
            string.Join('\n', problems));
        return result;
    }
}
