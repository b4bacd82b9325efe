using BarbuleOptics.Vision;
using Xunit;

namespace BarbuleOptics.Tests.Vision;

/// <summary>The words for hues, by hand from their definition.</summary>
public sealed class BirdHueTests
{
    private static readonly string[] Names = ["ultraviolet", "short", "medium", "long"];

    [Theory]
    [InlineData("medium", false, 0.1, 0.2, 0.5, 0.2)]
    [InlineData("short-medium", false, 0.1, 0.36, 0.36, 0.18)]
    [InlineData("ultraviolet-long", true, 0.4, 0.1, 0.1, 0.4)]
    [InlineData("ultraviolet-medium", true, 0.38, 0.12, 0.36, 0.14)]
    [InlineData("short-medium-long", false, 0.04, 0.31, 0.33, 0.32)]
    [InlineData("ultraviolet-short-long", true, 0.32, 0.32, 0.03, 0.33)]
    [InlineData("long", true, 0.26, 0.13, 0.11, 0.5)]
    [InlineData("achromatic", false, 0.26, 0.25, 0.24, 0.25)]
    public void A_color_is_named_by_the_cones_that_it_excites(string term, bool isNonspectral, params double[] relative)
        => Assert.Equal(new BirdHue(term, isNonspectral), BirdHue.Of(relative, Names));

    // Half of what the largest has above 1/4: 0.45 is 0.2 above, so that 0.35 is named and 0.3499 is not.
    [Fact]
    public void The_boundary_lies_half_way()
    {
        Assert.Equal("short-medium", BirdHue.Of([0.1, 0.45, 0.3501, 0.0999], Names).Term);
        Assert.Equal("short", BirdHue.Of([0.1, 0.45, 0.3499, 0.1001], Names).Term);
    }

    // Chroma of a catch raised by d in one cone and lowered alike in the others is d sqrt(...) = d: corners have 3/4 at d = 3/4.
    [Fact]
    public void Gray_ends_at_the_chroma_stated()
    {
        Assert.Equal(BirdHue.Achromatic, BirdHue.Of([0.25 + 0.0299, 0.25 - 0.0299 / 3, 0.25 - 0.0299 / 3, 0.25 - 0.0299 / 3], Names).Term);
        Assert.Equal("ultraviolet", BirdHue.Of([0.25 + 0.0301, 0.25 - 0.0301 / 3, 0.25 - 0.0301 / 3, 0.25 - 0.0301 / 3], Names).Term);
    }
}
