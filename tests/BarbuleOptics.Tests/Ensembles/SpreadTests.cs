using BarbuleOptics.Anatomy;
using BarbuleOptics.Ensembles;
using BarbuleOptics.Ensembles.Sequences;
using BarbuleOptics.Ensembles.Spreads;
using BarbuleOptics.Prediction;
using BarbuleOptics.Tests.Layering;
using BarbuleOptics.Tests.Prediction;
using Xunit;

namespace BarbuleOptics.Tests.Ensembles;

/// <summary>The three spreads stay apart, what is missing is said by name, and lengths drawn can be.</summary>
public sealed class SpreadTests
{
    private static readonly PredictionConditions Coarse = Predictions.At(400, 700, 10);

    // sd/sqrt(n): 9/sqrt(16); the deviation of n barbules measured once each where both are known: sqrt(9^2 + 12^2)/4. By hand.
    [Theory]
    [InlineData("{ mean = 195, sd = 9, n = 16 }", Spread.Mean, 2.25)]
    [InlineData("{ mean = 195, sd = 9, n = 16, sd_between = 12 }", Spread.Mean, 3.75)]
    [InlineData("{ mean = 195, sd = 9, n = 16, sd_between = 12 }", Spread.Between, 12)]
    [InlineData("{ mean = 195, sd = 9, n = 16, sd_between = 12 }", Spread.Within, 9)]
    [InlineData("{ mean = 195, sd = 9 }", Spread.Within, 9)]
    // Deviation of 190, 194, 198 is 4; of its mean 4/sqrt(3).
    [InlineData("[190, 194, 198]", Spread.Mean, 2.3094010767585)]
    [InlineData("[190, 194, 198]", Spread.Between, 4)]
    // Means 191, 195, 199; within each pair +-1, so the pooled variance is 2; MS between = 2 x 16 = 32; (32 - 2)/2 = 15.
    [InlineData("[[190, 192], [194, 196], [198, 200]]", Spread.Mean, 2.3094010767585)]
    [InlineData("[[190, 192], [194, 196], [198, 200]]", Spread.Within, 1.4142135623731)]
    [InlineData("[[190, 192], [194, 196], [198, 200]]", Spread.Between, 3.8729833462074)]
    [InlineData("{ min = 189, max = 201 }", Spread.Mean, 3.4641016151378)]
    public void Each_spread_is_read_from_what_says_it(string thickness, Spread spread, double deviationNm)
    {
        DrawSlot drawn = Plan(Ensemble.Film(thickness), spread).Slots.Single(slot => slot.Law is not null);
        Assert.Equal("layer1.thickness", drawn.Key);
        Assert.Equal(deviationNm, drawn.Law!.DeviationNm, 1e-10);
    }

    [Theory]
    [InlineData("{ mean = 195, sd = 9 }", Spread.Mean, "without n")]
    [InlineData("{ mean = 195, sd = 9, n = 1 }", Spread.Mean, "n = 1")]
    [InlineData("195", Spread.Mean, "no length with a spread")]
    [InlineData("{ mean = 195, sd = 9, n = 4 }", Spread.Between, "sd_between")]
    [InlineData("[190, 194]", Spread.Within, "within a section")]
    public void What_a_spread_lacks_is_refused_by_name(string thickness, Spread spread, string says)
    {
        AnatomyProblem problem = Ensemble.Problem(Ensemble.Film(thickness), Ensemble.Draws(20, spread), Coarse);
        Assert.Contains(says, problem.Message, StringComparison.Ordinal);
        Assert.Equal("layer1.thickness", problem.Key);
    }

    [Fact]
    public void Few_units_and_lengths_that_are_kept_are_warned_of()
    {
        const string text = """
            [cortex]
            thickness = { mean = 100, sd = 5, n = 3 }
            [[layer]]
            form = "film"
            thickness = { mean = 80, sd = 5, n = 8, sd_between = 3 }
            gap = { min = 20, max = 60 }
            """;
        Assert.Equal(["few-units", "range-drawn"], Codes(Spread.Mean));
        Assert.Equal(["length-kept", "length-kept"], Codes(Spread.Between));

        string[] Codes(Spread spread) => [.. Ensemble.Of(text, Ensemble.Draws(20, spread), Coarse).Warnings.Select(warning => warning.Code)];
    }

    // A normal spacing cut off at the width, one deviation below its mean: share Phi(-1) = 0.158655 of the draws, mean change
    // sd (phi(1) - Phi(-1)) = 10 (0.241971 - 0.158655) = 0.83316 nm. Closed form of the censored normal; tables of phi and Phi.
    [Fact]
    public void The_bias_of_truncated_draws_is_that_of_the_censored_normal()
    {
        const string text = """
            [[layer]]
            form = "platelet"
            thickness = 60
            width = 150
            spacing = { mean = 160, sd = 10, n = 4, sd_between = 10 }
            """;
        EnsemblePrediction ensemble = Ensemble.Of(text, Ensemble.Draws(4096, Spread.Between), Coarse);
        DrawnLength spacing = Assert.Single(ensemble.Lengths);
        Assert.Equal(0.158655, spacing.TruncatedShare, 0.002);
        Assert.Equal(0.83316, spacing.Bias, 0.005);
        Assert.Contains("separation", Assert.Single(ensemble.Warnings, warning => warning.Code == WarningCodes.DrawsTruncated).Message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(Spread.Mean)]
    [InlineData(Spread.Within)]
    public void However_wide_the_spread_every_draw_can_exist(Spread spread)
    {
        const string text = """
            [cortex]
            thickness = { mean = 30, sd = 60, n = 2 }
            [[layer]]
            form = "flattened-rod"
            height = { mean = 60, sd = 40, n = 2 }
            width = { mean = 120, sd = 60, n = 2 }
            lumen_height = { mean = 30, sd = 30, n = 2 }
            lumen_width = { mean = 60, sd = 40, n = 2 }
            spacing = { mean = 130, sd = 20, n = 2 }
            rows = 4
            pitch = { mean = 55, sd = 30, n = 2 }
            stacking = "staggered"
            gap = { mean = 10, sd = 30, n = 2 }
            [[layer]]
            form = "rod"
            diameter = { mean = 90, sd = 60, n = 2 }
            separation = { mean = 5, sd = 10, n = 2 }
            rows = 3
            row_separation = { mean = 5, sd = 10, n = 2 }
            """;
        DrawPlan plan = Plan(text, spread);
        var drawer = new SectionDrawer(plan.Barbule, plan.Slots, plan.SeparateRows);
        var net = new ScrambledNet(plan.Dimensions, 200, 3);
        double[] point = new double[plan.Dimensions], lengths = new double[plan.Slots.Length], scores = new double[plan.Slots.Length];
        int[] rows = new int[2];
        for (int draw = 0; draw < 200; draw++)
        {
            net.Point(draw, point);
            plan.Draw(point, lengths, rows, scores);
            // Throws where nothing can be laid out.
            Assert.True(drawer.Draw(lengths, rows).DepthNm > 0);
        }
    }

    // The section whose rows all have their mean is the section itself.
    [Fact]
    public void Rows_drawn_by_themselves_lie_where_they_were()
    {
        const string text = """
            [cortex]
            thickness = 80
            [[layer]]
            form = "rod"
            diameter = { mean = 100, sd = 5 }
            spacing = 120
            rows = 4
            pitch = 95
            stacking = "staggered"
            shift = 0.25
            """;
        DrawPlan plan = Plan(text, Spread.Within);
        double[] lengths = new double[plan.Slots.Length];
        int[] rows = new int[1];
        plan.Center(lengths, rows);
        BarbuleOptics.Layering.Section drawn = new SectionDrawer(plan.Barbule, plan.Slots, separateRows: true).Draw(lengths, rows), whole = Structures.Section(text);
        Assert.Equal(4, drawn.Runs.Count);
        for (int row = 0; row < 4; row++)
        {
            Assert.Equal(whole.Runs[0].Rows[row].CenterNm, drawn.Runs[row].Rows[0].CenterNm, 1e-9);
            Assert.Equal(0, Math.IEEERemainder(whole.Runs[0].Rows[row].ShiftNm - drawn.Runs[row].Rows[0].ShiftNm, 120), 1e-9);
        }
        Assert.Equal(whole.DepthNm, drawn.DepthNm, 1e-9);
    }

    // Replicates 100 103 106 97 and 200 194 188 206 are in perfect contrast: each draw keeps 2 x + y = 400. The pair 80 90 85 81 has a correlation of its own.
    [Fact]
    public void Replicates_of_the_same_units_keep_their_correlation()
    {
        const string text = """
            [cortex]
            thickness = [100, 103, 106, 97]
            [[layer]]
            form = "film"
            thickness = [200, 194, 188, 206]
            gap = 30
            """;
        DrawPlan plan = Plan(text, Spread.Mean);
        var net = new ScrambledNet(plan.Dimensions, 64, 9);
        double[] point = new double[plan.Dimensions], lengths = new double[plan.Slots.Length], scores = new double[plan.Slots.Length];
        double moved = 0;
        for (int draw = 0; draw < 64; draw++)
        {
            net.Point(draw, point);
            plan.Draw(point, lengths, new int[1], scores);
            // Student's t is read from a table by interpolation, the same for both signs.
            Assert.Equal(2 * 101.5 + 197, 2 * lengths[0] + lengths[1], 1e-6);
            moved = Math.Max(moved, Math.Abs(lengths[0] - 101.5));
        }
        Assert.True(moved > 1);
    }

    [Fact]
    public void A_list_of_row_counts_is_drawn_from()
    {
        const string text = """
            [[layer]]
            form = "film"
            thickness = 80
            rows = [2, 4, 4, 4]
            pitch = 160
            """;
        DrawPlan plan = Plan(text, Spread.Mean);
        var net = new ScrambledNet(plan.Dimensions, 1024, 4);
        double[] point = new double[1], lengths = new double[plan.Slots.Length], scores = new double[plan.Slots.Length];
        int[] rows = new int[1];
        int twos = 0;
        for (int draw = 0; draw < 1024; draw++)
        {
            net.Point(draw, point);
            plan.Draw(point, lengths, rows, scores);
            twos += rows[0] == 2 ? 1 : 0;
        }
        Assert.Equal(256, twos);
    }

    private static DrawPlan Plan(string text, Spread spread)
    {
        DrawPlan? plan = DrawPlanner.Plan(Structures.Load(text).Barbule, spread, out var problems, out _);
        Assert.True(plan is not null, string.Join('\n', problems));
        return plan;
    }
}
