using System.Numerics;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;
using Xunit;

namespace BarbuleOptics.Tests.Multilayer;

/// <summary>Where a plainer method loses its digits: guided resonances, a wave that neither travels nor decays, thick absorbers.</summary>
public class HardFilmTests
{
    private const double Tolerance = 1e-12;

    // A sheet between two gaps too wide to tunnel through in general: light enters by its guided modes alone, in lines far narrower than
    // any grid: at 1500 nm, in s, 1e-10 degrees to either side.
    [Theory]
    [InlineData(300, 0)]
    [InlineData(600, 0)]
    [InlineData(1000, 0)]
    [InlineData(1500, 0)]
    [InlineData(600, 1e-5)]
    [InlineData(1000, 1e-8)]
    [InlineData(1500, 1e-12)]
    public void Power_balances_through_a_guided_resonance(double gapNm, double k)
    {
        TestStack guide = TestStack.OnIndex(1.6, 1.6, Film.OfIndex(1, gapNm), Film.OfIndex(new Complex(1.5, k), 400), Film.OfIndex(1, gapNm));
        foreach (Polarizations polarization in (Polarizations[])[Polarizations.S, Polarizations.P])
        {
            double line = FindLine(guide, polarization);
            double brightest = 0;
            for (int i = -300; i <= 300; i++)
            {
                // From the last digit of the angle outward to 1e-3 degrees.
                double off = Math.Sign(i) * 1e-14 * Math.Pow(10, Math.Abs(i) / 27.0);
                Powers power = guide.Solve(line + off, polarization);
                Assert.InRange(power.Gap, 0, Tolerance);
                brightest = Math.Max(brightest, power.Transmitted + power.Absorbed);
            }
            Assert.InRange(brightest, .4, 1);
        }
    }

    // A silver film under a prism: the surface plasmon takes nearly all (Kretschmann and Raether 1968; that it nearly does
    // at some 50 nm is common practice, no source). Surface waves sit on one face of the film only.
    [Fact]
    public void Power_balances_through_a_surface_plasmon()
    {
        TestStack prism = TestStack.OnIndex(1.52, 1, Film.OfIndex(new(.05, 4.2), 52)).At(633);
        double least = 1;
        for (double degrees = 40; degrees < 50; degrees += .01)
        {
            Powers power = prism.Solve(degrees, Polarizations.P);
            Assert.InRange(power.Gap, 0, Tolerance);
            least = Math.Min(least, power.Reflected);
        }
        Assert.InRange(least, 0, .1);
    }

    // At kz = 0 the field in the film is linear in depth. Known solution in s between equal media: the film's matrix is (1, -i k0 d; 0, 1), so
    // T = 1/(1 + (k0 d n cos/2)^2), from continuity of Ey and Hx.
    [Theory]
    [InlineData(10)]
    [InlineData(500)]
    [InlineData(50_000)]
    public void A_film_at_its_critical_angle_matches_the_linear_field(double thicknessNm)
    {
        double degrees = 30;
        double lateral = 1.5 * Math.Sin(double.DegreesToRadians(degrees));
        double eta = 1.5 * Math.Cos(double.DegreesToRadians(degrees));
        double half = Math.PI / 500 * thicknessNm * eta;
        TestStack stack = TestStack.OnIndex(1.5, 1.5, Film.OfIndex(lateral, thicknessNm)).At(500);
        Assert.Equal(1 / (1 + half * half), stack.Solve(degrees, Polarizations.S).Transmitted, 1e-14);
    }

    // kz = 0 to the last digit, where eta is 0 too; the second method has no kz in a film. Errors found: below 1e-15.
    [Theory]
    [InlineData(0)]
    [InlineData(.3)]
    public void A_film_exactly_at_its_critical_angle_matches_the_matrix_exponential(double loss)
    {
        double sine = Math.Sin(double.DegreesToRadians(30));
        double critical = 1.5 * 1.5 * (sine * sine);
        Film[] films =
        [
            Film.OfIndex(new(1.7, .1), 90),
            new(new(new(2.2, loss), critical, critical), 200), // s: ey = K^2; p: ez = K^2, ex free
            Film.OfIndex(1.4, 60),
        ];
        TestStack stack = TestStack.OnIndex(1.5, 1.6, films);
        var second = new MaxwellMatrix(stack, 30);
        AssertSame(second.Solve(isP: false), stack.Solve(30, Polarizations.S));
        AssertSame(second.Solve(isP: true), stack.Solve(30, Polarizations.P));

        static void AssertSame(Powers expected, Powers found)
        {
            Assert.Equal(expected.Reflected, found.Reflected, 1e-13);
            Assert.Equal(expected.Transmitted, found.Transmitted, 1e-13);
            Assert.Equal(expected.Films[1], found.Films[1], 1e-13);
            Assert.InRange(found.Gap, 0, Tolerance);
        }
    }

    // On both sides of kz = 0, from exactly 0 to where it is plain, with and without absorption.
    [Theory]
    [InlineData(0)]
    [InlineData(1e-14)]
    [InlineData(1e-8)]
    [InlineData(1e-3)]
    public void Power_balances_where_a_wave_neither_travels_nor_decays(double loss)
    {
        double lateralSquared = 1.5 * 1.5 / 4;
        for (int exponent = -17; exponent <= -1; exponent++)
        {
            foreach (int sign in (int[])[-1, 0, 1])
            {
                var critical = new Complex(lateralSquared + sign * Math.Pow(10, exponent), loss);
                Film[] films =
                [
                    Film.OfIndex(new(1.7, loss), 90),
                    new(DiagonalPermittivity.Isotropic(critical), 30_000),
                    new(new(2.2, critical, critical), 300),
                ];
                TestStack stack = TestStack.OnIndex(1.5, 1.4, films);
                Assert.InRange(stack.Solve(30, Polarizations.S).Gap, 0, Tolerance);
                Assert.InRange(stack.Solve(30, Polarizations.P).Gap, 0, Tolerance);
            }
        }
    }

    // Nothing a wave carries survives these; 1e9 nm is a metre.
    [Theory]
    [InlineData(1e5)]
    [InlineData(1e9)]
    [InlineData(1e15)]
    public void Thick_absorbers_stay_finite(double thicknessNm)
    {
        TestStack stack = TestStack.OnIndex(
            1, 1.5, Film.OfIndex(new(1.75, 10), thicknessNm), Film.OfIndex(1.5, thicknessNm), Film.OfIndex(new(1.6, 1e-3), thicknessNm));
        foreach (double degrees in (double[])[0, 60, 89.9])
        {
            Powers power = stack.Solve(degrees, Polarizations.Unpolarized);
            Assert.InRange(power.Gap, 0, Tolerance);
            Assert.Equal(0, power.Transmitted);
            Assert.Equal(0, power.Films[2]);
        }
    }

    // Toward the light the fields grow by nH/nL at every second film, to 1e110 here, and are brought back on the way, sooner or later in
    // the stack by its number of films. Beyond some fifty films more of them change nothing, for little light gets there.
    [Fact]
    public void A_reflector_of_any_number_of_films_balances()
    {
        Film high = Film.OfIndex(new(2.3, 1e-3), 500 / 2.3 / 4), low = Film.OfIndex(new(1.35, 1e-3), 500 / 1.35 / 4);
        Film[] films = [.. Enumerable.Range(0, 950).Select(i => i % 2 == 0 ? high : low)];
        double limit = TestStack.OnIndex(1, 1.52, films[..101]).Solve(0, Polarizations.S).Reflected;
        for (int count = 1; count <= films.Length; count += count < 300 ? 1 : 31)
        {
            Powers power = TestStack.OnIndex(1, 1.52, films[..count]).Solve(0, Polarizations.S);
            Assert.InRange(power.Gap, 0, Tolerance);
            if (count > 100)
                Assert.Equal(limit, power.Reflected, 1e-14);
        }
    }

    // A thousand evanescent gaps: fields grow by e^2000 on the way up unless they are kept in bounds.
    [Fact]
    public void Many_evanescent_films_stay_finite()
    {
        Film[] films = [.. Enumerable.Range(0, 2000).Select(i => Film.OfIndex(i % 2 == 0 ? 1 : 1.45, 150))];
        Powers power = TestStack.OnIndex(1.6, 1.6, films).Solve(75, Polarizations.S);
        Assert.Equal(1, power.Reflected, 1e-15);
        Assert.Equal(0, power.Transmitted);
    }

    private static double FindLine(TestStack guide, Polarizations polarization)
    {
        // Beside the line what passes falls as 1/detuning^2, so that the largest sample points to it and the interval can shrink round it.
        double from = 45, to = 65;
        for (int round = 0; round < 12; round++)
        {
            double best = -1, at = from;
            double step = (to - from) / 2000;
            for (int i = 0; i <= 2000; i++)
            {
                Powers power = guide.Solve(from + i * step, polarization);
                if (power.Transmitted + power.Absorbed > best)
                    (best, at) = (power.Transmitted + power.Absorbed, from + i * step);
            }
            (from, to) = (at - 2 * step, at + 2 * step);
        }
        return (from + to) / 2;
    }
}
