using BarbuleOptics.Color;
using Xunit;

namespace BarbuleOptics.Tests.Color;

/// <summary>Every color has exactly one term.</summary>
public sealed class HueTermsTests
{
    [Fact]
    public void Every_hue_angle_lies_in_exactly_one_sector()
    {
        for (int i = 0; i < 36_000; i++)
            Assert.Single(HueTerms.Sectors, sector => sector.Contains(i / 100.0));
    }

    [Fact]
    public void Sectors_are_half_open_and_join_into_a_circle()
    {
        for (int i = 0; i < HueTerms.Sectors.Count; i++)
        {
            HueSector sector = HueTerms.Sectors[i], next = HueTerms.Sectors[(i + 1) % HueTerms.Sectors.Count];
            Assert.Equal(sector.ToDegrees, next.FromDegrees);
            Assert.True(sector.Contains(sector.FromDegrees));
            Assert.False(sector.Contains(sector.ToDegrees));
            Assert.True(sector.Contains(Math.BitDecrement(sector.ToDegrees)));
        }
    }

    [Fact]
    public void Every_lightness_lies_in_exactly_one_band()
    {
        for (int i = -1000; i < 20_000; i++)
            Assert.Single(HueTerms.Achromatic, band => band.Contains(i / 100.0));
    }

    [Fact]
    public void Terms_are_unlike()
    {
        string[] terms = [.. HueTerms.Sectors.Select(static s => s.Term), .. HueTerms.Achromatic.Select(static b => b.Term)];
        Assert.Equal(terms.Length, terms.Distinct().Count());
    }

    [Theory]
    [InlineData(4.999, "gray")]
    [InlineData(5.0, "red-purple")]
    public void Hue_begins_at_the_chroma_limit(double chroma, string term) => Assert.Equal(term, HueTerms.Of(new CieLab(50, chroma, 0)));

    // 360 less the smallest number rounds to 360, which no sector may have to take.
    [Theory]
    [InlineData(50, -1e-300)]
    [InlineData(50, -1e-14)]
    [InlineData(50, -0.0)]
    [InlineData(-50, -0.0)]
    [InlineData(0, 0)]
    public void Hue_angle_is_never_360(double a, double b) => Assert.InRange(new CieLab(50, a, b).HueDegrees, 0, Math.BitDecrement(360.0));
}
