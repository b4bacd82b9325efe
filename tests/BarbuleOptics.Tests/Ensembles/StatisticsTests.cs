using BarbuleOptics.Ensembles.Draws;
using BarbuleOptics.Ensembles.Statistics;
using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra;
using Xunit;

namespace BarbuleOptics.Tests.Ensembles;

/// <summary>Statistics that take values in one by one agree with those of all values at once.</summary>
public sealed class StatisticsTests
{
    // Second method: sorting. A bin is 1/2048 of twice the core of the values, here 0.005 standard deviations.
    [Fact]
    public void Quantiles_agree_with_sorted_values()
    {
        double[] values = Normal(20_000, seed: 5);
        var column = new DrawColumn(values.AsSpan(0, 1000), 16, 2048);
        for (int i = 0; i < values.Length; i++)
            column.Add(i, values[i]);
        DrawnValue found = column.Summary()!;
        double[] sorted = [.. values.Order()];
        Assert.Equal(sorted[values.Length / 2], found.Median, 0.01);
        Assert.Equal(sorted[values.Length / 40], found.From95, 0.01);
        Assert.Equal(sorted[values.Length - values.Length / 40], found.To95, 0.01);
        Assert.Equal(values.Average(), found.Mean, 1e-12);
        Assert.Equal(1, found.Share);
        // The standard error of the mean of plain draws is 1/sqrt(N); 16 replicates tell it to about a sixth (chi square, 15 degrees of freedom): 0.5 to 1.6 times.
        Assert.InRange(found.MeanError * Math.Sqrt(values.Length), 0.5, 1.6);
    }

    [Fact]
    public void Histograms_merge_to_that_of_all_values()
    {
        double[] values = Normal(5000, seed: 8);
        Histogram whole = new(-3, 3, 100), one = new(whole), other = new(whole);
        foreach (double value in values)
            whole.Add(value);
        foreach (double value in values.Take(1700).Reverse())
            one.Add(value);
        foreach (double value in values.Skip(1700))
            other.Add(value);
        other.Add(one);
        foreach (double share in (double[])[0, 0.025, 0.5, 0.9, 1])
            Assert.Equal(whole.Quantile(share), other.Quantile(share));
    }

    // An angle has no end: what is true of 100 to 140 degrees is true of the same arc around 0.
    [Theory]
    [InlineData(0)]
    [InlineData(120)]
    [InlineData(355)]
    public void Angles_are_the_same_all_round_the_circle(double centerDegrees)
    {
        double[] values = [.. Normal(4000, seed: 2).Select(value => Circle.Wrap(centerDegrees + 10 * value))];
        var column = new DrawColumn(values.AsSpan(0, 500), 4, 2048, isAngle: true);
        for (int i = 0; i < values.Length; i++)
            column.Add(i, values[i]);
        DrawnValue found = column.Summary()!;
        Assert.Equal(0, Circle.Difference(centerDegrees, found.Median), 0.6);
        Assert.Equal(0, Circle.Difference(centerDegrees, found.Mean), 0.6);
        // 1.96 x 10 degrees; the quantile of 4,000 draws has a standard error of 0.4.
        Assert.Equal(-19.6, Circle.Difference(centerDegrees, found.From95), 1.3);
        Assert.Equal(19.6, Circle.Difference(centerDegrees, found.To95), 1.3);
    }

    [Fact]
    public void Values_that_all_agree_and_columns_without_values_are_taken()
    {
        var same = new DrawColumn([4.5, 4.5], 2, 64);
        same.Add(0, 4.5);
        same.Add(1, 4.5);
        Assert.Equal(4.5, same.Summary()!.Median, 1e-7);
        Assert.Equal(0, same.Summary()!.StandardDeviation, 1e-9);
        var none = new DrawColumn([double.NaN], 2, 64);
        none.Add(0, double.NaN);
        Assert.Null(none.Summary());
    }

    // Second method: the peaks that a prediction reports.
    [Fact]
    public void Scanned_peaks_are_those_of_a_prediction()
    {
        WavelengthGrid grid = WavelengthGrid.FromRange(Length.FromNanometres(300), Length.FromNanometres(780), Length.FromNanometres(2));
        var scan = new PeakScan(grid);
        var random = new Random(11);
        int met = 0;
        for (int spectrum = 0; spectrum < 300; spectrum++)
        {
            double[] values = [.. Enumerable.Range(0, grid.Count).Select(i => 0.3 + 0.1 * Math.Sin(i * 0.05 * (1 + spectrum % 7)) * Math.Exp(-i * 0.004 * (spectrum % 5)))];
            for (int i = 0; i < values.Length && spectrum % 3 == 0; i++)
                values[i] = Math.Round(values[i] + 0.05 * random.NextDouble(), spectrum % 2 == 0 ? 2 : 5);
            scan.Scan(values);
            SpectralPeak[] peaks = [.. SpectrumFeatures.Of(new Spectrum(grid, values)).Peaks.OrderBy(peak => peak.WavelengthNm)];
            Assert.Equal(peaks.Select(peak => peak.WavelengthNm), Enumerable.Range(0, scan.Count).Select(scan.WavelengthNm));
            Assert.Equal(peaks.Select(peak => peak.Reflectance), Enumerable.Range(0, scan.Count).Select(scan.Reflectance));
            if (peaks.Length > 0)
                Assert.Equal(peaks.Max(peak => peak.Reflectance), scan.Reflectance(scan.Highest));
            met += peaks.Length;
        }
        Assert.InRange(met, 1000, 100_000);
    }

    private static double[] Normal(int count, int seed)
    {
        var random = new Random(seed);
        return [.. Enumerable.Range(0, count).Select(_ => Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble()))];
    }
}
