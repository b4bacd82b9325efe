using System.Numerics;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Tests.Multilayer;
using Xunit;

namespace BarbuleOptics.Tests.Published;

/// <summary>One film. Formula: Airy's sum over reflections, Born and Wolf, Principles of Optics, section 1.6, r = (r12 + r23 e)/(1 + r12 r23 e),
/// e = exp(2 i beta); section from memory.</summary>
public class AiryFilmTests
{
    // The film of a free keratin sheet at its brightest: ((1 - n^2)/(1 + n^2))^2. Born and Wolf, section 1.6; digits computed twice.
    [Fact]
    public void Free_film_is_brightest_at_a_quarter_wave()
    {
        var film = TestStack.OnIndex(1, 1, Film.OfIndex(1.55, 500 / 1.55 / 4));
        Assert.Equal(.169906, film.Solve(0, Polarizations.Unpolarized).Reflected, 5e-7);
        TestStack thinner = TestStack.OnIndex(1, 1, Film.OfIndex(1.55, 79));
        TestStack thicker = TestStack.OnIndex(1, 1, Film.OfIndex(1.55, 82));
        Assert.True(thinner.Solve(0, Polarizations.S).Reflected < .1699);
        Assert.True(thicker.Solve(0, Polarizations.S).Reflected < .1699);
    }

    // Digits computed from Airy's formula by two programs outside this project.
    [Theory]
    [InlineData(0, .1049395, .1049395)]
    [InlineData(30, .1143448, .0605071)]
    [InlineData(60, .2043911, .0030675)]
    public void Film_of_index_2_on_glass_matches_tabulated_values(double degrees, double s, double p)
    {
        var film = TestStack.OnIndex(1, 1.5, Film.OfIndex(2, .3 * 500));
        Assert.Equal(s, film.Solve(degrees, Polarizations.S).Reflected, 5.1e-8);
        Assert.Equal(p, film.Solve(degrees, Polarizations.P).Reflected, 5.1e-8);
    }

    // Errors found: below 2e-14, at 89 degrees.
    [Theory]
    [InlineData(1.0, 1.55, 0, 1.5, 210)]
    [InlineData(1.0, 1.75, .1, 1.55, 95)]
    [InlineData(1.33, 1.2, .01, 2.4, 700)]
    [InlineData(1.0, .05, 3.4, 1.5, 30)]
    public void Any_film_matches_Airys_formula(double n1, double n2, double k2, double n3, double thicknessNm)
    {
        TestStack film = TestStack.OnIndex(n1, n3, Film.OfIndex(new Complex(n2, k2), thicknessNm)).At(450);
        foreach (double degrees in new[] { 0.0, 20, 45, 70, 89 })
        {
            Assert.Equal(Airy(n1, new(n2, k2), n3, thicknessNm, degrees, isP: false), film.Solve(degrees, Polarizations.S).Reflected, 1e-13);
            Assert.Equal(Airy(n1, new(n2, k2), n3, thicknessNm, degrees, isP: true), film.Solve(degrees, Polarizations.P).Reflected, 1e-13);
        }
    }

    private static double Airy(Complex n1, Complex n2, Complex n3, double thicknessNm, double degrees, bool isP)
    {
        double sine = n1.Real * Math.Sin(double.DegreesToRadians(degrees));
        Complex c1 = Cosine(n1, sine), c2 = Cosine(n2, sine), c3 = Cosine(n3, sine);
        Complex r12 = isP ? (n2 * c1 - n1 * c2) / (n2 * c1 + n1 * c2) : (n1 * c1 - n2 * c2) / (n1 * c1 + n2 * c2);
        Complex r23 = isP ? (n3 * c2 - n2 * c3) / (n3 * c2 + n2 * c3) : (n2 * c2 - n3 * c3) / (n2 * c2 + n3 * c3);
        Complex turn = Complex.Exp(2 * Complex.ImaginaryOne * n2 * c2 * thicknessNm * 2 * Math.PI / 450);
        double r = Complex.Abs((r12 + r23 * turn) / (1 + r12 * r23 * turn));
        return r * r;
    }

    private static Complex Cosine(Complex n, double sine) => Complex.Sqrt(1 - sine * sine / (n * n));
}
