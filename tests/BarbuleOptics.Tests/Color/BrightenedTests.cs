using BarbuleOptics.Color;
using Xunit;

namespace BarbuleOptics.Tests.Color;

/// <summary>Swatches at a lightness that a screen shows well.</summary>
public sealed class BrightenedTests
{
    private static readonly Tristimulus White = new(95.047, 100, 108.883);

    // One chromaticity has one swatch, from near black to beyond white, where a signal against a matt white may lie; in between it stays as it is.
    [Theory]
    [InlineData(0.02)]
    [InlineData(4)]
    [InlineData(40)]
    public void Dark_colors_and_those_beyond_white_come_to_the_same_lightness(double factor)
    {
        // Y = 28.123 is L* 60: ((60 + 16)/116)^3 x 100, CIE 15.
        var color = new Tristimulus(26, 28.123, 40);
        Assert.Equal(SrgbEncoder.Encode(color, White, out _), SrgbEncoder.EncodeBrightened(color.Scale(factor), White));
    }

    [Fact]
    public void A_light_color_stays_as_it_is()
    {
        var color = new Tristimulus(60, 65, 80);
        Assert.Equal(SrgbEncoder.Encode(color, White, out _), SrgbEncoder.EncodeBrightened(color, White));
    }
}
