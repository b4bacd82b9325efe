using BarbuleOptics.Files;
using BarbuleOptics.Layering.Mixing;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Prediction;
using BarbuleOptics.Tests.Layering;
using Xunit;

namespace BarbuleOptics.Tests.Prediction;

/// <summary>Which solver runs for what, and what the result says of it.</summary>
public sealed class SolverChoiceTests
{
    private const string Clear = "barbule.matrix = { n = 1.5 }\nbarbule.backing = { n = 1.5 }\n";
    private const string Melanin = "material = { n = 1.7, k = 0.05 }\n";
    private const string Rods = Clear + "[cortex]\nthickness = 100\n[[layer]]\nform = 'rod'\ndiameter = 100\nspacing = 150\nrows = 2\npitch = 120\n" + Melanin;
    private const string Sheets = Clear + "[cortex]\nthickness = 100\n[[layer]]\nform = 'film'\nthickness = 60\nrows = 3\npitch = 150\n" + Melanin;
    private const string Platelets = Clear + "[[layer]]\nform = 'platelet'\nthickness = 60\nwidth = 200\n" + Melanin;

    /// <summary>Structure, solver that auto takes.</summary>
    public static TheoryData<string, string> Automatic => new()
    {
        { Clear + "[cortex]\nthickness = 200\n", "multilayer" },
        { Sheets, "multilayer" },
        { Platelets + "spacing = 200\n", "multilayer" },
        { Platelets + "separation = 0\nrows = 3\npitch = 100\nstacking = 'staggered'\n", "multilayer" },
        { Platelets + "spacing = 201\n", "grating" },
        { Platelets + "spacing = 200\nwall = 10\n", "grating" },
        { Rods, "grating" },
        { Rods + "gap = 20\n[[layer]]\nform = 'film'\nthickness = 60\n", "grating" },
        { "barbule.axis = 45\n" + Rods, "grating" },
        { "barbule.axis = 45\n" + Sheets, "multilayer" },
    };

    [Theory]
    [MemberData(nameof(Automatic))]
    public void Auto_takes_films_by_the_one_and_rows_by_the_other(string text, string solver)
    {
        StructurePrediction prediction = Predictions.Of(text, Predictions.Rigorously(500, 510, 5));
        Assert.Equal(solver, prediction.Solver);
        Assert.Equal(solver == "grating", prediction.IsRigorous);
        Assert.Null(prediction.Mixing);
        Assert.Equal(solver == "grating", prediction.FilmCount is null);
        Assert.Equal(solver == "grating", prediction.Orders.Count > 0);
    }

    [Fact]
    public void A_rule_that_is_named_asks_for_the_layer_model()
    {
        StructurePrediction prediction = Predictions.Of(Rods, Predictions.Rigorously(500, 510, 5) with { Mixing = new MeanIndex() });
        Assert.Equal(("multilayer", "mean-index"), (prediction.Solver, prediction.Mixing));
        Assert.Equal("bruggeman-2", Predictions.Of(Rods, Predictions.At(500, 510, 5)).Mixing);
        // Films have nothing to average.
        Assert.Null(Predictions.Of(Sheets, Predictions.Rigorously(500, 510, 5) with { Mixing = new MeanIndex() }).Mixing);
    }

    [Fact]
    public void The_grating_solver_takes_films_too_but_no_rule()
    {
        PredictionConditions conditions = Predictions.Rigorously(400, 700, 50, 0, 50), grating = conditions with { Solver = SolverChoice.Grating };
        StructurePrediction one = Predictions.Of(Sheets, conditions), other = Predictions.Of(Sheets, grating);
        Assert.Equal("grating", other.Solver);
        // Measured: 1e-15.
        Assert.All(one.Responses.Zip(other.Responses), pair => Assert.Equal(pair.First.Reflectance.Values.ToArray(), pair.Second.Reflectance.Values.ToArray(), (a, b) => Math.Abs(a - b) < 1e-12));
        Assert.Throws<ArgumentException>(() => Predictions.Of(Rods, grating with { Mixing = new MeanIndex() }));
    }

    [Fact]
    public void Films_do_not_mind_how_the_axis_lies()
    {
        PredictionConditions conditions = Predictions.Rigorously(400, 700, 50, 0, 50);
        StructurePrediction across = Predictions.Of(Sheets, conditions), turned = Predictions.Of("barbule.axis = 30\n" + Sheets, conditions);
        Assert.All(across.Responses.Zip(turned.Responses), pair => Assert.Equal(pair.First.Reflectance.Values.ToArray(), pair.Second.Reflectance.Values.ToArray()));
    }

    // Hollow rods that touch across rows, of a metal no feather has: the modal slab does not converge, and R of 1 would be no answer.
    [Fact]
    public void What_may_be_far_off_is_refused_or_left_out_of_the_comparison()
    {
        const string text = Clear + "[cortex]\nthickness = 100\n[[layer]]\nform = 'rod'\ndiameter = 100\nlumen = 60\nspacing = 100\nrows = 3\npitch = 86.61\nstacking = 'staggered'\nmaterial = { n = 0.05, k = 4 }\n";
        LoadedStructure metal = Structures.Load(text);
        PredictionConditions conditions = Predictions.Rigorously(400, 405, 5);
        Assert.False(Predictor.TryPredict(metal.Barbule, conditions, metal.Catalog, out _, out var problems, cancellation: TestContext.Current.CancellationToken));
        Assert.Equal("layer1.spacing", Assert.Single(problems).Key);
        Assert.Matches(@"^the rigorous solution may be off by [01]\.\d+ at 40[05] nm and 0 degrees, more than the 0\.05 an answer may; try longer --wavelengths; ask for the layer model with --solver multilayer$", problems[0].Message);

        StructurePrediction films = Predictions.Of(text, conditions with { Mixing = new MeanIndex(), ComparesSolvers = true });
        Assert.Null(films.Views[0].LayerModelError);
        Assert.Contains(films.Warnings, warning => warning.Code == WarningCodes.AccuracyNotReached && warning.Message.EndsWith("the two were not compared", StringComparison.Ordinal));
    }

    // With every order's share and every material's, nothing is counted twice or left out.
    [Theory]
    [InlineData("across")]
    [InlineData("along")]
    [InlineData("25")]
    public void Orders_and_materials_add_up_to_the_four_parts(string axis)
    {
        string text = Clear + "[cortex]\nthickness = 100\n[[layer]]\nform = 'rod'\ndiameter = 150\nlumen = 60\nspacing = 420\n" + Melanin;
        text = text.Replace("{ n = 1.5 }", "{ n = 1.5, k = 0.01 }", StringComparison.Ordinal) + "[back]\nthickness = 250\ncoherent = true\n";
        StructurePrediction prediction = Predictions.Of(
            $"barbule.axis = {(axis == "25" ? axis : $"'{axis}'")}\n" + text, Predictions.Rigorously(400, 640, 40, 0, 35) with { Accuracy = 1e-3 });
        Assert.Equal(6, prediction.Responses.Count);
        double diffracted = 0;
        foreach (SpectralResponse response in prediction.Responses)
        {
            DiffractionOrder[] orders = [.. prediction.Orders.Where(order => (order.Incidence, order.Polarization) == (response.Incidence, response.Polarization))];
            MaterialLoss[] losses = [.. prediction.Losses.Where(loss => (loss.Incidence, loss.Polarization) == (response.Incidence, response.Polarization))];
            Assert.Equal(["n = 1.5, k = 0.01", "n = 1.7, k = 0.05"], losses.Select(loss => loss.Material));
            for (int w = 0; w < response.Reflectance.Grid.Count; w++)
            {
                double Sum(OrderSide side, Func<int, bool> which) => orders.Where(order => order.Side == side && which(order.Order)).Sum(order => order.Efficiency[w]);
                Assert.Equal(response.Reflectance[w], Sum(OrderSide.Reflected, order => order == 0), 1e-12);
                Assert.Equal(response.DiffractedReflectance[w], Sum(OrderSide.Reflected, order => order != 0), 1e-12);
                Assert.Equal(response.Transmittance[w], Sum(OrderSide.Transmitted, _ => true), 1e-12);
                Assert.Equal(response.Absorptance[w], losses.Sum(loss => loss.Absorptance[w]), 1e-12);
                Assert.Equal(1, response.Reflectance[w] + response.DiffractedReflectance[w] + response.Transmittance[w] + response.Absorptance[w], 1e-10);
                diffracted = Math.Max(diffracted, response.DiffractedReflectance[w]);
            }
        }
        Assert.InRange(diffracted, 1e-4, 1);
    }

    [Fact]
    public void One_polarization_alone_is_the_same_as_within_all()
    {
        PredictionConditions all = Predictions.Rigorously(450, 650, 50, 40) with { ComparesSolvers = true }, alone = all with { Polarization = Polarizations.P, AllPolarizations = false };
        StructurePrediction within = Predictions.Of(Rods, all with { Polarization = Polarizations.P }), p = Predictions.Of(Rods, alone);
        SpectralResponse response = Assert.Single(p.Responses);
        Assert.Equal(Predictions.Response(within, Polarizations.P).Reflectance.Values.ToArray(), response.Reflectance.Values.ToArray());
        Assert.Equal(within.Views[0].LayerModelError!.LargestChange, p.Views[0].LayerModelError!.LargestChange);
        Assert.All(p.Orders, order => Assert.Equal(Polarizations.P, order.Polarization));
    }

    [Fact]
    public void Threads_change_no_digit()
    {
        PredictionConditions conditions = Predictions.Rigorously(350, 650, 4, 0, 50);
        StructurePrediction one = Predictions.Of(Rods, conditions with { Threads = 1 }), four = Predictions.Of(Rods, conditions with { Threads = 4 });
        Assert.Equal(one.ErrorEstimate, four.ErrorEstimate);
        Assert.All(one.Responses.Zip(four.Responses), pair => Assert.Equal(pair.First.Absorptance.Values.ToArray(), pair.Second.Absorptance.Values.ToArray()));
        Assert.All(one.Orders.Zip(four.Orders), pair => Assert.Equal(pair.First.Efficiency.Values.ToArray(), pair.Second.Efficiency.Values.ToArray()));
    }

    [Fact]
    public void Progress_rises_to_one_and_a_cancelled_run_ends()
    {
        LoadedStructure rods = Structures.Load(Rods);
        var shares = new Shares();
        PredictionConditions conditions = Predictions.Rigorously(350, 650, 4, 0, 50) with { Threads = 1 };
        Assert.True(Predictor.TryPredict(rods.Barbule, conditions, rods.Catalog, out _, out _, shares, TestContext.Current.CancellationToken));
        Assert.True(shares.Values.Count > 5);
        Assert.Equal(shares.Values.Order(), shares.Values);
        Assert.Equal(1, shares.Values[^1]);

        using var stop = new CancellationTokenSource();
        shares.Act = stop.Cancel;
        Assert.ThrowsAny<OperationCanceledException>(() => Predictor.TryPredict(rods.Barbule, conditions, rods.Catalog, out _, out _, shares, stop.Token));
    }

    private sealed class Shares : IProgress<double>
    {
        public List<double> Values { get; } = [];

        public Action? Act { get; set; }

        public void Report(double value)
        {
            Values.Add(value);
            Act?.Invoke();
        }
    }
}
