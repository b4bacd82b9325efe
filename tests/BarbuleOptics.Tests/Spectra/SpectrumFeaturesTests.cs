using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra;
using Xunit;

namespace BarbuleOptics.Tests.Spectra;

public class SpectrumFeaturesTests
{
    [Fact]
    public void A_constant_has_no_peak_no_contrast_and_a_quarter_in_the_ultraviolet()
    {
        SpectrumFeatures features = SpectrumFeatures.Of(Sampled.Over(300, 780, 1, _ => 0.3));

        Assert.Empty(features.Peaks);
        Assert.Null(features.MainPeak);
        Assert.False(features.AtEdge);
        Assert.Equal(0.3, features.MeanReflectance!.Value, 1e-12);
        Assert.Equal(0, features.Contrast!.Value, 1e-12);
        Assert.Equal(0.25, features.UltravioletShare!.Value, 1e-12);
    }

    [Fact]
    public void Darkness_has_no_peak_and_no_ratio()
    {
        SpectrumFeatures features = SpectrumFeatures.Of(Sampled.Over(300, 700, 1, _ => 0));

        Assert.Empty(features.Peaks);
        Assert.False(features.AtEdge);
        Assert.Equal(0, features.MeanReflectance);
        Assert.Null(features.Contrast);
        Assert.Null(features.UltravioletShare);
    }

    // R = (x - 300)/400: mean 1/2, contrast 2, ultraviolet share (1/4)^2 = 1/16; a straight line is exact for trapezoids.
    [Theory]
    [InlineData(300, 700, 1)]
    [InlineData(300, 780, 7)]
    [InlineData(299.3, 702, 2.5)]
    public void A_ramp_has_its_integrals_on_any_grid_that_covers_it(double startNm, double stopNm, double stepNm)
    {
        SpectrumFeatures features = SpectrumFeatures.Of(Sampled.Over(startNm, stopNm, stepNm, x => (x - 300) / 400));

        Assert.Empty(features.Peaks);
        Assert.True(features.AtEdge);
        Assert.Equal(0.5, features.MeanReflectance!.Value, 1e-12);
        Assert.Equal(2, features.Contrast!.Value, 1e-12);
        Assert.Equal(1.0 / 16, features.UltravioletShare!.Value, 1e-12);
    }

    [Fact]
    public void A_grid_that_starts_at_400_has_a_mean_of_its_part_and_no_ultraviolet_share()
    {
        SpectrumFeatures features = SpectrumFeatures.Of(Sampled.Over(400, 780, 1, x => (x - 300) / 400));

        Assert.Equal(0.625, features.MeanReflectance!.Value, 1e-12);
        Assert.Equal(0.75 / 0.625, features.Contrast!.Value, 1e-12);
        Assert.Null(features.UltravioletShare);
    }

    [Fact]
    public void A_grid_that_ends_before_700_has_no_ultraviolet_share()
        => Assert.Null(SpectrumFeatures.Of(Sampled.Over(300, 690, 1, _ => 0.2)).UltravioletShare);

    [Fact]
    public void A_grid_in_the_infrared_has_peaks_and_no_mean()
    {
        SpectrumFeatures features = SpectrumFeatures.Of(Sampled.Over(900, 1700, 1, x => 0.3 * Sampled.Gaussian(x, 1300, 60)));

        Assert.Equal(1300, Assert.Single(features.Peaks).WavelengthNm, 1e-6);
        Assert.Null(features.MeanReflectance);
        Assert.Null(features.Contrast);
        Assert.Null(features.UltravioletShare);
    }

    [Fact]
    public void What_lies_beyond_700_nm_counts_for_peaks_and_not_for_the_contrast()
    {
        SpectrumFeatures features = SpectrumFeatures.Of(Sampled.Over(300, 900, 1, x => 0.1 + (x > 700 ? 0.5 * Sampled.Gaussian(x, 800, 8) : 0)));

        Assert.Equal(800, features.MainPeak!.WavelengthNm, 1e-6);
        Assert.Equal(0, features.Contrast!.Value, 1e-12);
    }

    [Fact]
    public void One_wavelength_has_its_value_for_mean_and_nothing_else()
    {
        SpectrumFeatures features = SpectrumFeatures.Of(Sampled.From(500, 0.2));

        Assert.Empty(features.Peaks);
        Assert.False(features.AtEdge);
        Assert.Equal(0.2, features.MeanReflectance);
        Assert.Equal(0, features.Contrast);
        Assert.Null(features.UltravioletShare);
    }

    [Fact]
    public void Two_wavelengths_have_no_peak_and_rise_at_an_end()
    {
        SpectrumFeatures features = SpectrumFeatures.Of(Sampled.From(500, 0.2, 0.4));

        Assert.Empty(features.Peaks);
        Assert.True(features.AtEdge);
        Assert.Equal(0.3, features.MeanReflectance!.Value, 1e-12);
        Assert.Equal(0.2 / 0.3, features.Contrast!.Value, 1e-12);
    }

    [Theory]
    [InlineData(300, true)]  // falls over the whole grid: still rises towards 400
    [InlineData(405, false)] // the top lies inside
    [InlineData(500, false)]
    [InlineData(695, false)]
    [InlineData(710, true)]
    public void A_spectrum_is_at_the_edge_when_its_top_lies_beyond_the_grid(double centerNm, bool atEdge)
        => Assert.Equal(atEdge, SpectrumFeatures.Of(Sampled.Over(400, 700, 1, x => Sampled.Gaussian(x, centerNm, 100))).AtEdge);

    [Theory]
    [InlineData(0.004, false)]
    [InlineData(0.006, true)]
    public void A_rise_at_an_end_counts_from_one_percent_of_the_highest(double rise, bool atEdge)
        => Assert.Equal(atEdge, SpectrumFeatures.Of(Sampled.From(500, 0.1, 0.3, 0.5, 0.3, 0.2, 0.2 + rise)).AtEdge);

    [Fact]
    public void Negative_readings_are_taken_as_they_are()
    {
        SpectrumFeatures features = SpectrumFeatures.Of(Sampled.From(500, -0.02, -0.01, -0.02));

        Assert.Null(Assert.Single(features.Peaks).HalfHeightWidthNm);
        Assert.Null(features.Contrast);
    }

    [Fact]
    public void Equal_spectra_have_equal_features()
        => Assert.Equal(SpectrumFeatures.Of(Sampled.From(500, 0, 1, 0)), SpectrumFeatures.Of(Sampled.From(500, 0, 1, 0)));

    [Fact]
    public void No_spectrum_is_refused() => Assert.Throws<ArgumentNullException>(() => SpectrumFeatures.Of(null!));
}
