using BarbuleOptics.Multilayer;
using BarbuleOptics.Tests.Multilayer;
using Xunit;

namespace BarbuleOptics.Tests.Published;

/// <summary>Quarter-wave films and stacks. Born and Wolf, Principles of Optics, section 1.6; Macleod, Thin-Film Optical Filters;
/// Yeh, Optical Waves in Layered Media (sections from memory). Digits were computed twice outside this project, from the closed forms.</summary>
public class QuarterWaveTests
{
    private const double DesignNm = 500;

    // ((n0 ns - n1^2)/(n0 ns + n1^2))^2, Born and Wolf, section 1.6; the zero at n1 = sqrt(ns) as in Hecht, Optics, section 9.7.
    [Theory]
    [InlineData(1.38, 1.52, .012601)]
    [InlineData(1.38, 1.50, .014110)]
    [InlineData(1.2328828005937953, 1.52, 0)]
    public void Quarter_wave_film_matches_closed_form(double n1, double ns, double reflectance)
    {
        var film = TestStack.OnIndex(1, ns, Quarter(n1)).At(DesignNm);
        Assert.Equal(reflectance, film.Solve(0, Polarizations.Unpolarized).Reflected, 5e-7);
    }

    // air|(HL)^p H|1.52 with the indices of the classic zinc sulphide and cryolite table, Born and Wolf, section 1.6:
    // R = ((1 - Y)/(1 + Y))^2, Y = (nH/nL)^(2p) nH^2/ns.
    [Theory]
    [InlineData(1, .306470)]
    [InlineData(3, .672153)]
    [InlineData(5, .872432)]
    [InlineData(7, .954087)]
    [InlineData(9, .983938)]
    [InlineData(11, .994437)]
    [InlineData(13, .998080)]
    [InlineData(15, .999338)]
    [InlineData(17, .999772)]
    public void Quarter_wave_stack_matches_closed_form(int count, double reflectance)
    {
        Film[] films = [.. Enumerable.Range(0, count).Select(i => Quarter(i % 2 == 0 ? 2.3 : 1.35))];
        Powers power = TestStack.OnIndex(1, 1.52, films).At(DesignNm).Solve(0, Polarizations.Unpolarized);
        Assert.Equal(reflectance, power.Reflected, 5.1e-7);
        double y = Math.Pow(2.3 / 1.35, count - 1) * 2.3 * 2.3 / 1.52;
        Assert.Equal(Math.Pow((1 - y) / (1 + y), 2), power.Reflected, 1e-13);
    }

    // Melanin in keratin: tanh^2(p ln(nH/nL)), Yeh, Optical Waves in Layered Media, chapter 6 (from memory), for equal outer media.
    [Theory]
    [InlineData(5, .293627)]
    [InlineData(10, .701840)]
    public void Pairs_between_equal_media_match_the_hyperbolic_tangent(int pairs, double reflectance)
    {
        Film[] films = [.. Enumerable.Range(0, 2 * pairs).Select(i => Quarter(i % 2 == 0 ? 1.75 : 1.55))];
        double found = TestStack.OnIndex(1.55, 1.55, films).At(DesignNm).Solve(0, Polarizations.Unpolarized).Reflected;
        Assert.Equal(reflectance, found, 5.1e-7);
        Assert.Equal(Math.Pow(Math.Tanh(pairs * Math.Log(1.75 / 1.55)), 2), found, 1e-14);
    }

    // Half width of the stop band in units of the design frequency, (2/pi) asin((nH - nL)/(nH + nL)); Macleod, chapter 5 (from memory).
    // Inside it, R of N pairs tends to 1 exponentially; outside, R comes back to near 0 between fringes.
    [Theory]
    [InlineData(2.3, 1.35, .167626)]
    [InlineData(1.75, 1.55, .038607)]
    [InlineData(1.75, 1.0, .175851)]
    public void Stop_band_ends_where_the_closed_form_says(double high, double low, double halfWidth)
    {
        Film[] films = [.. Enumerable.Range(0, 6000).Select(i => Quarter(i % 2 == 0 ? high : low))];
        TestStack stack = TestStack.OnIndex(low, low, films);
        foreach (int side in new[] { -1, 1 })
        {
            double inside = 1 + side * (halfWidth - 2e-6);
            double least = 1;
            for (int i = 0; i < 40; i++)
                least = Math.Min(least, Reflectance(1 + side * (halfWidth + 2e-6 + i * 1e-6)));
            Assert.InRange(Reflectance(inside), .99, 1);
            Assert.InRange(least, 0, .9);
        }

        double Reflectance(double frequency) => stack.At(DesignNm / frequency).Solve(0, Polarizations.S).Reflected;
    }

    private static Film Quarter(double index) => Film.OfIndex(index, DesignNm / index / 4);
}
