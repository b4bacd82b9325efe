using System.Globalization;
using BarbuleOptics.Ensembles;
using BarbuleOptics.Ensembles.Statistics;
using BarbuleOptics.Prediction;
using BarbuleOptics.Tests.Prediction;
using Xunit;

namespace BarbuleOptics.Tests.Ensembles;

/// <summary>The interval of the mean covers the truth as often as it says: a small version of <c>tests/coverage.sh</c>.</summary>
public sealed class CoverageTests
{
    private const int Studies = 120;

    private static readonly PredictionConditions Conditions = Predictions.At(420, 620, 10) with { Threads = 1, Eyes = [] };

    // Films whose peak is linear in the thickness (Born and Wolf, section 1.6): 4 n d = 3 wavelengths, d = scale x thickness. The truth is known, 520 nm. Of 120 studies an
    // interval of 95 % covers it in 114 +- 2.4; outside 105 to 119 (four standard errors, and not all) it would be another interval: the normal one covers 87 % at n = 4.
    [Theory]
    [InlineData(4)]
    [InlineData(20)]
    public void An_interval_of_95_percent_covers_the_truth_in_95_percent_of_studies(int units)
    {
        int covered = 0;
        var random = new Random(7 * units);
        for (int study = 0; study < Studies; study++)
        {
            (double mean, double sd) = Measured(195, 6, units, random);
            string thickness = string.Create(CultureInfo.InvariantCulture, $"{{ mean = {mean}, sd = {sd}, n = {units} }}");
            DrawnValue peak = Ensemble.Of(Ensemble.Film(thickness), Ensemble.Draws(96), Conditions).Views[0].Value("peak_nm")!;
            covered += peak.From95 <= 520 && peak.To95 >= 520 ? 1 : 0;
        }
        Assert.InRange(covered, 105, 119);
    }

    private static (double Mean, double Sd) Measured(double mean, double sd, int units, Random random)
    {
        double[] values = [.. Enumerable.Range(0, units).Select(_ => mean + sd * Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble()))];
        double average = values.Average();
        return (average, Math.Sqrt(values.Sum(value => (value - average) * (value - average)) / (units - 1)));
    }
}
