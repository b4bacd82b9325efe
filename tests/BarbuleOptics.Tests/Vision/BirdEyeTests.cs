using BarbuleOptics.Color;
using BarbuleOptics.Quantities;
using BarbuleOptics.Tests.Color;
using BarbuleOptics.Vision;
using Xunit;

namespace BarbuleOptics.Tests.Vision;

/// <summary>What holds for any spectrum, eye and light.</summary>
public sealed class BirdEyeTests
{
    // Q(R)/Q(1) = R for a flat R: rounding only.
    [Fact]
    public void A_flat_spectrum_on_a_flat_background_is_achromatic_at_any_level()
    {
        foreach ((VisualSystem system, Illuminant light) in Eyes.All)
        {
            foreach (double backgroundLevel in (double[])[1, 0.3])
            {
                var eye = new BirdEye(Eyes.Usual, system, light, ColorSamples.On(Eyes.Usual, _ => backgroundLevel));
                foreach (double level in (double[])[1e-4, 0.02, 0.5, 1])
                {
                    BirdColor color = eye.Look(ColorSamples.On(Eyes.Usual, _ => level));
                    Assert.All(color.Catches, value => Assert.Equal(level / backgroundLevel, value, 1e-12));
                    Assert.Equal(level / backgroundLevel, color.DoubleCatch!.Value, 1e-12);
                    Assert.Equal(0, color.Place.Chroma, 1e-12);
                    Assert.Equal(0, color.ChromaticContrast!.Value, 1e-9);
                    Assert.Equal(new BirdHue(BirdHue.Achromatic, false), color.Hue);
                    Assert.Equal(level / backgroundLevel < BirdColor.LeastCatch, color.IsDark);
                }
            }
        }
    }

    [Fact]
    public void Contrast_is_symmetric_zero_on_itself_and_obeys_the_triangle()
    {
        var random = new Random(20);
        foreach (VisualSystem system in VisualSystems.All)
        {
            var eye = new BirdEye(Eyes.Usual, system, Illuminant.D65);
            for (int i = 0; i < 20; i++)
            {
                double[][] catches = [.. Enumerable.Range(0, 3).Select(_ => eye.Look(Eyes.RandomSpectrum(random, Eyes.Usual)).Catches.ToArray())];
                double ab = Contrast(0, 1), bc = Contrast(1, 2), ac = Contrast(0, 2);
                Assert.Equal(ab, Contrast(1, 0), 1e-12);
                Assert.Equal(0, Contrast(0, 0));
                Assert.True(ab > 1e-3 && ac <= ab + bc + 1e-9);

                double Contrast(int one, int other) => eye.Noise.Chromatic(catches[one], catches[other])!.Value;
            }
        }
    }

    [Fact]
    public void A_scaled_spectrum_keeps_its_place_hue_and_contrasts_of_color()
    {
        var random = new Random(21);
        foreach ((VisualSystem system, Illuminant light) in Eyes.All)
        {
            var eye = new BirdEye(Eyes.Usual, system, light);
            Spectrum spectrum = Eyes.RandomSpectrum(random, Eyes.Usual);
            BirdColor color = eye.Look(spectrum), darker = eye.Look(Eyes.Scaled(spectrum, 0.037));
            Assert.Equal(color.Place.X, darker.Place.X, 1e-12);
            Assert.Equal(color.Place.Y, darker.Place.Y, 1e-12);
            Assert.Equal(color.Place.Z, darker.Place.Z, 1e-12);
            Assert.Equal(color.Hue, darker.Hue);
            Assert.Equal(color.ChromaticContrast!.Value, darker.ChromaticContrast!.Value, 1e-9);
            Assert.Equal(Math.Abs(Math.Log(0.037)) / system.DoubleWeberFraction, eye.Noise.Achromatic(color.DoubleCatch!.Value, darker.DoubleCatch!.Value)!.Value, 1e-9);
        }
    }

    // Scaling the light or the background does nothing (von Kries), and the spectrum of the background is gray.
    [Fact]
    public void The_background_itself_is_gray()
    {
        Spectrum leaf = Eyes.RandomSpectrum(new Random(22), Eyes.Usual);
        foreach ((VisualSystem system, Illuminant light) in Eyes.All)
        {
            BirdColor color = new BirdEye(Eyes.Usual, system, light, leaf).Look(leaf);
            Assert.All(color.Catches, value => Assert.Equal(1, value, 1e-12));
            Assert.Equal(0, color.AchromaticContrast!.Value, 1e-9);
        }
    }

    // An integral by another route: Simpson's rule at 0.25 nm on the formulas themselves. R is a smooth bell; measured difference 5e-6 at 1 nm, 4e-5 at 10 nm.
    [Theory]
    [InlineData(1, 2e-5)]
    [InlineData(0.25, 2e-4)]
    [InlineData(5, 2e-5)]
    [InlineData(10, 2e-4)]
    public void Catches_are_the_integrals_of_their_definition(double stepNm, double tolerance)
    {
        WavelengthGrid grid = ColorSamples.Grid(290, 720, stepNm);
        foreach (VisualSystem system in VisualSystems.All)
        {
            BirdColor color = new BirdEye(grid, system, Illuminant.E).Look(ColorSamples.On(grid, Reflectance));
            for (int cone = 0; cone < 4; cone++)
            {
                double expected = Integral(nm => Reflectance(nm) * nm * system.SingleCones[cone].Sensitivity(system.Media, nm)) / Integral(nm => nm * system.SingleCones[cone].Sensitivity(system.Media, nm));
                Assert.Equal(expected, color.Catches[cone], tolerance);
            }
        }

        static double Reflectance(double nm) => 0.05 + 0.6 * ColorSamples.Bell(nm, 455, 90);
        static double Integral(Func<double, double> f)
        {
            double sum = f(300) + f(700);
            for (int i = 1; i < 1600; i++)
                sum += (i % 2 == 1 ? 4 : 2) * f(300 + 0.25 * i);
            return sum * 0.25 / 3;
        }
    }

    // Photons, not power: without the factor l the shift to red light would be smaller. A line at l1 and one at l2 of equal power are caught in the ratio
    // l1 S(l1)/(l2 S(l2)); by formula.
    [Fact]
    public void Catches_count_photons()
    {
        Cone cone = VisualSystems.Ultraviolet.SingleCones[3];
        var matrix = new CatchMatrix(Eyes.Usual, VisualSystems.Ultraviolet, Illuminant.E);
        double expected = 640 * cone.Sensitivity(VisualSystems.Ultraviolet.Media, 640) / (590 * cone.Sensitivity(VisualSystems.Ultraviolet.Media, 590));
        Assert.Equal(expected, matrix.Row(3)[640 - 300] / matrix.Row(3)[590 - 300], 1e-12);
        Assert.Equal(0, matrix.Row(3)[750 - 300]);
    }

    [Fact]
    public void Many_spectra_at_once_are_the_single_ones()
    {
        var random = new Random(23);
        WavelengthGrid grid = ColorSamples.Grid(300, 703, 1);
        var matrix = new CatchMatrix(grid, VisualSystems.Violet, Illuminant.D65);
        Spectrum[] spectra = [.. Enumerable.Range(0, 5).Select(_ => Eyes.RandomSpectrum(random, grid))];
        var all = new double[5 * CatchMatrix.RowCount];
        matrix.MultiplyAll(spectra.SelectMany(spectrum => spectrum.Values.ToArray()).ToArray(), all);
        for (int i = 0; i < spectra.Length; i++)
        {
            var one = new double[CatchMatrix.RowCount];
            matrix.Multiply(spectra[i].Values, one);
            Assert.Equal(one, all[(i * CatchMatrix.RowCount)..((i + 1) * CatchMatrix.RowCount)]);
            for (int row = 0; row < CatchMatrix.RowCount; row++)
                Assert.Equal(Enumerable.Range(0, grid.Count).Sum(w => matrix.Row(row)[w] * spectra[i][w]), one[row], 1e-13);
        }
    }

    [Fact]
    public void Products_allocate_nothing()
    {
        var eye = new BirdEye(Eyes.Usual, VisualSystems.Violet, Illuminant.D65);
        double[] spectrum = Eyes.RandomSpectrum(new Random(24), Eyes.Usual).Values.ToArray(), catches = new double[CatchMatrix.RowCount], background = [1, 1, 1, 1], relative = new double[4];
        Assert.True(Look() > 0);
        long before = GC.GetAllocatedBytesForCurrentThread();
        for (int i = 0; i < 100; i++)
            Look();
        Assert.Equal(before, GC.GetAllocatedBytesForCurrentThread());

        double Look()
        {
            eye.Matrix.Multiply(spectrum, catches);
            TetrahedralColor.RelativeCatches(catches.AsSpan(0, 4), relative);
            return eye.Noise.Chromatic(catches.AsSpan(0, 4), background)!.Value + new TetrahedralColor(catches.AsSpan(0, 4)).Chroma + BirdHue.ConesOf(relative, out _);
        }
    }

    [Fact]
    public void What_is_not_covered_is_refused_and_not_guessed()
    {
        Assert.False(CatchMatrix.CanCatch(ColorSamples.Grid(301, 780, 1)));
        Assert.False(CatchMatrix.CanCatch(ColorSamples.Grid(300, 699, 1)));
        Assert.False(CatchMatrix.CanCatch(ColorSamples.Grid(300, 780, 21)));
        Assert.Throws<ArgumentException>(() => new BirdEye(ColorSamples.Grid(400, 700, 1), VisualSystems.Violet, Illuminant.D65));
        Assert.Throws<ArgumentException>(() => new BirdEye(Eyes.Usual, VisualSystems.Violet, Illuminant.D65, ColorSamples.On(Eyes.Usual, _ => 0)));
        Assert.Throws<ArgumentException>(() => new BirdEye(Eyes.Usual, VisualSystems.Violet, Illuminant.D65).Look(ColorSamples.On(ColorSamples.Grid(300, 700, 1), _ => 1)));
    }

    [Fact]
    public void Black_is_gray_and_dark_and_has_no_contrast()
    {
        BirdColor color = new BirdEye(Eyes.Usual, VisualSystems.Ultraviolet, Illuminant.D65).Look(ColorSamples.On(Eyes.Usual, _ => 0));
        Assert.True(color.IsDark);
        Assert.Equal(0, color.Place.Chroma, 1e-15);
        Assert.Null(color.ChromaticContrast);
        Assert.Null(color.AchromaticContrast);
    }

    // A band in the ultraviolet excites the shortest cone of the one eye; that of the other, whose media and pigment let less of it through, less.
    [Fact]
    public void An_ultraviolet_band_is_ultraviolet_to_the_eye_that_sees_it()
    {
        Spectrum band = ColorSamples.On(Eyes.Usual, nm => 0.05 + 0.5 * ColorSamples.Bell(nm, 365, 40));
        BirdColor one = new BirdEye(Eyes.Usual, VisualSystems.Ultraviolet, Illuminant.D65).Look(band), other = new BirdEye(Eyes.Usual, VisualSystems.Violet, Illuminant.D65).Look(band);
        Assert.Equal("ultraviolet", one.Hue.Term);
        Assert.Equal("violet", other.Hue.Term);
        Assert.True(one.RelativeCatches[0] > other.RelativeCatches[0] + 0.1);
        Assert.InRange(one.Place.ElevationDegrees, 80, 90);
    }
}
