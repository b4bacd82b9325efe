using System.Numerics;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;
using Xunit;

namespace BarbuleOptics.Tests.Multilayer;

/// <summary>What must hold for every stack, whatever its numbers.</summary>
public class FilmIdentityTests
{
    private const int Count = 3000;

    // Errors found: below 4e-14 (thick films, whose phase is rounded film by film).
    [Fact]
    public void Splitting_a_film_in_two_changes_nothing()
    {
        var random = new Random(11);
        ForEach(seed: 1, (stack, degrees, polarization) =>
        {
            int at = random.Next(stack.Films.Count);
            Film film = stack.Films[at];
            double upper = film.ThicknessNm * random.NextDouble();
            TestStack split = stack with
            {
                Films =
                [
                    .. stack.Films.Take(at),
                    film with { ThicknessNm = upper },
                    film with { ThicknessNm = film.ThicknessNm - upper },
                    .. stack.Films.Skip(at + 1),
                ],
            };
            Powers whole = stack.Solve(degrees, polarization);
            Powers parts = split.Solve(degrees, polarization);
            AssertSame(whole, parts, 1e-12);
            Assert.Equal(whole.Films[at], parts.Films[at] + parts.Films[at + 1], 1e-12);
        });
    }

    [Fact]
    public void A_film_of_no_thickness_changes_nothing()
    {
        var random = new Random(12);
        ForEach(seed: 2, (stack, degrees, polarization) =>
        {
            int at = random.Next(stack.Films.Count + 1);
            var nothing = new Film(new(new(-3, .4), new(2, 1), new(-1, 0)), 0);
            TestStack longer = stack with { Films = [.. stack.Films.Take(at), nothing, .. stack.Films.Skip(at)] };
            Powers found = longer.Solve(degrees, polarization);
            AssertSame(stack.Solve(degrees, polarization), found, 0);
            Assert.Equal(0, found.Films[at]);
        });
    }

    // A film like the surround or like the backing moves a face, no more.
    [Fact]
    public void A_film_like_the_medium_around_it_changes_no_power()
    {
        Film[] films = [Film.OfIndex(new(1.7, .1), 120), Film.OfIndex(1.4, 90)];
        TestStack bare = TestStack.OnIndex(1.33, 1.6, films);
        TestStack clad = TestStack.OnIndex(1.33, 1.6, [Film.OfIndex(1.33, 777), .. films, Film.OfIndex(1.6, 555)]);
        foreach (Polarizations polarization in (Polarizations[])[Polarizations.S, Polarizations.P])
            AssertSame(bare.Solve(50, polarization), clad.Solve(50, polarization), 1e-14);
    }

    // Near grazing e - K^2 is a small difference: a millimetre of the surround in front must still be nothing. 1.5^2 is exact.
    [Fact]
    public void A_film_like_the_surround_changes_no_power_near_grazing_incidence()
    {
        Film[] films = [Film.OfIndex(new(1.7, .1), 120), Film.OfIndex(1.4, 90)];
        TestStack bare = TestStack.OnIndex(1.5, 1.6, films);
        TestStack clad = TestStack.OnIndex(1.5, 1.6, [Film.OfIndex(1.5, 1e6), .. films]);
        foreach (Polarizations polarization in (Polarizations[])[Polarizations.S, Polarizations.P])
            AssertSame(bare.Solve(89.9, polarization), clad.Solve(89.9, polarization), 1e-15);
    }

    // Helmholtz reciprocity, Born and Wolf, Principles of Optics (section from memory): T is the same both ways, absorbing or not.
    // Errors found: below 2e-13, from the two angles.
    [Fact]
    public void Transmittance_is_the_same_both_ways()
        => ForEach(seed: 3, (stack, degrees, polarization) =>
        {
            double lateral = stack.SurroundIndex * Math.Sin(double.DegreesToRadians(degrees));
            double far = lateral * 1.0001 + 1.1;
            double back = double.RadiansToDegrees(Math.Asin(lateral / far));
            TestStack forward = stack with { Backing = far * far };
            double near = stack.SurroundIndex;
            var reverse = new TestStack(far, [.. stack.Films.Reverse()], near * near) { WavelengthNm = stack.WavelengthNm };
            if (degrees < 89)
                Assert.Equal(forward.Solve(degrees, polarization).Transmitted, reverse.Solve(back, polarization).Transmitted, 5e-12);
        });

    [Fact]
    public void The_order_of_films_matters()
    {
        Film a = Film.OfIndex(new(1.8, .1), 100), b = Film.OfIndex(1.4, 130), c = Film.OfIndex(new(1.6, .3), 80);
        Powers abc = TestStack.OnIndex(1, 1.5, a, b, c).Solve(30, Polarizations.Unpolarized);
        Powers cba = TestStack.OnIndex(1, 1.5, c, b, a).Solve(30, Polarizations.Unpolarized);
        Assert.True(Math.Abs(abc.Reflected - cba.Reflected) > .01);
        Assert.True(Math.Abs(abc.Films[0] - cba.Films[2]) > .01);
    }

    // An absorbing film of 20 um between what is seen and what is not: exp(-4 pi k d/l) = exp(-151).
    [Theory]
    [InlineData(0)]
    [InlineData(80)]
    public void An_opaque_film_hides_what_lies_behind_it(double degrees)
    {
        Film[] seen = [Film.OfIndex(1.56, 180), Film.OfIndex(new(1.75, .3), 20_000)];
        TestStack bare = TestStack.OnIndex(1, 1.5, seen);
        TestStack hidden = TestStack.OnIndex(1, new(.05, 3.4), [.. seen, Film.OfIndex(2.3, 60), Film.OfIndex(new(1.2, 2), 70)]);
        foreach (Polarizations polarization in (Polarizations[])[Polarizations.S, Polarizations.P])
        {
            Powers without = bare.Solve(degrees, polarization);
            Powers with = hidden.Solve(degrees, polarization);
            Assert.Equal(without.Reflected, with.Reflected, 1e-15);
            Assert.Equal(without.Absorbed, with.Absorbed, 1e-15);
            Assert.InRange(with.Transmitted, 0, 1e-60);
        }
    }

    // Errors found: below 4e-14.
    [Fact]
    public void S_equals_p_at_normal_incidence_where_x_and_y_are_alike()
    {
        var random = new RandomStacks(5);
        for (int i = 0; i < Count; i++)
        {
            (TestStack stack, _) = random.Next();
            TestStack round = stack with
            {
                Films = [.. stack.Films.Select(f => f with { Permittivity = f.Permittivity with { Y = f.Permittivity.X } })],
            };
            AssertSame(round.Solve(0, Polarizations.S), round.Solve(0, Polarizations.P), 1e-12);
        }
    }

    [Fact]
    public void Unpolarized_is_the_mean_of_s_and_p()
    {
        TestStack stack = TestStack.OnIndex(1, 1.55, Film.OfIndex(new(1.75, .1), 200), Film.OfIndex(1.5, 100)) with { SlabThicknessNm = 4000 };
        Powers s = stack.Solve(55, Polarizations.S), p = stack.Solve(55, Polarizations.P), both = stack.Solve(55, Polarizations.Unpolarized);
        Assert.Equal((s.Reflected + p.Reflected) / 2, both.Reflected, 1e-16);
        Assert.Equal((s.Transmitted + p.Transmitted) / 2, both.Transmitted, 1e-16);
        Assert.Equal((s.Absorbed + p.Absorbed) / 2, both.Absorbed, 1e-16);
        Assert.Equal((s.Films[0] + p.Films[0]) / 2, both.Films[0], 1e-16);
    }

    // Lengths and wavelength scale together (Maxwell's equations have no length of their own).
    [Fact]
    public void Scaling_all_lengths_changes_nothing()
        => ForEach(seed: 6, (stack, degrees, polarization) =>
        {
            TestStack twice = stack with
            {
                WavelengthNm = 2 * stack.WavelengthNm,
                Films = [.. stack.Films.Select(f => f with { ThicknessNm = 2 * f.ThicknessNm })],
            };
            AssertSame(stack.Solve(degrees, polarization), twice.Solve(degrees, polarization), 1e-15);
        });

    private static void ForEach(int seed, Action<TestStack, double, Polarizations> check)
    {
        var random = new RandomStacks(seed);
        for (int i = 0; i < Count; i++)
        {
            (TestStack stack, double degrees) = random.Next();
            check(stack, degrees, i % 2 == 0 ? Polarizations.S : Polarizations.P);
        }
    }

    private static void AssertSame(Powers expected, Powers found, double tolerance)
    {
        Assert.Equal(expected.Reflected, found.Reflected, tolerance);
        Assert.Equal(expected.Transmitted, found.Transmitted, tolerance);
        Assert.Equal(expected.Absorbed, found.Absorbed, tolerance);
    }
}
