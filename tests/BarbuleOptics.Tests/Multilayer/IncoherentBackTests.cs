using System.Numerics;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;
using Xunit;

namespace BarbuleOptics.Tests.Multilayer;

/// <summary>The averaged slab against the mean of coherent slabs, and against closed forms.</summary>
public class IncoherentBackTests
{
    private static readonly Film[] Absorbing =
    [
        Film.OfIndex(new(1.75, .1), 120),
        new(new(new(2.5, .02), new(2.7, .1), new(2.2, .05)), 90),
        Film.OfIndex(new(.3, 2.5), 12),
    ];

    private static readonly Film[] Lossless = [Film.OfIndex(1.9, 110), Film.OfIndex(1.4, 130)];

    // Equal phases over one fringe give the mean of a periodic analytic function to rounding. Errors found: below 3e-15.
    [Theory]
    [InlineData(0)]
    [InlineData(35)]
    [InlineData(60)]
    [InlineData(85)]
    public void Lossless_slab_is_the_mean_over_thickness(double degrees)
    {
        foreach (Film[] films in (Film[][])[[], Lossless, Absorbing])
        {
            foreach (Complex behind in (Complex[])[1, 2.89, new(-9, 1.2), new(3, .5)])
            {
                var stack = new TestStack(1, films, 1.55 * 1.55) { SlabThicknessNm = 5000, Behind = behind, WavelengthNm = 520 };
                AssertMean(stack, degrees, samples: 400, 1e-13);
            }
        }
    }

    // The slab's decay changes a little over one fringe, so that the mean over thickness differs in second order. Errors found: below 3e-9.
    [Theory]
    [InlineData(0)]
    [InlineData(35)]
    [InlineData(75)]
    public void Slightly_absorbing_slab_is_the_mean_over_thickness(double degrees)
    {
        foreach (Film[] films in (Film[][])[[], Lossless, Absorbing])
        {
            var slab = new Complex(1.55, 2e-5);
            var stack = new TestStack(1, films, slab * slab) { SlabThicknessNm = 30_000, Behind = 1, WavelengthNm = 520 };
            AssertMean(stack, degrees, samples: 200, 1e-8);
        }
    }

    // The loss of a slab that absorbs well, from the phases of the round trip at a fixed decay: r = r_f + t t' q x/(1 - r' q x).
    // Source: the geometric series of Born and Wolf, Principles of Optics, section 7.6 (from memory). One film, so that r_f, t, r', t' are Airy's.
    [Theory]
    [InlineData(.01, 3000, 0, false)]
    [InlineData(.01, 3000, 50, false)]
    [InlineData(.01, 3000, 50, true)]
    [InlineData(.2, 400, 70, true)]
    [InlineData(.2, 400, 70, false)]
    public void Absorbing_slab_is_the_mean_over_the_round_trip(double k, double slabNm, double degrees, bool isP)
    {
        Complex film = new(1.8, .05), slab = new(1.5, k), behind = new(1.1, .3);
        TestStack stack = TestStack.OnIndex(1.2, slab, Film.OfIndex(film, 140)).At(450);
        stack = stack with { SlabThicknessNm = slabNm, Behind = behind * behind };
        Powers found = stack.Solve(degrees, isP ? Polarizations.P : Polarizations.S);

        double k0 = 2 * Math.PI / 450, lateral = 1.2 * Math.Sin(double.DegreesToRadians(degrees));
        Complex[] kz = [.. ((Complex[])[1.2, film, slab, behind]).Select(n => Complex.Sqrt(n * n - lateral * lateral))];
        Complex[] y = [.. ((Complex[])[1.2, film, slab, behind]).Select((n, i) => isP ? kz[i] / (n * n) : kz[i])];
        Complex turn = Complex.Exp(Complex.ImaginaryOne * kz[1] * k0 * 140);
        Complex r12 = R(y[0], y[1]), r23 = R(y[1], y[2]), loop = 1 + r12 * r23 * turn * turn;
        Complex down = (r12 + r23 * turn * turn) / loop, up = (-r23 - r12 * turn * turn) / loop;
        Complex through = (1 + r12) * (1 + r23) * turn / loop, back = (1 - r23) * (1 - r12) * turn / loop;
        Complex far = R(y[2], y[3]);
        double decay = Math.Exp(-2 * kz[2].Imaginary * k0 * slabNm);
        double reflected = 0, transmitted = 0;
        const int Phases = 256;
        for (int i = 0; i < Phases; i++)
        {
            Complex q = far * decay * Complex.FromPolarCoordinates(1, 2 * Math.PI * i / Phases);
            Complex inside = through / (1 - up * q);
            reflected += Square(down + back * q * inside) / Phases;
            transmitted += Square(inside * (1 + far)) * decay * y[3].Real / y[0].Real / Phases;
        }
        Assert.Equal(reflected, found.Reflected, 1e-13);
        Assert.Equal(transmitted, found.Transmitted, 1e-13);
        Assert.Equal(1 - reflected - transmitted, found.Absorbed, 1e-13);

        static Complex R(Complex a, Complex b) => (a - b) / (a + b);
        static double Square(Complex value) => value.Real * value.Real + value.Imaginary * value.Imaginary;
    }

    // A sheet whose two faces add incoherently: R = 2 r/(1 + r), T = (1 - r)/(1 + r) with r one face's reflectance.
    // Stokes's pile of plates, Stokes 1862, Proc. R. Soc. 11, 545 (from memory).
    [Theory]
    [InlineData(Polarizations.S, 0)]
    [InlineData(Polarizations.S, 60)]
    [InlineData(Polarizations.P, 60)]
    [InlineData(Polarizations.P, 80)]
    public void Bare_sheet_matches_Stokes(Polarizations polarization, double degrees)
    {
        double face = TestStack.OnIndex(1, 1.55).Solve(degrees, polarization).Reflected;
        Powers sheet = (TestStack.OnIndex(1, 1.55) with { SlabThicknessNm = 2000 }).Solve(degrees, polarization);
        Assert.Equal(2 * face / (1 + face), sheet.Reflected, 1e-14);
        Assert.Equal((1 - face) / (1 + face), sheet.Transmitted, 1e-14);
        Assert.Equal(0, sheet.Absorbed);
    }

    // What cannot be told from a half-space is one: nothing comes back from behind a slab that absorbs all.
    [Fact]
    public void A_thick_absorbing_slab_is_a_half_space()
    {
        TestStack halfSpace = TestStack.OnIndex(1, new(1.6, .5), Absorbing);
        TestStack slab = halfSpace with { SlabThicknessNm = 20_000, Behind = new(-20, 1) };
        Powers open = halfSpace.Solve(40, Polarizations.P), closed = slab.Solve(40, Polarizations.P);
        Assert.Equal(open.Reflected, closed.Reflected, 1e-15);
        Assert.Equal(open.Transmitted + open.Absorbed, closed.Absorbed, 1e-14);
        Assert.Equal(0, closed.Transmitted, 1e-15);
        Assert.Equal(open.Films[1], closed.Films[1], 1e-15);
    }

    // Total reflection at the slab: it is a barrier with no phase, and is solved as a film.
    [Theory]
    [InlineData(1.0, 0, 300)]
    [InlineData(1.0, 1e-3, 300)]
    [InlineData(.05, 3.4, 20)] // a metal foil
    [InlineData(1.5, .1, 40)] // absorbing, thinner than a radian
    public void A_slab_without_a_fringe_is_solved_as_a_film(double n, double k, double thicknessNm)
    {
        var slab = new Complex(n, k);
        TestStack averaged = TestStack.OnIndex(1.5, slab, Absorbing) with { SlabThicknessNm = thicknessNm, Behind = 2.25 };
        TestStack film = TestStack.OnIndex(1.5, 1.5, [.. Absorbing, Film.OfIndex(slab, thicknessNm)]);
        foreach (Polarizations polarization in (Polarizations[])[Polarizations.S, Polarizations.P])
        {
            Powers expected = film.Solve(50, polarization), found = averaged.Solve(50, polarization);
            Assert.Equal(expected.Reflected, found.Reflected, 1e-15);
            Assert.Equal(expected.Transmitted, found.Transmitted, 1e-15);
            Assert.Equal(expected.Absorbed, found.Absorbed, 1e-15);
            Assert.Equal(expected.Films[..3], found.Films);
        }
    }

    // Whether fringes are averaged must not depend on how many fit: between one wavelength and the next that would be a step.
    [Fact]
    public void A_spectrum_has_no_step_where_the_first_fringe_begins_to_fit()
    {
        TestStack stack = TestStack.OnIndex(1, 1.55, Lossless) with { SlabThicknessNm = 190 };
        double fringeEndsNm = 2 * 1.55 * 190;
        double below = stack.At(fringeEndsNm - .01).Solve(0, Polarizations.S).Reflected, above = stack.At(fringeEndsNm + .01).Solve(0, Polarizations.S).Reflected;
        // 0.02 nm apart; found 1.8e-5.
        Assert.Equal(below, above, 1e-4);
        TestStack film = TestStack.OnIndex(1, 1, [.. Lossless, Film.OfIndex(1.55, 190)]).At(fringeEndsNm);
        Assert.True(Math.Abs(film.Solve(0, Polarizations.S).Reflected - below) > 1e-3);
    }

    // The loss in each film adds to the loss in the slab; a lossless slab loses nothing.
    [Fact]
    public void Films_lose_all_that_is_lost_over_a_lossless_slab()
    {
        TestStack stack = TestStack.OnIndex(1, 1.55, Absorbing) with { SlabThicknessNm = 3000 };
        Powers power = stack.Solve(30, Polarizations.Unpolarized);
        Assert.Equal(power.Absorbed, power.Films.Sum(), 1e-15);
        Assert.All(power.Films, share => Assert.True(share > .001));
    }

    private static void AssertMean(TestStack stack, double degrees, int samples, double tolerance)
    {
        Complex slab = Complex.Sqrt(stack.Backing);
        double lateral = stack.SurroundIndex * Math.Sin(double.DegreesToRadians(degrees));
        double fringe = stack.WavelengthNm / 2 / Complex.Sqrt(stack.Backing - lateral * lateral).Real;
        foreach (Polarizations polarization in (Polarizations[])[Polarizations.S, Polarizations.P])
        {
            double[] mean = new double[3 + stack.Films.Count];
            for (int i = 1 - samples; i < samples; i++)
            {
                // The mean of the means over one fringe that hold this thickness: no phase is favored at the thin or the thick end.
                double weight = (1 - Math.Abs((double)i / samples)) / samples;
                double thickness = stack.SlabThicknessNm!.Value + (double)i / samples * fringe;
                TestStack one = stack with { Films = [.. stack.Films, Film.OfIndex(slab, thickness)], Backing = stack.Behind, SlabThicknessNm = null };
                Powers power = one.Solve(degrees, polarization);
                double[] values = [power.Reflected, power.Transmitted, power.Absorbed, .. power.Films[..^1]];
                for (int v = 0; v < mean.Length; v++)
                    mean[v] += values[v] * weight;
            }
            Powers found = stack.Solve(degrees, polarization);
            double[] averaged = [found.Reflected, found.Transmitted, found.Absorbed, .. found.Films];
            for (int v = 0; v < mean.Length; v++)
                Assert.Equal(mean[v], averaged[v], tolerance);
        }
    }
}
