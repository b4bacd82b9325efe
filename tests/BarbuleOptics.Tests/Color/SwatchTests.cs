using System.Globalization;
using BarbuleOptics.Color;
using BarbuleOptics.Quantities;
using Xunit;

namespace BarbuleOptics.Tests.Color;

/// <summary>Swatches of colors that sRGB lacks, and of dark ones.</summary>
public sealed class SwatchTests
{
    // 8 bits hold the hue angle to about a degree; L* to half a unit.
    [Fact]
    public void Color_outside_the_gamut_keeps_lightness_and_hue()
    {
        WavelengthGrid grid = ColorSamples.Grid(360, 780, 1);
        var colorimeter = new Colorimeter(grid, Illuminant.D65, StandardObserver.Cie1931TwoDegree);
        for (int centerNm = 450; centerNm <= 650; centerNm += 10)
        {
            CieColor color = colorimeter.Measure(ColorSamples.On(grid, l => ColorSamples.Bell(l, centerNm, 25)));
            Assert.False(color.InSrgbGamut);
            CieLab swatch = Decode(color.Srgb);
            Assert.Equal(color.Lab.L, swatch.L, 0.5);
            Assert.InRange(Math.Abs(Math.IEEERemainder(color.Lab.HueDegrees - swatch.HueDegrees, 360)), 0, 1.5);
            Assert.True(swatch.Chroma < color.Lab.Chroma);
            Assert.True(TouchesTheGamut(color.Srgb), color.Srgb.Hex);
        }
    }

    [Fact]
    public void Dark_color_is_lifted_to_the_stated_lightness_at_its_chromaticity()
    {
        WavelengthGrid grid = ColorSamples.Grid(360, 780, 1);
        var colorimeter = new Colorimeter(grid, Illuminant.D65, StandardObserver.Cie1931TwoDegree);
        CieColor dark = colorimeter.Measure(ColorSamples.On(grid, static l => 0.02 + 0.02 * ColorSamples.Bell(l, 600, 120)));
        CieColor tenTimes = colorimeter.Measure(ColorSamples.On(grid, static l => 10 * (0.02 + 0.02 * ColorSamples.Bell(l, 600, 120))));
        Assert.Equal(SrgbEncoder.BrightenedLightness, Decode(dark.SrgbBrightened).L, 0.5);
        Assert.Equal(tenTimes.Chromaticity.X, dark.Chromaticity.X, 1e-12);
        Assert.Equal(dark.HueTerm == "black", HueTerms.IsAchromatic(dark.Lab));
        CieColor light = colorimeter.Measure(ColorSamples.On(grid, static _ => 0.9));
        Assert.Equal(light.Srgb, light.SrgbBrightened);
    }

    [Fact]
    public void Reflectance_above_one_and_below_zero_still_gives_a_swatch()
    {
        WavelengthGrid grid = ColorSamples.Grid(360, 780, 1);
        var colorimeter = new Colorimeter(grid, Illuminant.A, StandardObserver.Cie1931TwoDegree);
        CieColor bright = colorimeter.Measure(ColorSamples.On(grid, static _ => 1.5));
        Assert.Equal("#ffffff", bright.Srgb.Hex);
        Assert.False(bright.InSrgbGamut);
        CieColor negative = colorimeter.Measure(ColorSamples.On(grid, static _ => -0.01));
        Assert.Equal("#000000", negative.Srgb.Hex);
        Assert.Equal("black", negative.HueTerm);
    }

    private static bool TouchesTheGamut(SrgbColor color)
    {
        byte[] channels = [color.Red, color.Green, color.Blue];
        return channels.Min() <= 1 || channels.Max() >= 254;
    }

    /// <summary>IEC 61966-2-1 backwards, with its printed matrix, and L*a*b* against its white.</summary>
    private static CieLab Decode(SrgbColor color)
    {
        double[] linear = [.. new[] { color.Hex[1..3], color.Hex[3..5], color.Hex[5..7] }
            .Select(static text => int.Parse(text, NumberStyles.HexNumber, CultureInfo.InvariantCulture) / 255.0)
            .Select(static v => v <= 0.04045 ? v / 12.92 : Math.Pow((v + 0.055) / 1.055, 2.4))];
        return CieLab.FromTristimulus(
            new Tristimulus(
                41.24 * linear[0] + 35.76 * linear[1] + 18.05 * linear[2],
                21.26 * linear[0] + 71.52 * linear[1] + 7.22 * linear[2],
                1.93 * linear[0] + 11.92 * linear[1] + 95.05 * linear[2]),
            new Tristimulus(95.05, 100, 108.9));
    }
}
