using BarbuleOptics.Files;
using BarbuleOptics.Layering.Mixing;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;
using BarbuleOptics.Tests.Layering;
using Xunit;

namespace BarbuleOptics.Tests.Prediction;

/// <summary>Each warning comes where it must, and not where it need not.</summary>
public sealed class WarningTests
{
    private const string Clear = "barbule.matrix = { n = 1.5 }\nbarbule.backing = { n = 1.5 }\n";
    private const string Melanin = "material = { n = 1.7 }\n";
    private const string Sheet = Clear + "[[layer]]\nform = 'film'\nthickness = 60\n" + Melanin;

    /// <summary>Code; a structure and wavelengths with the warning; the same without.</summary>
    public static TheoryData<string, string, string, string, string> Pairs => new()
    {
        // Keratin is published for 400-700 nm.
        { WarningCodes.IndexExtrapolated, "[cortex]\nthickness = 100\n", "399:700:1", "[cortex]\nthickness = 100\n", "400:700:1" },
        { WarningCodes.IndexExtrapolated, "[cortex]\nthickness = 100\n", "400:701:1", Sheet, "300:800:1" },
        { WarningCodes.CoarseSpacing, Rods(150), "450:700:1", Rods(150), "451:700:1" },
        { WarningCodes.BarModel, Platelets(110, ""), "500:501:1", Platelets(100, ""), "500:501:1" },
        { WarningCodes.BarModel, Platelets(100, "wall = 10\n"), "500:501:1", Rods(110), "500:501:1" },
        { WarningCodes.CoreAveraged, Platelets(110, "wall = 10\ncore_air = 0.7\n"), "500:501:1", Platelets(110, "wall = 10\ncore_air = 1\n"), "500:501:1" },
        { WarningCodes.CoreAveraged, Platelets(110, "wall = 10\ncore_air = 0.01\n"), "500:501:1", Platelets(110, "wall = 10\ncore_air = 0\n"), "500:501:1" },
        { WarningCodes.IntervalMiddle, Clear + "[cortex]\nthickness = { min = 100, max = 120 }\n", "500:501:1", Clear + "[cortex]\nthickness = { min = 100, max = 100 }\n", "500:501:1" },
        { WarningCodes.BackingUnknown, Sheet.Replace("{ n = 1.5 }\n[[", "'unknown'\n[[", StringComparison.Ordinal), "500:501:1", Sheet, "500:501:1" },
        { WarningCodes.ObserverNotCovered, Sheet, "381:780:1", Sheet, "380:780:1" },
        { WarningCodes.ObserverNotCovered, Sheet, "380:779:1", Sheet, "300:800:1" },
        { WarningCodes.NoColor, Sheet, "401:700:1", Sheet, "400:700:1" },
        { WarningCodes.NoColor, Sheet, "400:699:1", Sheet, "400:700:20" },
        { WarningCodes.NoColor, Sheet, "400:700:25", Sheet, "400:700:5" },
        // A film of 62.5 nm and n = 2 is a quarter of 500 nm thick and half of 250 nm: one broad peak between.
        { WarningCodes.PeakAtEdge, Quarter, "510:700:1", Quarter, "300:780:1" },
        { WarningCodes.PeakAtEdge, Quarter, "300:490:1", Quarter, "400:600:1" },
        // Sixty pairs of quarter waves of 520 nm reflect a band so narrow that no screen has its green.
        { WarningCodes.OutsideSrgb, "barbule.surround = { n = 1.45 }\nbarbule.matrix = { n = 1.45 }\nbarbule.backing = { n = 1.45 }\n[[layer]]\nform = 'film'\nthickness = 81.25\nmaterial = { n = 1.6 }\nrows = 60\npitch = 170.9\n", "380:780:1", Sheet, "380:780:1" },
    };

    private const string Quarter = Clear + "[[layer]]\nform = 'film'\nthickness = 62.5\nmaterial = { n = 2.0 }\n";

    [Theory]
    [MemberData(nameof(Pairs))]
    public void A_warning_comes_with_its_cause_and_goes_with_it(string code, string with, string withNm, string without, string withoutNm)
    {
        Assert.Contains(code, Codes(with, withNm));
        Assert.DoesNotContain(code, Codes(without, withoutNm));
    }

    // Grating equation at the edge of an order, by hand, for a period of 300 nm and a matrix of 1.5: across in the matrix 300 (1.5 + n_s sin a),
    // in the surround 300 n_s (1 + sin a); along 300 sqrt(1.5^2 - (n_s sin a)^2) and 300 n_s cos a. Rounded down to whole nm.
    [Theory]
    [InlineData("across", 1.0, 0, 450, 300)]
    [InlineData("across", 1.0, 30, 600, 450)]
    [InlineData("across", 1.33, 30, 649, 598)]
    [InlineData("along", 1.0, 0, 450, 300)]
    [InlineData("along", 1.0, 30, 424, 259)]
    [InlineData("along", 1.33, 60, 288, 199)]
    public void Orders_are_told_up_to_their_last_wavelength(string axis, double surround, double degrees, double matrixNm, double surroundNm)
    {
        string text = FormattableString.Invariant($"barbule.surround = {{ n = {surround} }}\nbarbule.axis = '{axis}'\n") + Rods(300);
        foreach ((string code, double lastNm) in ((string, double)[])[(WarningCodes.OrdersInMatrix, matrixNm), (WarningCodes.OrdersInSurround, surroundNm)])
        {
            StructurePrediction met = Predictions.Of(text, Predictions.At(lastNm, 700, 1, degrees));
            PredictionWarning warning = Assert.Single(met.Warnings, warning => warning.Code == code);
            Assert.StartsWith(FormattableString.Invariant($"up to {lastNm} nm "), warning.Message, StringComparison.Ordinal);
            Assert.Equal(degrees, warning.Incidence!.Value.Degrees);
            Assert.DoesNotContain(code, Predictions.Codes(Predictions.Of(text, Predictions.At(lastNm + 1, 700, 1, degrees))));
        }
    }

    // Each layer opens orders by its own spacing, the longer one first; 200 and 300 nm repeat together every 600 nm, 200 and 311 nm never.
    [Theory]
    [InlineData(300, 450, "repeat together after 600 nm")]
    [InlineData(311, 466, "open weaker orders together")]
    public void Orders_of_two_spacings_are_those_of_the_longer_one_and_their_beat_is_told(double spacing, double lastNm, string together)
    {
        string text = Rods(200) + FormattableString.Invariant($"gap = 50\n[[layer]]\nform = 'rod'\ndiameter = 100\nspacing = {spacing}\n") + Melanin;
        PredictionWarning warning = Assert.Single(Predictions.Of(text, Predictions.At(400, 950, 1)).Warnings, warning => warning.Code == WarningCodes.OrdersInMatrix);
        Assert.StartsWith(FormattableString.Invariant($"up to {lastNm} nm "), warning.Message, StringComparison.Ordinal);
        PredictionWarning coarse = Assert.Single(Predictions.Of(text, Predictions.At(400, 950, 1)).Warnings, warning => warning.Code == WarningCodes.CoarseSpacing);
        Assert.Contains(together, coarse.Message, StringComparison.Ordinal);
    }

    // What a grating does is solved by one solver and lies outside the other.
    [Fact]
    public void Warnings_of_orders_and_spacing_are_those_of_the_solver()
    {
        PredictionConditions films = Predictions.At(400, 420, 5), grating = Predictions.Rigorously(400, 420, 5) with { Accuracy = 1e-2 };
        string text = Rods(450);
        Assert.Equal([WarningCodes.CoarseSpacing, WarningCodes.OrdersInMatrix, WarningCodes.OrdersInSurround], Predictions.Codes(Predictions.Of(text, films))[..3]);
        StructurePrediction rigorous = Predictions.Of(text, grating);
        Assert.Equal([WarningCodes.OrdersInMatrix, WarningCodes.OrdersInSurround], Predictions.Codes(rigorous)[..2]);
        Assert.DoesNotContain(WarningCodes.CoarseSpacing, Predictions.Codes(rigorous));
        Assert.Contains("disorder smears", rigorous.Warnings[0].Message, StringComparison.Ordinal);
        Assert.Contains("diffracted_reflectance", rigorous.Warnings[1].Message, StringComparison.Ordinal);
    }

    // Rows that nearly touch exchange more orders than one; far apart they exchange one, whatever their spacings.
    [Fact]
    public void Spacings_are_moved_only_where_rows_feel_each_other()
    {
        string Two(double gap) => Rods(240.3) + FormattableString.Invariant($"gap = {gap}\n[[layer]]\nform = 'rod'\ndiameter = 100\nspacing = 251.9\n") + Melanin;
        PredictionConditions conditions = Predictions.Rigorously(400, 700, 100) with { Accuracy = 1e-2 };
        PredictionWarning warning = Assert.Single(Predictions.Of(Two(0), conditions).Warnings, warning => warning.Code == WarningCodes.SpacingMoved);
        Assert.Contains("layer 1 from 240.3 to ", warning.Message, StringComparison.Ordinal);
        Assert.Contains("layer 2 from 251.9 to ", warning.Message, StringComparison.Ordinal);
        Assert.Contains("changes R by up to ", warning.Message, StringComparison.Ordinal);
        Assert.DoesNotContain(WarningCodes.SpacingMoved, Predictions.Codes(Predictions.Of(Two(150), conditions)));
        StructurePrediction moved = Predictions.Of(Two(0), conditions), apart = Predictions.Of(Two(150), conditions);
        Assert.Equal([240.3, 251.9], moved.MovedSpacings.Select(move => move.FromNm));
        Assert.Equal(400, moved.MovedUpToNm);
        Assert.StartsWith("rows at a common period up to 400 nm", moved.Picture, StringComparison.Ordinal);
        Assert.Empty(apart.MovedSpacings);
        Assert.StartsWith("rows as they are, ", apart.Picture, StringComparison.Ordinal);
        // The layer model moves nothing, but what it is compared with does.
        StructurePrediction films = Predictions.Of(Two(0), conditions with { Mixing = MixingRules.Default, ComparesSolvers = true });
        Assert.Empty(films.MovedSpacings);
        Assert.StartsWith(
            "in the rigorous solution beside this layer model layers of different spacing",
            Assert.Single(films.Warnings, one => one.Code == WarningCodes.SpacingMoved).Message, StringComparison.Ordinal);
    }

    [Fact]
    public void A_period_of_many_wavelengths_is_refused_in_one_line()
    {
        LoadedStructure loaded = Structures.Load(Rods(41_000));
        Assert.False(Predictor.TryPredict(loaded.Barbule, Predictions.Rigorously(400, 410, 5), loaded.Catalog, out _, out var problems, cancellation: TestContext.Current.CancellationToken));
        Assert.Equal("layer1.spacing", Assert.Single(problems).Key);
        Assert.Contains("found rows that repeat after 41000 nm; the grating solver allows up to 100 wavelengths, 40000 nm", problems[0].Message, StringComparison.Ordinal);
        Assert.True(Predictor.TryPredict(loaded.Barbule, Predictions.At(400, 410, 5), loaded.Catalog, out _, out _, cancellation: TestContext.Current.CancellationToken));
        // A rule that is named asks for the layer model, which needs no grating solver but for the comparison.
        PredictionConditions named = Predictions.Rigorously(400, 410, 5) with { Mixing = MixingRules.Default, ComparesSolvers = true };
        Assert.True(Predictor.TryPredict(loaded.Barbule, named, loaded.Catalog, out StructurePrediction? layers, out _, cancellation: TestContext.Current.CancellationToken));
        Assert.Null(layers.Views[0].LayerModelError);
    }

    [Fact]
    public void A_layer_model_says_how_well_the_rigorous_solution_beside_it_is_known()
    {
        const string hollow = "[[layer]]\nform = 'platelet'\nthickness = 60\nwidth = 120\nwall = 15\nspacing = 170\n";
        PredictionConditions named = Predictions.Rigorously(500, 500, 1) with { Mixing = MixingRules.Default, ComparesSolvers = true };
        Assert.DoesNotContain(WarningCodes.AccuracyNotReached, Predictions.Codes(Predictions.Of(hollow, named with { Accuracy = 1e-2 })));
        Assert.Contains(Predictions.Of(hollow, named with { Accuracy = 1e-9 }).Warnings, warning
            => warning.Code == WarningCodes.AccuracyNotReached && warning.Message.StartsWith("the rigorous solution beside this layer model may be off by ", StringComparison.Ordinal));
    }

    // 3 in CIEDE2000, at the worst of the angles, once.
    [Fact]
    public void A_layer_model_that_is_far_off_is_told_where_it_is_the_result()
    {
        const string Hollow = "[cortex]\nthickness = 120\n[[layer]]\nform = 'rod'\ndiameter = 120\nlumen = 100\nspacing = 170\nrows = 4\npitch = 140\nstacking = 'staggered'\n";
        PredictionConditions rigorous = Predictions.Rigorously(380, 780, 10, 0, 30) with { ComparesSolvers = true };
        PredictionConditions layers = rigorous with { Mixing = new BarbuleOptics.Layering.Mixing.FormBirefringence() };
        StructurePrediction prediction = Predictions.Of(Hollow, layers);
        double[] differences = [.. prediction.Views.Select(view => view.LayerModelError!.Ciede2000!.Value)];
        Assert.InRange(differences.Max(), 3.1, 100);
        PredictionWarning warning = Assert.Single(prediction.Warnings, warning => warning.Code == WarningCodes.LayerModelError);
        Assert.Equal(prediction.Views[Array.IndexOf(differences, differences.Max())].Incidence, warning.Incidence);
        Assert.Contains(FormattableString.Invariant($"differs by {differences.Max():0.0} in CIEDE2000"), warning.Message, StringComparison.Ordinal);
        Assert.DoesNotContain(WarningCodes.LayerModelError, Predictions.Codes(Predictions.Of(Hollow, rigorous)));
        Assert.DoesNotContain(WarningCodes.LayerModelError, Predictions.Codes(Predictions.Of(Rods(110), layers)));
    }

    // Onsets for rods at an angle b: 300 (0.5 cos b + sqrt(1.5^2 - (0.5 sin b)^2)) in the matrix, 300 (0.5 cos b + sqrt(1 - (0.5 sin b)^2)) in air; by hand
    // for b = 45 and 30 degrees at 30 degrees of incidence.
    [Theory]
    [InlineData(45, 543, 386)]
    [InlineData(30, 573, 420)]
    public void Orders_of_rods_at_an_angle_are_told_up_to_their_last_wavelength(double axis, double matrixNm, double surroundNm)
    {
        string text = FormattableString.Invariant($"barbule.axis = {axis}\n") + Rods(300);
        foreach ((string code, double lastNm) in ((string, double)[])[(WarningCodes.OrdersInMatrix, matrixNm), (WarningCodes.OrdersInSurround, surroundNm)])
        {
            PredictionConditions conditions = Predictions.Rigorously(lastNm, lastNm + 1, 1, 30) with { Accuracy = 1e-2 };
            PredictionWarning warning = Assert.Single(Predictions.Of(text, conditions).Warnings, warning => warning.Code == code);
            Assert.StartsWith(FormattableString.Invariant($"up to {lastNm} nm "), warning.Message, StringComparison.Ordinal);
        }
    }

    // A backing of n = 1.5 holds half a wave of 600 nm in 200 nm.
    [Fact]
    public void A_back_too_thin_to_average_is_solved_as_it_is_over_the_whole_spectrum()
    {
        string Back(double thickness, string coherent) => Sheet + FormattableString.Invariant($"[back]\nthickness = {thickness}\n") + coherent;
        StructurePrediction thin = Predictions.Of(Back(199, ""), Predictions.At(400, 600, 1)), asked = Predictions.Of(Back(199, "coherent = true\n"), Predictions.At(400, 600, 1));
        Assert.Contains(WarningCodes.BackCoherent, Predictions.Codes(thin));
        Assert.DoesNotContain(WarningCodes.BackCoherent, Predictions.Codes(asked));
        Assert.Equal(asked.Views[0].Reflectance.Values.ToArray(), thin.Views[0].Reflectance.Values.ToArray());
        Assert.DoesNotContain(WarningCodes.BackCoherent, Predictions.Codes(Predictions.Of(Back(201, ""), Predictions.At(400, 600, 1))));
    }

    [Fact]
    public void Films_and_closed_platelets_send_no_orders()
    {
        Assert.DoesNotContain(WarningCodes.OrdersInMatrix, Codes(Platelets(100, "rows = 3\npitch = 90\n"), "30:60:1"));
        Assert.DoesNotContain(WarningCodes.OrdersInMatrix, Codes(Sheet, "30:60:1"));
        Assert.Contains(WarningCodes.OrdersInMatrix, Codes(Platelets(100, "wall = 10\n"), "30:60:1"));
    }

    // Sixty rows of rods five wavelengths thick and more need more slices than are tried.
    [Fact]
    public void An_accuracy_out_of_reach_is_told()
    {
        string huge = Rods(2000).Replace("diameter = 100\n", "diameter = 2000\n", StringComparison.Ordinal).Replace("spacing = 2000", "spacing = 2500", StringComparison.Ordinal) + "rows = 60\npitch = 2010\n";
        StructurePrediction prediction = Predictions.Of(huge, Predictions.At(400, 400, 1, 0, 80) with { Accuracy = 1e-10 });
        Assert.Contains(WarningCodes.AccuracyNotReached, Predictions.Codes(prediction));
        Assert.True(prediction.ErrorEstimate > 1e-10);
        StructurePrediction reached = Predictions.Of(Rods(150), Predictions.At(400, 700, 50) with { Accuracy = 1e-9 });
        Assert.DoesNotContain(WarningCodes.AccuracyNotReached, Predictions.Codes(reached));
        Assert.InRange(reached.ErrorEstimate, 1e-13, 1e-9);
    }

    private static string Rods(double spacing) => Clear + FormattableString.Invariant($"[[layer]]\nform = 'rod'\ndiameter = 100\nspacing = {spacing}\n") + Melanin;

    private static string Platelets(double spacing, string more) => Clear + FormattableString.Invariant($"[[layer]]\nform = 'platelet'\nthickness = 50\nwidth = 100\nspacing = {spacing}\n") + more + Melanin;

    private static string[] Codes(string text, string wavelengths)
    {
        double[] parts = [.. wavelengths.Split(':').Select(part => double.Parse(part, System.Globalization.CultureInfo.InvariantCulture))];
        return Predictions.Codes(Predictions.Of(text, Predictions.At(parts[0], parts[1], parts[2])));
    }
}
