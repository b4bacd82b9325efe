using BarbuleOptics.Multilayer;
using BarbuleOptics.Tests.Multilayer;
using Xunit;

namespace BarbuleOptics.Tests.Published;

/// <summary>Tunnelling through an air gap between two prisms of index 1.5 at 45 degrees. Formula: Airy's with an imaginary angle,
/// Born and Wolf, Principles of Optics, section 1.5.4 (from memory); digits computed twice outside this project.</summary>
public class FrustratedReflectionTests
{
    [Theory]
    [InlineData(.10, .87769530, .94837732)]
    [InlineData(.25, .51321023, .72965255)]
    [InlineData(.50, .16421363, .33465677)]
    [InlineData(1.0, .01704718, .04251028)]
    public void Gap_between_prisms_matches_tabulated_values(double gapInWavelengths, double s, double p)
    {
        TestStack gap = TestStack.OnIndex(1.5, 1.5, Film.OfIndex(1, gapInWavelengths * 600)).At(600);
        Assert.Equal(s, gap.Solve(45, Polarizations.S).Transmitted, 5.1e-9);
        Assert.Equal(p, gap.Solve(45, Polarizations.P).Transmitted, 5.1e-9);
    }

    // Far apart T falls as exp(-4 pi d sqrt(n^2 sin^2 - 1)/l), from the same formula; nothing else remains.
    [Fact]
    public void Wide_gap_lets_an_exponentially_small_share_through()
    {
        double rate = 4 * Math.PI * Math.Sqrt(1.5 * 1.5 / 2 - 1);
        double near = Through(20), far = Through(60);
        Assert.Equal(40 * rate, Math.Log(near / far), 1e-11);

        static double Through(double wavelengths)
            => TestStack.OnIndex(1.5, 1.5, Film.OfIndex(1, wavelengths * 600)).At(600).Solve(45, Polarizations.S).Transmitted;
    }
}
