using BarbuleOptics.Color;
using BarbuleOptics.Tests.Color;
using Xunit;

namespace BarbuleOptics.Tests.Published;

/// <summary>CIE 1976 L*u*v* and u', v', and the white points of sums at 5 nm.</summary>
public sealed class LuvTests
{
    // Source: the primaries of ITU-R BT.709 in u', v' and its white D65 as printed in textbooks (C. Poynton, Digital Video and HD, table of primaries;
    // from memory). Four digits.
    [Theory]
    [InlineData(0.640, 0.330, 0.4507, 0.5229)]
    [InlineData(0.300, 0.600, 0.1250, 0.5625)]
    [InlineData(0.150, 0.060, 0.1754, 0.1579)]
    [InlineData(0.3127, 0.3290, 0.1978, 0.4683)]
    public void Uniform_chromaticities_of_the_primaries_are_those_printed(double x, double y, double u, double v)
    {
        UniformChromaticity place = UniformChromaticity.Of(new Chromaticity(x, y));
        Assert.Equal(u, place.U, 0.6e-4);
        Assert.Equal(v, place.V, 0.6e-4);
    }

    // Source: L*u*v* of the sRGB primaries relative to its white (95.047, 100, 108.883), as printed in many places, among them the standard's own use in
    // video engineering (from memory; digits beyond the second place depend on the matrix used). XYZ are the columns of the matrix of IEC 61966-2-1.
    [Theory]
    [InlineData(41.24, 21.26, 1.93, 53.24, 175.02, 37.75)]
    [InlineData(35.76, 71.52, 11.92, 87.74, -83.08, 107.40)]
    [InlineData(18.05, 7.22, 95.05, 32.30, -9.40, -130.34)]
    public void Luv_of_the_primaries_is_that_printed(double x, double y, double z, double l, double u, double v)
    {
        CieLuv found = CieLuv.FromTristimulus(new Tristimulus(x, y, z), new Tristimulus(95.047, 100, 108.883));
        Assert.Equal(l, found.L, 0.02);
        Assert.Equal(u, found.U, 0.06);
        Assert.Equal(v, found.V, 0.06);
    }

    // ISO/CIE 11664-5: s_uv = 13 sqrt((u' - u'n)^2 + (v' - v'n)^2), so that it does not depend on the level. By hand for X, Y, Z = 20, 30, 40 on a white of
    // 100, 100, 100: u' = 80/(20 + 450 + 120) = 0.1355932, v' = 270/590 = 0.4576271; u'n = 400/1900 = 0.2105263, v'n = 900/1900 = 0.4736842;
    // s = 13 sqrt(0.0749331^2 + 0.0160571^2) = 13 x 0.0766342 = 0.996245.
    [Theory]
    [InlineData(1)]
    [InlineData(0.1)]
    [InlineData(0.01)]
    public void Saturation_is_the_scaled_distance_from_the_white_at_any_level(double level)
        => Assert.Equal(0.996245, CieLuv.FromTristimulus(new Tristimulus(20 * level, 30 * level, 40 * level), new Tristimulus(100, 100, 100)).Saturation, 1e-5);

    // Source: CIE 15, white points from sums at 5 nm (from memory): D65 95.04 108.88, A 109.85 35.58; largest difference measured 0.017 (Z of D65).
    [Theory]
    [InlineData("D65", 95.04, 108.88)]
    [InlineData("A", 109.85, 35.58)]
    public void Sums_at_five_nanometres_give_the_white_points_of_the_cie(string illuminant, double x, double z)
    {
        Assert.True(Illuminant.TryFind(illuminant, out Illuminant? light));
        var colorimeter = new Colorimeter(ColorSamples.Grid(360, 780, 5), light, StandardObserver.Cie1931TwoDegree, SummationStep.FiveNanometres);
        Assert.Equal(x, colorimeter.White.X, 0.02);
        Assert.Equal(100, colorimeter.White.Y, 1e-9);
        Assert.Equal(z, colorimeter.White.Z, 0.02);
    }
}
