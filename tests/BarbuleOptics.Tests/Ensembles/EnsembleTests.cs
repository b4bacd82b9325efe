using BarbuleOptics.Ensembles;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;
using BarbuleOptics.Tests.Prediction;
using Xunit;

namespace BarbuleOptics.Tests.Ensembles;

/// <summary>Draws through the whole: what each spread does, that threads leave no trace, that probabilities add up.</summary>
public sealed class EnsembleTests
{
    // One disorder, two questions. Rows that move together shift the peak from barbule to barbule, and the mean of many is broader than each. Rows that
    // move by themselves spoil the interference of one barbule: its own peak is lower. Same standard deviation of the same lengths for both.
    [Fact]
    public void Spread_between_broadens_and_spread_within_lowers()
    {
        const string text = """
            [cortex]
            thickness = 60
            [[layer]]
            form = "film"
            material = { n = 1.7 }
            thickness = { mean = 75, sd = 12, n = 10, sd_between = 12 }
            rows = 10
            pitch = { mean = 160, sd = 12, n = 10, sd_between = 12 }
            """;
        PredictionConditions conditions = Predictions.At(380, 700, 4);
        StructurePrediction mean = Predictions.Of(text, conditions);
        DrawnView between = Ensemble.Of(text, Ensemble.Draws(512, Spread.Between), conditions).Views[0];
        DrawnView within = Ensemble.Of(text, Ensemble.Draws(512, Spread.Within), conditions).Views[0];
        double width = mean.Views[0].Features.MainPeak!.HalfHeightWidthNm!.Value, height = mean.Views[0].Features.MainPeak!.Reflectance;

        // The mean over barbules is broader by far more than that over sections, while the peak of a barbule keeps its height.
        Assert.True(between.MeanFeatures.MainPeak!.HalfHeightWidthNm > 1.25 * width);
        Assert.InRange(between.Value("peak_reflectance")!.Median, 0.95 * height, 1.05 * height);
        // The peak of a section is lower, and shifts less: ten rows average their disorder.
        Assert.InRange(within.Value("peak_reflectance")!.Median, 0.5 * height, 0.93 * height);
        Assert.True(within.Value("peak_nm")!.StandardDeviation < 0.6 * between.Value("peak_nm")!.StandardDeviation);
        Assert.True(within.MeanFeatures.MainPeak!.HalfHeightWidthNm < between.MeanFeatures.MainPeak!.HalfHeightWidthNm);
    }

    [Fact]
    public void The_number_of_threads_leaves_no_trace()
    {
        EnsemblePrediction one = With(1), three = With(3);
        Assert.Equal(one.Lengths, three.Lengths);
        foreach ((DrawnView first, DrawnView second) in one.Views.Zip(three.Views))
        {
            Assert.Equal(first.Values, second.Values);
            Assert.Equal(first.Terms, second.Terms);
            Assert.Equal(first.Bands.Median.Values, second.Bands.Median.Values);
            Assert.Equal(first.Bands.To95.Values, second.Bands.To95.Values);
            Assert.Equal(first.Bands.Mean.Values, second.Bands.Mean.Values);
            Assert.Equal(first.Bands.EndError, second.Bands.EndError);
        }

        static EnsemblePrediction With(int threads)
            => Ensemble.Of(Ensemble.Films, Ensemble.Draws(1500), Predictions.At(400, 700, 20, 0, 40) with { Threads = threads });
    }

    [Fact]
    public void Another_seed_agrees_within_the_error_stated()
    {
        DrawnView[] views = [.. Enumerable.Range(1, 6).Select(seed => Ensemble.Of(Ensemble.Films, Ensemble.Draws(800) with { Seed = seed }, Predictions.At(400, 700, 20)).Views[0])];
        Assert.Equal(6, views.Select(view => view.Value("h_deg")!.Median).Distinct().Count());
        double[] medians = [.. views.Select(view => view.Value("L")!.Median)];
        double stated = views.Average(view => view.Value("L")!.MedianError), seen = Math.Sqrt(medians.Sum(median => Math.Pow(median - medians.Average(), 2)) / 5);
        // Six seeds tell a standard deviation to a third (chi square, 5 degrees of freedom); the median of replicates is a little worse than that of all.
        Assert.InRange(seen / stated, 0.2, 2);
    }

    [Fact]
    public void Hue_terms_are_counted_under_every_set_of_melanin_constants()
    {
        DrawnView view = Ensemble.Of(Ensemble.Films, new DrawOptions { Draws = 64 }, Predictions.At(400, 700, 20)).Views[0];
        Assert.Equal(["eumelanin", "melanin-older", "melanin-exocuticle-1", "melanin-exocuticle-2"], view.Melanins.Select(set => set.Material));
        Assert.All(view.Melanins, set => Assert.Equal(1, set.Terms.Sum(term => term.Share), 1e-12));
        // The structure's own constants are one of the sets, and the same draws were made of it.
        Assert.Equal(view.Terms, view.Melanins[0].Terms);
        Assert.InRange(view.LargestDisagreement!.Value, 0, 1);
        Assert.Equal(1, MelaninTerms.Disagreement([new("red", 1, 0)], [new("blue", 1, 0)]));
        Assert.Equal(0.25, MelaninTerms.Disagreement([new("red", 0.75, 0), new("blue", 0.25, 0)], [new("red", 0.5, 0), new("blue", 0.5, 0)]));
    }

    // With hardly any spread every interval closes on the prediction of the mean geometry, rows solved rigorously included.
    [Fact]
    public void Draws_without_much_spread_agree_with_the_prediction()
    {
        const string text = """
            [cortex]
            thickness = { mean = 100, sd = 0.0001, n = 9 }
            [[layer]]
            form = "rod"
            diameter = { mean = 110, sd = 0.0001, n = 9 }
            lumen = 50
            spacing = 150
            rows = 2
            pitch = 130
            """;
        PredictionConditions conditions = Predictions.Rigorously(400, 700, 20, 0, 30);
        StructurePrediction mean = Predictions.Of(text, conditions);
        foreach (Spread spread in (Spread[])[Spread.Mean, Spread.Within])
        {
            EnsemblePrediction ensemble = Ensemble.Of(text, Ensemble.Draws(20, spread), conditions);
            Assert.Equal(SolverNames.Grating, ensemble.Solver);
            for (int angle = 0; angle < 2; angle++)
            {
                ReflectanceBands bands = ensemble.Views[angle].Bands;
                for (int w = 0; w < conditions.Wavelengths.Count; w++)
                {
                    Assert.Equal(mean.Views[angle].Reflectance[w], bands.From95[w], 2e-5);
                    Assert.Equal(mean.Views[angle].Reflectance[w], bands.To95[w], 2e-5);
                }
            }
        }
    }

    [Fact]
    public void An_interrupt_ends_the_work()
    {
        using var source = new CancellationTokenSource();
        source.Cancel();
        var loaded = Layering.Structures.Load(Ensemble.Films);
        Assert.ThrowsAny<OperationCanceledException>(() => EnsemblePredictor.TryPredict(
            loaded.Barbule, Predictions.At(400, 700, 20), Ensemble.Draws(100), loaded.Catalog, out _, out _, cancellation: source.Token));
    }
}
