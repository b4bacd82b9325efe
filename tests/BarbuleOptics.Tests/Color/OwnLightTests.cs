using BarbuleOptics.Color;
using BarbuleOptics.Quantities;
using Xunit;

namespace BarbuleOptics.Tests.Color;

/// <summary>Lights of a user's own, and sums at 5 nm.</summary>
public sealed class OwnLightTests
{
    // D65 sampled at 5 nm and joined by straight lines is D65 itself, whose table has 10 nm: equal but for rounding.
    [Fact]
    public void A_light_made_of_the_samples_of_another_is_that_light()
    {
        double[] nm = [.. Enumerable.Range(0, 107).Select(i => 300 + 5.0 * i)];
        Illuminant own = Illuminant.FromSamples("mine", nm, [.. nm.Select(l => 3 * Illuminant.D65.RelativePower(Length.FromNanometres(l)))]);
        Assert.Equal((true, false), (own.IsOwn, Illuminant.D65.IsOwn));
        Assert.Equal(Illuminant.D65.RelativePower(Length.FromNanometres(433)), own.RelativePower(Length.FromNanometres(433)), 1e-9);
        Tristimulus white = Colorimeter.WhiteOf(own, StandardObserver.Cie1964TenDegree), expected = Colorimeter.WhiteOf(Illuminant.D65, StandardObserver.Cie1964TenDegree);
        Assert.Equal(expected.X, white.X, 1e-9);
        Assert.Equal(expected.Z, white.Z, 1e-9);
    }

    [Fact]
    public void A_light_that_leaves_out_wavelengths_or_is_none_is_refused()
    {
        Assert.Throws<ArgumentException>(() => Illuminant.FromSamples("short", [310, 780], [1, 1]));
        Assert.Throws<ArgumentException>(() => Illuminant.FromSamples("short", [300, 779], [1, 1]));
        Assert.Throws<ArgumentException>(() => Illuminant.FromSamples("turned", [300, 500, 400, 780], [1, 1, 1, 1]));
        Assert.Throws<ArgumentException>(() => Illuminant.FromSamples("few", [300, 780], [1, 1, 1]));
        Assert.Throws<ArgumentOutOfRangeException>(() => Illuminant.FromSamples("negative", [300, 780], [1, -1]));
        Assert.Throws<ArgumentOutOfRangeException>(() => Illuminant.FromSamples("dark", [300, 560, 780], [1, 0, 1]));
    }

    // Smooth spectra give the same color by both sums (measured: 0.02 in L*a*b*); a line of 2 nm between the 5 nm rows does not.
    [Fact]
    public void Sums_at_five_nanometres_are_near_those_at_one_for_smooth_spectra_only()
    {
        WavelengthGrid grid = ColorSamples.Grid(360, 780, 1);
        var fine = new Colorimeter(grid, Illuminant.D65, StandardObserver.Cie1931TwoDegree);
        var coarse = new Colorimeter(grid, Illuminant.D65, StandardObserver.Cie1931TwoDegree, SummationStep.FiveNanometres);
        foreach (string name in (string[])["flat", "fringe", "ramp", "dark"])
            Assert.InRange(Distance(name), 0, 0.05);
        double[] line = new double[grid.Count];
        line[512 - 360] = 1;
        Assert.True(fine.MeasureTristimulus(line).Y > 0.1);
        Assert.Equal(0, coarse.MeasureTristimulus(line).Y, 1e-12);

        double Distance(string name)
        {
            Spectrum spectrum = ColorSamples.On(grid, nm => ColorSamples.Named(name, nm));
            CieLab one = fine.Measure(spectrum).Lab, other = coarse.Measure(spectrum).Lab;
            return Math.Max(Math.Abs(one.L - other.L), Math.Max(Math.Abs(one.A - other.A), Math.Abs(one.B - other.B)));
        }
    }
}
