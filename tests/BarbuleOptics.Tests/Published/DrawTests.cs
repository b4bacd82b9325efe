using BarbuleOptics.Ensembles;
using BarbuleOptics.Ensembles.Spreads;
using BarbuleOptics.Ensembles.Statistics;
using BarbuleOptics.Tests.Ensembles;
using BarbuleOptics.Tests.Prediction;
using Xunit;

namespace BarbuleOptics.Tests.Published;

/// <summary>Student's t, circular statistics and propagated spreads against tables, a textbook example and closed forms.</summary>
public sealed class DrawTests
{
    // Percentage points of Student's t: Abramowitz and Stegun 1964, table 26.10 (values from memory), three digits behind the point.
    [Theory]
    [InlineData(1, 0.975, 12.706)]
    [InlineData(2, 0.975, 4.303)]
    [InlineData(3, 0.975, 3.182)]
    [InlineData(7, 0.975, 2.365)]
    [InlineData(19, 0.975, 2.093)]
    [InlineData(30, 0.975, 2.042)]
    [InlineData(double.PositiveInfinity, 0.975, 1.960)]
    [InlineData(1, 0.75, 1.000)]
    [InlineData(3, 0.95, 2.353)]
    [InlineData(7, 0.995, 3.499)]
    [InlineData(3, 0.9995, 12.924)]
    [InlineData(19, 0.025, -2.093)]
    public void Scores_become_the_tabulated_points_of_Student(double degrees, double share, double expected)
        => Assert.Equal(expected, new StudentScale(degrees).Of(StudentScale.Score(share)), 5e-4);

    // With 1 degree of freedom t is Cauchy's: tan(pi (p - 1/2)); with 2 it is (2p - 1)/sqrt(2p(1 - p)). Closed forms. Measured: 3e-11 relative from p = 1e-6.
    [Theory]
    [InlineData(0.6)]
    [InlineData(0.99)]
    [InlineData(0.9999)]
    [InlineData(0.000001)]
    public void Student_of_one_and_two_degrees_has_its_closed_form(double share)
    {
        double cauchy = Math.Tan(Math.PI * (share - 0.5)), two = (2 * share - 1) / Math.Sqrt(2 * share * (1 - share));
        Assert.Equal(1, new StudentScale(1).Of(StudentScale.Score(share)) / cauchy, 1e-8);
        Assert.Equal(1, new StudentScale(2).Of(StudentScale.Score(share)) / two, 1e-8);
    }

    // Quantiles of chi-squared: Abramowitz and Stegun 1964, table 26.8 (values from memory): 0.216 (3 degrees, 2.5 %), 9.348 (97.5 %), 10.851 (20 degrees, 5 %), 31.410 (95 %);
    // with 2 degrees X = -2 ln(1 - p).
    [Theory]
    [InlineData(3, 0.025, 0.216)]
    [InlineData(3, 0.975, 9.348)]
    [InlineData(20, 0.05, 10.851)]
    [InlineData(20, 0.95, 31.410)]
    [InlineData(2, 0.5, 1.386294)]
    [InlineData(2, 0.999999, 27.631021)]
    public void The_common_factor_has_the_tabulated_points_of_chi_squared(double degrees, double share, double expected)
        => Assert.Equal(Math.Sqrt(degrees / expected), new CommonScale(degrees).Of(StudentScale.Score(share)), 0.003 * Math.Sqrt(degrees / expected));

    // Compass directions in which eight trees lean: mean angle 99 degrees, r = 0.82522. Zar, Biostatistical Analysis, example 26.4 (from memory); recomputed by hand:
    // sum of cosines -1.0271, of sines 6.5216.
    [Fact]
    public void The_mean_direction_of_leaning_trees_is_that_of_the_textbook()
    {
        var mean = new CircularMean();
        foreach (double degrees in (double[])[45, 55, 81, 96, 110, 117, 132, 154])
            mean.Add(degrees);
        Assert.Equal(99, mean.Degrees, 0.5);
        Assert.Equal(0.82522, mean.Length, 5e-6);
    }

    // 1 and 359 degrees have the mean 0, not 180: the example that every text opens with.
    [Fact]
    public void The_mean_of_directions_around_north_is_north()
    {
        var mean = new CircularMean();
        mean.Add(1);
        mean.Add(359);
        Assert.Equal(0, Circle.Difference(0, mean.Degrees), 1e-12);
    }

    // A film of index n in air on a lower index peaks where 4 n d = 3 wavelengths (Born and Wolf, section 1.6): linear in d. With d = 195 nm, sd 9, n = 16
    // the peak's mean is 520 nm and its interval 520 +- (4 x 2/3) (9/4) t, t(15) = 2.131 for 95 % and 0.691 for 50 % (tables). At 2 nm steps and
    // 4,096 draws measured within 0.03 nm.
    [Fact]
    public void A_linear_case_has_the_interval_of_Student()
    {
        DrawnView view = Ensemble.Of(Ensemble.Film("{ mean = 195, sd = 9, n = 16 }"), Ensemble.Draws(4096), Predictions.At(400, 640, 2)).Views[0];
        DrawnValue peak = view.Value("peak_nm")!;
        Assert.Equal(520, peak.Median, 0.05);
        Assert.Equal(520 - 6 * 2.1314, peak.From95, 0.1);
        Assert.Equal(520 + 6 * 2.1314, peak.To95, 0.1);
        Assert.Equal(520 - 6 * 0.6912, peak.From50, 0.05);
        Assert.Equal(520 + 6 * 0.6912, peak.To50, 0.05);
        Assert.Equal(0, view.PeakLostShare);
    }

    // Between barbules: normal, sd (8/3) 6 = 16 nm, 95 % within 1.95996 of it.
    [Fact]
    public void A_linear_case_has_the_interval_of_the_normal()
    {
        DrawnValue peak = Ensemble.Of(Ensemble.Film("{ mean = 195, sd = 9, n = 16, sd_between = 6 }"), Ensemble.Draws(4096, Spread.Between), Predictions.At(400, 700, 2)).Views[0].Value("peak_nm")!;
        Assert.Equal(16, peak.StandardDeviation, 0.1);
        Assert.Equal(520 + 16 * 1.95996, peak.To95, 0.2);
    }

    // Two independent means of equal weight and n = 4: Welch and Satterthwaite give 3 + 3 = 6 degrees of freedom (by hand from the formula).
    [Fact]
    public void Two_equal_means_have_the_degrees_of_freedom_of_both()
    {
        const string text = """
            [cortex]
            thickness = { mean = 100, sd = 4, n = 4 }
            [[layer]]
            form = "film"
            material = { n = 1.8 }
            thickness = { mean = 100, sd = 4, n = 4 }
            """;
        DrawPlan plan = DrawPlanner.Plan(Tests.Layering.Structures.Load(text).Barbule, Spread.Mean, out _, out _)!;
        double[][] equal = [.. plan.Slots.Select(slot => (double[])[slot.Law is null ? 0 : 2.5])];
        Assert.Equal(6, plan.Weighted(equal).EffectiveDegrees, 1e-12);
        // All weight on one: its own three.
        double[][] one = [.. plan.Slots.Select(slot => (double[])[slot.Key == "cortex.thickness" ? 1 : 0])];
        Assert.Equal(3, plan.Weighted(one).EffectiveDegrees, 1e-12);
    }
}
