using BarbuleOptics.Color;
using BarbuleOptics.Layering.Mixing;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra;
using Xunit;

namespace BarbuleOptics.Tests.Prediction;

/// <summary>How far the layer model is from the rigorous solution: the same distance whichever of the two is the result.</summary>
public sealed class LayerModelErrorTests
{
    private const string Hollow = "[cortex]\nthickness = 120\n[[layer]]\nform = 'rod'\ndiameter = 120\nlumen = 70\nspacing = 170\nrows = 3\npitch = 140\nstacking = 'staggered'\n";

    /// <summary>Main peak of the rigorous spectrum (nm, prominence), peaks of the other, shift; null where none matches.</summary>
    public static TheoryData<double, double, double[], double?> Peaks => new()
    {
        { 500, 0.2, [508, 0.2], 8 },
        { 500, 0.2, [492, 0.1], -8 },
        // The nearest of those that are alike, not the highest.
        { 500, 0.2, [470, 0.3, 510, 0.15], 10 },
        // A narrow resonance beside the band has no counterpart.
        { 500, 0.2, [501, 0.06, 530, 0.2], 30 },
        { 500, 0.2, [560, 0.2], null },
        { 500, 0.2, [500, 0.65], null },
        { 500, 0.2, [], null },
    };

    [Theory]
    [MemberData(nameof(Peaks))]
    public void A_peak_is_matched_by_the_nearest_like_it(double wavelengthNm, double prominence, double[] others, double? shiftNm)
        => Assert.Equal(shiftNm, LayerModelError.PeakShift(Features(others), Features([wavelengthNm, prominence])));

    [Fact]
    public void Without_a_peak_there_is_no_shift() => Assert.Null(LayerModelError.PeakShift(Features([500, 0.1]), Features([])));

    [Fact]
    public void It_is_what_two_runs_differ_by_whichever_is_the_result()
    {
        PredictionConditions conditions = Predictions.Rigorously(360, 780, 5, 0, 40);
        StructurePrediction rigorous = Predictions.Of(Hollow, conditions with { ComparesSolvers = true });
        StructurePrediction layers = Predictions.Of(Hollow, conditions with { ComparesSolvers = true, Mixing = MixingRules.Default });
        StructurePrediction alone = Predictions.Of(Hollow, conditions with { Solver = SolverChoice.Multilayer });
        for (int i = 0; i < 2; i++)
        {
            LayerModelError beside = rigorous.Views[i].LayerModelError!, within = layers.Views[i].LayerModelError!;
            double[] r = rigorous.Views[i].Reflectance.Values.ToArray(), f = layers.Views[i].Reflectance.Values.ToArray();
            double[] change = [.. r.Zip(f, (a, b) => Math.Abs(a - b))];
            Assert.Equal(change.Max(), within.LargestChange);
            Assert.Equal(360 + 5 * Array.IndexOf(change, change.Max()), within.LargestChangeAtNm);
            Assert.Equal(layers.Views[i].Features.MainPeak!.WavelengthNm - rigorous.Views[i].Features.MainPeak!.WavelengthNm, within.PeakShiftNm!.Value, 1e-9);
            Assert.Equal(ColorDifference.Ciede2000(layers.Views[i].Color!.Lab, rigorous.Views[i].Color!.Lab), within.Ciede2000!.Value, 1e-9);
            // Beside a rigorous result slices are coarser: 5e-4 in R.
            Assert.Equal(within.LargestChange, beside.LargestChange, 1e-3);
            Assert.Equal(within.PeakShiftNm!.Value, beside.PeakShiftNm!.Value, 0.3);
            Assert.Equal(within.Ciede2000!.Value, beside.Ciede2000!.Value, 0.1);
            Assert.Equal(MixingRules.Default.Name, beside.Mixing);
            Assert.Equal(r, within.OtherReflectance.Values.ToArray());
            Assert.Equal(alone.Views[i].Reflectance.Values.ToArray(), f);
        }
        Assert.All(alone.Views, view => Assert.Null(view.LayerModelError));
    }

    [Fact]
    public void There_is_none_for_films_nor_for_rods_at_an_angle()
    {
        PredictionConditions conditions = Predictions.Rigorously(500, 520, 5) with { ComparesSolvers = true };
        Assert.Null(Predictions.Of("[cortex]\nthickness = 120\n", conditions).Views[0].LayerModelError);
        Assert.Null(Predictions.Of("barbule.axis = 40\n" + Hollow, conditions).Views[0].LayerModelError);
        Assert.NotNull(Predictions.Of(Hollow, conditions).Views[0].LayerModelError);
        Assert.Null(Predictions.Of(Hollow, conditions).Views[0].LayerModelError!.Ciede2000);
    }

    private static SpectrumFeatures Features(double[] peaks) => new(
        [.. peaks.Chunk(2).Select(peak => new SpectralPeak(peak[0], 0.3, peak[1], null, null)).OrderByDescending(peak => peak.Prominence)], false, false, null, null, null);
}
