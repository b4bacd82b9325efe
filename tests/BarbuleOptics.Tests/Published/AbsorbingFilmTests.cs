using System.Numerics;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Tests.Multilayer;
using Xunit;

namespace BarbuleOptics.Tests.Published;

/// <summary>Films that absorb. Born and Wolf, Principles of Optics, section 14.4 (from memory): Airy's formula with complex indices;
/// digits computed from it by two programs outside this project.</summary>
public class AbsorbingFilmTests
{
    [Theory]
    [InlineData(0, Polarizations.S, .0966832, .5461275)]
    [InlineData(0, Polarizations.P, .0966832, .5461275)]
    [InlineData(45, Polarizations.S, .1694377, .4769923)]
    [InlineData(45, Polarizations.P, .0282393, .5599593)]
    public void Melanin_like_film_on_keratin_matches_tabulated_values(double degrees, Polarizations polarization, double r, double t)
    {
        Powers power = TestStack.OnIndex(1, 1.55, Film.OfIndex(new Complex(1.75, .1), 200)).At(500).Solve(degrees, polarization);
        Assert.Equal(r, power.Reflected, 5.1e-8);
        Assert.Equal(t, power.Transmitted, 5.1e-8);
        Assert.Equal(1 - r - t, power.Absorbed, 1.1e-7);
        Assert.Equal(power.Absorbed, Assert.Single(power.Films));
    }

    // Silver .05168 + 3.483i at 539.1 nm: Babar and Weaver 2015, Applied Optics 54, 477. R and T of 50 nm from Airy's formula.
    [Fact]
    public void Silver_film_on_glass_matches_tabulated_values()
    {
        Powers power = TestStack.OnIndex(1, 1.52, Film.OfIndex(new Complex(.05168, 3.483), 50)).At(539.1).Solve(0, Polarizations.Unpolarized);
        Assert.Equal(.956443, power.Reflected, 5.1e-7);
        Assert.Equal(.026458, power.Transmitted, 5.1e-7);
    }

    // The same silver in bulk: R .984384, Babar and Weaver 2015.
    [Fact]
    public void Bulk_silver_matches_published_reflectance()
        => Assert.Equal(.984384, TestStack.OnIndex(1, new Complex(.05168, 3.483)).At(539.1).Solve(0, Polarizations.P).Reflected, 1e-6);

    // Airy's formula for a dielectric film whose substrate is a metal; written out here with exp(2 i beta).
    [Theory]
    [InlineData(1.55, 0, 90)]
    [InlineData(1.7, .12, 150)]
    public void Film_on_metal_matches_Airys_formula(double n, double k, double thicknessNm)
    {
        Complex film = new(n, k), metal = new(.05168, 3.483);
        Complex r12 = (1 - film) / (1 + film), r23 = (film - metal) / (film + metal);
        Complex turn = Complex.Exp(4 * Math.PI * Complex.ImaginaryOne * film * thicknessNm / 539.1);
        double r = Complex.Abs((r12 + r23 * turn) / (1 + r12 * r23 * turn));
        Powers power = TestStack.OnIndex(1, metal, Film.OfIndex(film, thicknessNm)).At(539.1).Solve(0, Polarizations.Unpolarized);
        Assert.Equal(r * r, power.Reflected, 1e-14);
    }

    // Lambert's law: between equal media and without reflection to speak of, a film passes exp(-4 pi k d/l).
    // Hecht, Optics, section 4.8 (from memory). The reflection at either face is about (k/2n)^2 = 1e-11.
    [Fact]
    public void Weak_absorption_follows_Lamberts_law()
    {
        Powers power = TestStack.OnIndex(1.5, 1.5, Film.OfIndex(new Complex(1.5, 1e-5), 1e6)).At(500).Solve(0, Polarizations.S);
        Assert.Equal(Math.Exp(-4 * Math.PI * 1e-5 * 1e6 / 500), power.Transmitted, 5e-11);
        Assert.Equal(1 - power.Transmitted, power.Absorbed, 5e-11);
    }
}
