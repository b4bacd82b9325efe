using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra;
using Xunit;

namespace BarbuleOptics.Tests.Spectra;

public class PeakTests
{
    // The center of a Gaussian is where its formula says. Largest error over all places between samples: 0.0019 nm and, of the height,
    // 4.5e-5 at sd 5 nm.
    [Theory]
    [InlineData(450, 5)]
    [InlineData(450.25, 5)]
    [InlineData(450.5, 5)]
    [InlineData(449.51, 5)]
    [InlineData(523.37, 12)]
    [InlineData(600.83, 40)]
    public void A_gaussian_peaks_at_its_center(double centerNm, double sdNm)
    {
        SpectralPeak peak = Assert.Single(Gaussian(centerNm, sdNm, 1).Peaks);

        Assert.Equal(centerNm, peak.WavelengthNm, 0.0025);
        Assert.Equal(0.4, peak.Reflectance, 5e-5);
    }

    // Full width at half maximum of a Gaussian: 2 sqrt(2 ln 2) sd (textbook). Its feet are at 0, so that both widths agree.
    // Linear interpolation at 1 nm: error below 0.01 nm at sd 12 nm.
    [Fact]
    public void A_gaussian_has_its_textbook_width()
    {
        double expectedNm = 2 * Math.Sqrt(2 * Math.Log(2)) * 12;
        SpectralPeak peak = Gaussian(523.37, 12, 1).Peaks[0];

        Assert.Equal(expectedNm, peak.HalfHeightWidthNm!.Value, 0.01);
        Assert.Equal(expectedNm, peak.HalfProminenceWidthNm!.Value, 0.01);
        Assert.Equal(peak.Reflectance, peak.Prominence, 1e-12);
    }

    // Two unequal shoulders make a lopsided top, where a parabola is at its worst; the fine grid is the measure.
    [Theory]
    [InlineData(480.2, 493.9)]
    [InlineData(480.7, 490.1)]
    [InlineData(505.5, 529.3)]
    public void A_lopsided_peak_lies_where_a_hundred_times_finer_grid_puts_it(double firstNm, double secondNm)
    {
        double Lopsided(double x) => 0.3 * Sampled.Gaussian(x, firstNm, 6) + 0.2 * Sampled.Gaussian(x, secondNm, 9);
        Spectrum fine = Sampled.Over(400, 600, 0.01, Lopsided);
        int top = fine.Values.IndexOf(fine.Values.ToArray().Max());

        SpectralPeak peak = SpectrumFeatures.Of(Sampled.Over(400, 600, 1, Lopsided)).Peaks[0];

        Assert.Equal(fine.Grid.Nanometres[top], peak.WavelengthNm, 0.05);
    }

    // R = a + b cos(2 pi (x - x0)/P): prominence 2 b; at half of it the width is P/2; the valleys a - b lie above half the height.
    // The top at 303.3 nm stands only .0021 above the grid's end at 300 nm, less than 1 % of .6: no peak.
    [Fact]
    public void A_ripple_on_a_high_base_has_no_half_height_width()
    {
        SpectrumFeatures features = SpectrumFeatures.Of(Sampled.Over(300, 700, 1, x => 0.5 + 0.1 * Math.Cos(2 * Math.PI * (x - 503.3) / 100)));
        SpectralPeak peak = features.Peaks.Single(p => Math.Abs(p.WavelengthNm - 503.3) < 1);

        Assert.Equal([403.3, 503.3, 603.3], features.Peaks.Select(p => p.WavelengthNm).Order(), (a, b) => Math.Abs(a - b) < 1e-3);
        Assert.Equal(0.2, peak.Prominence, 1e-4);
        Assert.Null(peak.HalfHeightWidthNm);
        Assert.Equal(50, peak.HalfProminenceWidthNm!.Value, 0.01);
    }

    // Flat tops of three samples; prominence and crossings read off by hand.
    //   0  .5 .5 .5 .1 .3 .3 .3 .2 .4 .4 .4  0
    // 400                                  412 nm
    [Fact]
    public void A_skyline_has_the_prominences_and_widths_read_off_by_hand()
    {
        SpectrumFeatures features = SpectrumFeatures.Of(Sampled.From(400, 0, .5, .5, .5, .1, .3, .3, .3, .2, .4, .4, .4, 0));

        Assert.Equal([402, 410, 406], features.Peaks.Select(p => p.WavelengthNm));
        Assert.Equal([.5, .4, .3], features.Peaks.Select(p => p.Reflectance));
        Assert.Equal([.5, .3, .1], features.Peaks.Select(p => p.Prominence), (a, b) => Math.Abs(a - b) < 1e-15);
        // Left 400 + .25/.5, right 403 + .25/.4.
        Assert.Equal(403.625 - 400.5, features.Peaks[0].HalfHeightWidthNm!.Value, 1e-12);
        Assert.Equal(403.625 - 400.5, features.Peaks[0].HalfProminenceWidthNm!.Value, 1e-12);
        // Left 408 exactly at half height, half prominence .25: left 408 + .25, right 411 + .15/.4.
        Assert.Equal(411.5 - 408, features.Peaks[1].HalfHeightWidthNm!.Value, 1e-12);
        Assert.Equal(411.375 - 408.25, features.Peaks[1].HalfProminenceWidthNm!.Value, 1e-12);
        // Half height .15 is reached on the left, but the valley of .2 on the right lies above; half prominence .25: 404.75 to 407.5.
        Assert.Null(features.Peaks[2].HalfHeightWidthNm);
        Assert.Equal(407.5 - 404.75, features.Peaks[2].HalfProminenceWidthNm!.Value, 1e-12);
    }

    // Falls to .3 before the next peak and to 0 behind it: half of the height, .25, is not this peak's to reach.
    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public void The_search_for_a_width_ends_at_the_valley_before_the_next_peak(bool mirrored)
    {
        double[] values = [0, .2, .5, .4, .3, .4, .45, .4, .2, 0];
        SpectrumFeatures features = SpectrumFeatures.Of(Sampled.From(400, mirrored ? [.. values.Reverse()] : values));

        Assert.Equal(2, features.Peaks.Count);
        Assert.Null(features.Peaks[0].HalfHeightWidthNm);
    }

    // The vertex, .05/1.3 nm left of 502 nm and (capped) 1 high, starts both searches: to (501, .4) on the left, to (502, 1) and
    // (503, .3) on the right.
    [Fact]
    public void A_sharp_peak_is_measured_from_its_vertex()
    {
        SpectralPeak peak = Assert.Single(SpectrumFeatures.Of(Sampled.From(500, 0, .4, 1, .3, 0)).Peaks);
        double vertexNm = 502 - .05 / 1.3;

        Assert.Equal(vertexNm, peak.WavelengthNm, 1e-9);
        Assert.Equal(502 + .5 / .7 - (vertexNm - (vertexNm - 501) * .5 / .6), peak.HalfHeightWidthNm!.Value, 1e-9);
    }

    [Fact]
    public void Ripples_below_one_percent_of_the_highest_are_no_peaks_and_do_not_end_a_width()
    {
        static double Value(double ripple, double x) => 0.5 * Sampled.Gaussian(x, 500, 30) + ripple * Math.Cos(2 * Math.PI * (x - 500) / 20);

        SpectrumFeatures rippled = SpectrumFeatures.Of(Sampled.Over(300, 700, 1, x => Value(0.0024, x)));
        SpectrumFeatures wavy = SpectrumFeatures.Of(Sampled.Over(300, 700, 1, x => Value(0.0028, x)));

        SpectralPeak only = Assert.Single(rippled.Peaks);
        // Without the ripple 70.64 nm; it moves either flank by at most .0024 over the slope there, .00981 a nm.
        Assert.Equal(70.64, only.HalfHeightWidthNm!.Value, 0.5);
        Assert.True(wavy.Peaks.Count > 5);
    }

    [Fact]
    public void Two_equal_samples_peak_halfway_between()
    {
        SpectralPeak peak = Assert.Single(SpectrumFeatures.Of(Sampled.From(500, .1, .3, .3, .1)).Peaks);

        Assert.Equal(501.5, peak.WavelengthNm, 1e-9);
        // y = .325 - .1 t^2 through t = -1.5, -.5, .5, 1.5.
        Assert.Equal(.325, peak.Reflectance, 1e-12);
    }

    [Fact]
    public void A_step_up_that_stays_is_no_peak()
        => Assert.Empty(SpectrumFeatures.Of(Sampled.From(500, .1, .2, .2, .2, .3, .3)).Peaks);

    [Fact]
    public void A_fraction_is_never_reported_above_one()
    {
        SpectralPeak peak = Assert.Single(SpectrumFeatures.Of(Sampled.From(500, 0, .95, 1, 0, 0)).Peaks);

        Assert.Equal(1, peak.Reflectance);
        Assert.InRange(peak.WavelengthNm, 501, 502);
    }

    [Fact]
    public void A_mirrored_spectrum_has_mirrored_peaks()
    {
        double Value(double x) => 0.2 * Sampled.Gaussian(x, 460.3, 9) + 0.3 * Sampled.Gaussian(x, 530.9, 25) + 0.05 * Sampled.Gaussian(x, 610, 6);
        SpectrumFeatures there = SpectrumFeatures.Of(Sampled.Over(400, 640, 1, Value));
        SpectrumFeatures back = SpectrumFeatures.Of(Sampled.Over(400, 640, 1, x => Value(1040 - x)));

        Assert.Equal(3, there.Peaks.Count);
        foreach ((SpectralPeak one, SpectralPeak other) in there.Peaks.Zip(back.Peaks))
        {
            Assert.Equal(1040 - one.WavelengthNm, other.WavelengthNm, 1e-9);
            Assert.Equal(one.Prominence, other.Prominence, 1e-12);
            Assert.Equal(one.HalfProminenceWidthNm!.Value, other.HalfProminenceWidthNm!.Value, 1e-9);
        }
    }

    [Fact]
    public void A_scaled_spectrum_has_the_same_peaks_scaled()
    {
        double Value(double x) => 0.4 * Sampled.Gaussian(x, 460.3, 9) + 0.6 * Sampled.Gaussian(x, 530.9, 25);
        SpectrumFeatures whole = SpectrumFeatures.Of(Sampled.Over(400, 640, 1, Value));
        SpectrumFeatures faint = SpectrumFeatures.Of(Sampled.Over(400, 640, 1, x => Value(x) / 1024));

        Assert.Equal(whole.Peaks.Select(p => p.WavelengthNm), faint.Peaks.Select(p => p.WavelengthNm), (a, b) => Math.Abs(a - b) < 1e-9);
        Assert.Equal(whole.Peaks.Select(p => p.Prominence), faint.Peaks.Select(p => p.Prominence * 1024), (a, b) => Math.Abs(a - b) < 1e-12);
    }

    // 50,000 maxima, each higher than the one before: a search that walks from each would take 10^9 steps.
    [Fact]
    public void A_comb_of_many_peaks_is_soon_done()
    {
        SpectrumFeatures features = SpectrumFeatures.Of(
            Sampled.Over(300, 1299.99, 0.01, x => (x / 1300 + (Math.Round(x * 100) % 2 == 0 ? 0 : 0.5)) / 2));

        Assert.Equal(49_999, features.Peaks.Count);
    }

    private static SpectrumFeatures Gaussian(double centerNm, double sdNm, double stepNm)
        => SpectrumFeatures.Of(Sampled.Over(300, 780, stepNm, x => 0.4 * Sampled.Gaussian(x, centerNm, sdNm)));
}
