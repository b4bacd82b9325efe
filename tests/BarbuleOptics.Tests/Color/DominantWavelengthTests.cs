using BarbuleOptics.Color;
using BarbuleOptics.Quantities;
using Xunit;

namespace BarbuleOptics.Tests.Color;

/// <summary>Dominant wavelength and purity from their definitions (CIE 015).</summary>
public sealed class DominantWavelengthTests
{
    private static readonly Chromaticity White = new(1.0 / 3, 1.0 / 3);

    // A mixture of white and one wavelength has that dominant wavelength and, as its purity, its share of the way.
    [Theory]
    [InlineData(StandardObserver.Cie1931TwoDegree)]
    [InlineData(StandardObserver.Cie1964TenDegree)]
    public void Mixture_of_white_and_one_wavelength_has_that_wavelength(StandardObserver observer)
    {
        SpectralLocus locus = SpectralLocus.Of(observer);
        for (int wavelengthNm = 410; wavelengthNm <= 680; wavelengthNm++)
        {
            Chromaticity point = locus.Points[wavelengthNm - SpectralLocus.FirstNm];
            foreach (double share in new[] { 0.05, 0.5, 1 })
            {
                (double? foundNm, double purity) = locus.Locate(Between(White, point, share), White);
                Assert.Equal(wavelengthNm, foundNm!.Value, 0.01);
                Assert.Equal(share, purity, 1e-6);
            }
        }
    }

    // Opposite a green lies a purple: the same line, the same number with a minus.
    [Theory]
    [InlineData(500)]
    [InlineData(530)]
    [InlineData(560)]
    public void Purple_has_the_complementary_wavelength_with_a_minus(int wavelengthNm)
    {
        SpectralLocus locus = SpectralLocus.Of(StandardObserver.Cie1931TwoDegree);
        Chromaticity green = locus.Points[wavelengthNm - SpectralLocus.FirstNm];
        (double? foundNm, double purity) = locus.Locate(Between(White, green, -0.1), White);
        Assert.Equal(-wavelengthNm, foundNm!.Value, 0.01);
        Assert.InRange(purity, 0.01, 0.99);
    }

    [Fact]
    public void Middle_of_the_purple_line_has_purity_one()
    {
        SpectralLocus locus = SpectralLocus.Of(StandardObserver.Cie1931TwoDegree);
        Chromaticity middle = Between(locus.Points[0], locus.Points[^1], 0.5);
        (double? foundNm, double purity) = locus.Locate(middle, White);
        Assert.InRange(foundNm!.Value, -570, -490);
        Assert.Equal(1, purity, 1e-9);
    }

    [Fact]
    public void Every_direction_has_a_wavelength()
    {
        SpectralLocus locus = SpectralLocus.Of(StandardObserver.Cie1964TenDegree);
        for (int i = 0; i < 3600; i++)
        {
            (double sin, double cos) = Math.SinCos(i * Math.PI / 1800);
            (double? foundNm, double purity) = locus.Locate(new Chromaticity(White.X + 0.01 * cos, White.Y + 0.01 * sin), White);
            Assert.InRange(Math.Abs(foundNm!.Value), SpectralLocus.FirstNm, SpectralLocus.LastNm);
            Assert.InRange(purity, 0.01, 0.2);
        }

        Assert.Equal((null, 0.0), locus.Locate(White, White));
    }

    [Fact]
    public void Narrow_band_has_its_center_as_dominant_wavelength()
    {
        WavelengthGrid grid = ColorSamples.Grid(300, 780, 1);
        var colorimeter = new Colorimeter(grid, Illuminant.E, StandardObserver.Cie1931TwoDegree);
        CieColor color = colorimeter.Measure(ColorSamples.On(grid, static l => ColorSamples.Bell(l, 580, 4)));
        Assert.Equal(580, color.DominantWavelengthNm!.Value, 0.1);
        Assert.InRange(color.ExcitationPurity, 0.99, 1.0001);
    }

    [Fact]
    public void Nearly_gray_color_has_a_purity_but_no_dominant_wavelength()
    {
        WavelengthGrid grid = ColorSamples.Grid(300, 780, 1);
        var colorimeter = new Colorimeter(grid, Illuminant.D65, StandardObserver.Cie1931TwoDegree);
        CieColor color = colorimeter.Measure(ColorSamples.On(grid, static l => 0.3 + 0.02 * ColorSamples.Bell(l, 600, 80)));
        Assert.InRange(color.Lab.Chroma, 0.5, HueTerms.AchromaticChroma);
        Assert.Null(color.DominantWavelengthNm);
        Assert.InRange(color.ExcitationPurity, 0.001, 0.1);
        Assert.Equal("gray", color.HueTerm);
    }

    private static Chromaticity Between(Chromaticity from, Chromaticity to, double share)
        => new(from.X + share * (to.X - from.X), from.Y + share * (to.Y - from.Y));
}
