using BarbuleOptics.Color;
using BarbuleOptics.Quantities;
using Xunit;

namespace BarbuleOptics.Tests.Color;

/// <summary>Grids, coverage and limits of the color computation.</summary>
public sealed class ColorimeterTests
{
    private const StandardObserver Two = StandardObserver.Cie1931TwoDegree;

    public static TheoryData<string, StandardObserver> Lights()
    {
        var lights = new TheoryData<string, StandardObserver>();
        foreach (Illuminant illuminant in Illuminant.All)
            foreach (StandardObserver observer in Enum.GetValues<StandardObserver>())
                lights.Add(illuminant.Name, observer);
        return lights;
    }

    [Theory]
    [MemberData(nameof(Lights))]
    public void Perfect_mirror_is_white_and_half_of_it_neutral(string name, StandardObserver observer)
    {
        Assert.True(Illuminant.TryFind(name, out Illuminant? illuminant));
        var colorimeter = new Colorimeter(ColorSamples.Grid(300, 780, 5), illuminant, observer);
        CieColor white = Measure(colorimeter, static _ => 1);
        Assert.Equal(100, white.Tristimulus.Y, 1e-9);
        Assert.Equal(100, white.Lab.L, 1e-9);
        Assert.InRange(white.Lab.Chroma, 0, 1e-9);
        Assert.Equal("#ffffff", white.Srgb.Hex);
        Assert.True(white.InSrgbGamut);
        Assert.Null(white.DominantWavelengthNm);
        Assert.InRange(white.ExcitationPurity, 0, 1e-9);

        // Reflectance 0.18: 255 (1.055 0.18^(1/2.4) - 0.055) = 117.65 (IEC 61966-2-1), L* = 116 0.18^(1/3) - 16 = 49.496 (ISO/CIE 11664-4).
        CieColor gray = Measure(colorimeter, static _ => 0.18);
        Assert.Equal(49.496, gray.Lab.L, 5e-4);
        Assert.Equal("#767676", gray.Srgb.Hex);
        Assert.Equal("gray", gray.HueTerm);
    }

    [Fact]
    public void Black_is_black_without_any_undefined_number()
    {
        CieColor black = Measure(new Colorimeter(ColorSamples.Grid(300, 780, 1), Illuminant.D65, Two), static _ => 0);
        Assert.Equal(new CieLab(0, 0, 0).L, black.Lab.L, 1e-12);
        Assert.Equal("#000000", black.Srgb.Hex);
        Assert.Equal("#000000", black.SrgbBrightened.Hex);
        Assert.Equal("black", black.HueTerm);
        Assert.Null(black.DominantWavelengthNm);
        Assert.Equal(0, black.ExcitationPurity);
        Assert.Equal(0.3127, black.Chromaticity.X, 1e-4);
    }

    // Sprague's interpolation is exact for a polynomial of the fourth degree with three samples to spare at either end, so that a
    // coarse grid gives the sums of the 1 nm grid. A wrong coefficient shows. Measured: below 3e-14.
    [Theory]
    [InlineData(300, 860, 20)]
    [InlineData(301.7, 860, 20)]
    [InlineData(305, 860, 10)]
    [InlineData(330.3, 860, 5)]
    [InlineData(350.5, 860, 1)]
    [InlineData(350.2, 860, 1.3)]
    public void Coarse_grid_carries_a_quartic_exactly(double startNm, double stopNm, double stepNm)
    {
        Tristimulus fine = Sum(ColorSamples.Grid(360, 780, 1), Quartic);
        Tristimulus coarse = Sum(ColorSamples.Grid(startNm, stopNm, stepNm), Quartic);
        Assert.Equal(fine.X, coarse.X, 1e-9);
        Assert.Equal(fine.Y, coarse.Y, 1e-9);
        Assert.Equal(fine.Z, coarse.Z, 1e-9);
    }

    // The end formulas of CIE 167:2005 carry a straight line exactly up to the last sample. Measured: below 2e-13.
    [Theory]
    [InlineData(360, 780, 5)]
    [InlineData(360, 780, 20)]
    [InlineData(359.5, 780.5, 1)]
    [InlineData(360, 780, 0.5)]
    [InlineData(359, 781, 0.1)]
    public void Any_grid_carries_a_straight_line(double startNm, double stopNm, double stepNm)
    {
        Tristimulus fine = Sum(ColorSamples.Grid(360, 780, 1), static l => 0.1 + (l - 360) / 600);
        Tristimulus other = Sum(ColorSamples.Grid(startNm, stopNm, stepNm), static l => 0.1 + (l - 360) / 600);
        Assert.Equal(fine.X, other.X, 1e-10);
        Assert.Equal(fine.Y, other.Y, 1e-10);
        Assert.Equal(fine.Z, other.Z, 1e-10);
    }

    // Measured: 0.021 for the 8 nm peak at 0.9 nm steps, below 0.003 otherwise: below 1 nm the values are means over the neighborhood.
    [Theory]
    [InlineData(0.1)]
    [InlineData(0.37)]
    [InlineData(0.5)]
    [InlineData(0.9)]
    [InlineData(1.7)]
    public void Grid_off_the_integers_gives_nearly_the_color_of_the_integer_grid(double stepNm)
    {
        foreach (string sample in new[] { "flat", "fringe", "ramp", "narrow peak", "dark" })
        {
            WavelengthGrid odd = ColorSamples.Grid(299.83, 800, stepNm), whole = ColorSamples.Grid(300, 800, 1);
            CieLab expected = Measure(new Colorimeter(whole, Illuminant.D65, Two), l => ColorSamples.Named(sample, l)).Lab;
            CieLab found = Measure(new Colorimeter(odd, Illuminant.D65, Two), l => ColorSamples.Named(sample, l)).Lab;
            Assert.Equal(expected.L, found.L, 0.03);
            Assert.Equal(expected.A, found.A, 0.03);
            Assert.Equal(expected.B, found.B, 0.03);
        }
    }

    // Noise of alternating sign at half a nanometre: the mean over 1 nm takes 1/4, 1/2, 1/4 of the neighbors, which cancel; picking out the
    // whole nanometres would give 0.6 everywhere.
    [Fact]
    public void Steps_below_one_nanometre_are_averaged()
    {
        Tristimulus noisy = Sum(ColorSamples.Grid(300, 800, 0.5), static l => l % 1 == 0 ? 0.6 : 0.4);
        Assert.Equal(50, noisy.Y, 1e-9);
    }

    [Fact]
    public void End_values_are_held_where_the_grid_ends()
    {
        Tristimulus held = Sum(ColorSamples.Grid(400, 700, 1), static l => l / 1000);
        Tristimulus spelled = Sum(ColorSamples.Grid(360, 780, 1), static l => Math.Clamp(l, 400, 700) / 1000);
        Assert.Equal(spelled.X, held.X, 1e-12);
        Assert.Equal(spelled.Y, held.Y, 1e-12);
        Assert.Equal(spelled.Z, held.Z, 1e-12);
    }

    [Theory]
    [InlineData(300, 780, 1, true, true, true)]
    [InlineData(380, 780, 1, true, true, true)]
    [InlineData(381, 780, 1, true, false, true)]
    [InlineData(300, 700, 1, true, false, true)]
    [InlineData(400, 700, 20, true, false, true)]
    [InlineData(401, 780, 1, false, false, false)]
    [InlineData(300, 699, 1, false, false, false)]
    [InlineData(300, 800, 25, true, true, false)]
    [InlineData(500, 500, 1, false, false, false)]
    [InlineData(1000, 2000, 1, false, false, false)]
    public void Coverage_decides_whether_there_is_a_color(
        double startNm, double stopNm, double stepNm, bool visible, bool whole, bool possible)
    {
        WavelengthGrid grid = ColorSamples.Grid(startNm, stopNm, stepNm);
        var colorimeter = new Colorimeter(grid, Illuminant.D65, Two);
        Assert.Equal(visible, colorimeter.CoversVisible);
        Assert.Equal(whole, colorimeter.CoversObserver);
        Assert.Equal(possible, colorimeter.CanMeasure);
        Spectrum spectrum = ColorSamples.On(grid, static _ => 0.5);
        Assert.Equal(possible, colorimeter.TryMeasure(spectrum, out CieColor? color));
        Assert.Equal(possible, color is not null);
        if (!possible)
            Assert.Throws<InvalidOperationException>(() => colorimeter.Measure(spectrum));
    }

    [Fact]
    public void Spectrum_on_another_grid_is_refused()
    {
        var colorimeter = new Colorimeter(ColorSamples.Grid(300, 780, 1), Illuminant.D65, Two);
        Spectrum other = ColorSamples.On(ColorSamples.Grid(300, 780, 2), static _ => 0.5);
        Assert.Throws<ArgumentException>(() => colorimeter.Measure(other));
        Assert.Throws<ArgumentException>(() => colorimeter.TryMeasure(other, out _));
        Assert.Throws<ArgumentException>(() => colorimeter.MeasureTristimulus(new double[3]));
        Assert.Throws<ArgumentOutOfRangeException>(() => new Colorimeter(other.Grid, Illuminant.D65, (StandardObserver)7));
    }

    [Fact]
    public void Many_spectra_cost_no_memory()
    {
        var colorimeter = new Colorimeter(ColorSamples.Grid(300, 780, 1), Illuminant.D65, Two);
        var reflectance = new double[481];
        colorimeter.MeasureLab(reflectance);
        long before = GC.GetAllocatedBytesForCurrentThread();
        for (int i = 0; i < 100; i++)
            colorimeter.MeasureLab(reflectance);
        Assert.Equal(before, GC.GetAllocatedBytesForCurrentThread());
    }

    [Fact]
    public void The_1964_observer_leaves_the_swatch_to_the_1931_observer()
    {
        WavelengthGrid grid = ColorSamples.Grid(360, 780, 1);
        CieColor two = Measure(new Colorimeter(grid, Illuminant.A, Two), static l => ColorSamples.Named("band-pass", l));
        CieColor ten = Measure(new Colorimeter(grid, Illuminant.A, StandardObserver.Cie1964TenDegree), static l => ColorSamples.Named("band-pass", l));
        Assert.NotEqual(two.Lab, ten.Lab);
        Assert.Equal(two.Srgb, ten.Srgb);
        Assert.Equal(two.SrgbBrightened, ten.SrgbBrightened);
    }

    private static double Quartic(double l)
    {
        double u = (l - 570) / 300;
        return 0.4 + 0.3 * u - 0.5 * u * u + 0.4 * u * u * u + 0.6 * u * u * u * u;
    }

    private static CieColor Measure(Colorimeter colorimeter, Func<double, double> reflectance)
        => colorimeter.Measure(ColorSamples.On(colorimeter.Grid, reflectance));

    private static Tristimulus Sum(WavelengthGrid grid, Func<double, double> reflectance)
        => new Colorimeter(grid, Illuminant.D65, Two).MeasureTristimulus(ColorSamples.On(grid, reflectance).Values);
}
