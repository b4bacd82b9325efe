using BarbuleOptics.Layering.Mixing;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;
using BarbuleOptics.Tests.Samples;
using Xunit;

namespace BarbuleOptics.Tests.Prediction;

/// <summary>Limits that hold for any right answer, from the structure file to the spectra.</summary>
public sealed class PhysicalSenseTests
{
    private const string Hollow = "[[layer]]\nform = 'rod'\ndiameter = 120\nlumen = 60\nspacing = 170\nrows = 3\npitch = 140\nstacking = 'staggered'\n";

    public static TheoryData<string> Rules => [.. MixingRules.All.Select(rule => rule.Name)];

    // The mean of N coherent slabs, each a further N-th of a fringe thick, leaves out harmonics below the N-th: (r r')^N, below 1e-20 here.
    // What is left is the choice of slices, to the accuracy asked for.
    [Theory]
    [InlineData(0)]
    [InlineData(50)]
    public void A_coherent_back_averaged_over_a_fringe_is_the_incoherent_one(double degrees)
    {
        const int Slabs = 32;
        const double Index = 1.56, WavelengthNm = 550, Tolerance = 1e-9;
        string text = "[barbule]\nbacking = { n = 1.56 }\n[cortex]\nthickness = 120\n" + Hollow + "[back]\nbehind = 'water'\nthickness = 20000\n";
        PredictionConditions conditions = Predictions.At(WavelengthNm, WavelengthNm, 1, degrees) with { Accuracy = 1e-9 };
        StructurePrediction averaged = Predictions.Of(text, conditions);
        double sine = Math.Sin(degrees * Math.PI / 180), fringeNm = WavelengthNm / (2 * Math.Sqrt(Index * Index - sine * sine));
        StructurePrediction[] coherent = [.. Enumerable.Range(0, Slabs).Select(i => Predictions.Of(
            text, conditions, "back.coherent=true", FormattableString.Invariant($"back.thickness={20000 + i * fringeNm / Slabs:R}")))];
        foreach (Polarizations polarization in (Polarizations[])[Polarizations.S, Polarizations.P])
        {
            SpectralResponse expected = Predictions.Response(averaged, polarization);
            SpectralResponse[] slabs = [.. coherent.Select(prediction => Predictions.Response(prediction, polarization))];
            Assert.True(slabs.Max(slab => slab.Reflectance[0]) - slabs.Min(slab => slab.Reflectance[0]) > 1e-4);
            Assert.Equal(expected.Reflectance[0], slabs.Average(slab => slab.Reflectance[0]), Tolerance);
            Assert.Equal(expected.Transmittance[0], slabs.Average(slab => slab.Transmittance[0]), Tolerance);
            Assert.Equal(expected.Absorptance[0], slabs.Average(slab => slab.Absorptance[0]), Tolerance);
        }
    }

    // Air in air: what the solver leaves is rounding, and rounding has neither peaks nor a color.
    [Fact]
    public void What_reflects_nothing_has_no_peaks_and_is_black()
    {
        StructurePrediction prediction = Predictions.Of("barbule.matrix = 'air'\nbarbule.backing = 'air'\n[cortex]\nthickness = 100\n", Predictions.At(300, 780, 1, 0, 45, 80));
        foreach (View view in prediction.Views)
        {
            Assert.Empty(view.Features.Peaks);
            Assert.False(view.Features.AtEdge);
            Assert.Equal(("black", "#000000", "#000000"), (view.Color!.HueTerm, view.Color.Srgb.Hex, view.Color.SrgbBrightened.Hex));
        }
    }

    [Fact]
    public void A_cortex_in_a_surround_of_its_own_index_is_not_seen()
    {
        const string Text = "barbule.matrix = { n = 1.54 }\n[cortex]\nthickness = 180\n" + Hollow;
        PredictionConditions conditions = Predictions.At(300, 780, 20, 0, 50);
        string[] immersed = ["barbule.surround={ n = 1.54 }"];
        StructurePrediction thick = Predictions.Of(Text, conditions, immersed), thin = Predictions.Of(Text, conditions, [.. immersed, "cortex.thickness=0"]);
        AssertSame(thick, thin, 1e-12);
        Assert.True(Distance(Predictions.Of(Text, conditions), Predictions.Of(Text, conditions, "cortex.thickness=0")) > 0.01);
    }

    // Fresnel's equations at the one surface left: rs = (cos a - q)/(cos a + q), rp = (n^2 cos a - q)/(n^2 cos a + q), q = sqrt(n^2 - sin^2 a)
    // (Born and Wolf, Principles of Optics, section 1.5.2; number from memory).
    [Theory]
    [MemberData(nameof(Rules))]
    public void Rods_of_the_matrix_itself_are_not_seen(string rule)
    {
        const double N = 1.54;
        Assert.True(MixingRules.TryFind(rule, out IMixingRule? mixing));
        const string Text = "barbule.matrix = { n = 1.54 }\nbarbule.backing = { n = 1.54 }\n[cortex]\nthickness = 180\n" + Hollow + "material = { n = 1.54 }\nlumen_material = { n = 1.54 }\n";
        foreach (double degrees in (double[])[0, 40, 80])
        {
            StructurePrediction prediction = Predictions.Of(Text, Predictions.At(500, 500, 1, degrees) with { Mixing = mixing });
            (double sine, double cosine) = Math.SinCos(degrees * Math.PI / 180);
            double q = Math.Sqrt(N * N - sine * sine), rs = (cosine - q) / (cosine + q), rp = (N * N * cosine - q) / (N * N * cosine + q);
            Assert.Equal(rs * rs, Predictions.R(prediction, Polarizations.S), 1e-12);
            Assert.Equal(rp * rp, Predictions.R(prediction, Polarizations.P), 1e-12);
        }
    }

    [Fact]
    public void Layers_in_the_other_order_reflect_otherwise()
    {
        const string Rods = "[[layer]]\nform = 'rod'\ndiameter = 120\nspacing = 150\ngap = 30\n", Hollows = Hollow + "gap = 30\n";
        PredictionConditions conditions = Predictions.At(300, 780, 20);
        Assert.True(Distance(Predictions.Of(Rods + Hollows, conditions), Predictions.Of(Hollows + Rods, conditions)) > 0.01);
    }

    // Melanin that absorbs everything hides what lies behind it.
    [Fact]
    public void An_opaque_sheet_hides_what_lies_behind_it()
    {
        const string Sheet = "[cortex]\nthickness = 150\n[[layer]]\nform = 'film'\nthickness = 20000\nmaterial = { n = 1.7, k = 0.3 }\n";
        PredictionConditions conditions = Predictions.At(300, 780, 20, 0, 60);
        AssertSame(Predictions.Of(Sheet, conditions, "barbule.backing=silver"), Predictions.Of(Sheet + "gap = 90\n" + Hollow, conditions), 1e-13);
    }

    // By the law of one film, 2 n d cos(b) = m lambda, the shift shows its index; the phase at the absorbing sheet moves it a little (measured: 0.004).
    [Fact]
    public void The_shift_of_a_cortex_over_angle_shows_its_index()
    {
        StructurePrediction prediction = Predictions.Of(
            "barbule.matrix = { n = 1.55 }\nbarbule.backing = { n = 1.75, k = 0.05 }\n[cortex]\nthickness = 330\n", Predictions.At(300, 780, 1, 0, 15, 30, 45));
        Assert.Equal(1.55, prediction.Track!.EffectiveIndex!.Value, 0.01);
        Assert.All(prediction.Track.Sightings, sighting => Assert.NotNull(sighting.Peak));
    }

    // What the samples' own comments promise of water, about half of the light gone.
    [Fact]
    public void Water_in_the_hollows_takes_half_of_the_light()
    {
        string text = SampleFiles.Text("hollow-rods").Replace("format = 1", "", StringComparison.Ordinal);
        PredictionConditions conditions = Predictions.Rigorously(400, 780, 2);
        double dry = Predictions.Of(text, conditions).Views[0].Features.MainPeak!.Reflectance;
        double wet = Predictions.Of(text, conditions, "layer1.lumen_material=water").Views[0].Features.MainPeak!.Reflectance;
        Assert.InRange(wet / dry, 0.3, 0.6);
    }

    private static double Distance(StructurePrediction one, StructurePrediction other)
        => one.Responses.Zip(other.Responses).Max(pair => pair.First.Reflectance.Values.ToArray().Zip(pair.Second.Reflectance.Values.ToArray(), (a, b) => Math.Abs(a - b)).Max());

    private static void AssertSame(StructurePrediction one, StructurePrediction other, double tolerance) => Assert.InRange(Distance(one, other), 0, tolerance);
}
