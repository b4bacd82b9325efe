using System.Numerics;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Tests.Multilayer;
using Xunit;

namespace BarbuleOptics.Tests.Grating.Reference;

/// <summary>The second opinion itself against published gratings, films in closed form, and laws that hold for any grating.</summary>
public class PlainModalTests
{
    private const double WavelengthNm = 500;

    // Error found: below 1e-13.
    [Fact]
    public void Films_match_the_closed_form_at_any_azimuth()
    {
        var random = new Random(41);
        for (int i = 0; i < 20; i++)
        {
            Complex[] indices = [.. Enumerable.Range(0, 3).Select(_ => new Complex(1 + random.NextDouble(), i % 2 * random.NextDouble() / 3))];
            double thicknessNm = 200 * random.NextDouble(), otherNm = 200 * random.NextDouble(), degrees = 85 * random.NextDouble();
            TestStack films = TestStack.OnIndex(1.2, indices[2], Film.OfIndex(indices[0], thicknessNm), Film.OfIndex(indices[1], otherNm)).At(WavelengthNm);
            var grating = new PlainGrating(
                170, 1.2, [new PlainSlice(thicknessNm, indices[0] * indices[0]), new PlainSlice(otherNm, indices[1] * indices[1])], indices[2] * indices[2]);
            foreach ((bool isP, double axis) in new[] { (false, 0.0), (true, 0.0), (false, 33), (true, 33), (false, 90), (true, 90) })
            {
                Powers expected = films.Solve(degrees, isP ? Polarizations.P : Polarizations.S);
                PlainAnswer found = PlainModalSolver.Solve(grating, new PlainLight(WavelengthNm, degrees, isP, axis), 1, keepBoth: true);
                Assert.Equal(expected.Reflected, found.Specular, 1e-12);
                Assert.Equal(expected.Transmitted, found.TotalTransmitted, 1e-12);
            }
        }
    }

    // Lamellar metal, 0.22 + 6.71i, period = depth = wavelength, fill 1/2, 30 degrees. Geometry: Li and Haggans 1993,
    // J. Opt. Soc. Am. A 10:1184, 10.1364/JOSAA.10.001184; Granet and Guizal 1996, J. Opt. Soc. Am. A 13:1019, 10.1364/JOSAA.13.001019.
    // R-1 .7342789 from memory of these, R0 computed twice by independent methods. The error falls like N^-3: extrapolated
    // from N and 2 N it is 5e-5.
    [Fact]
    public void Metal_lamellae_in_s_match_published_values()
    {
        PlainAnswer coarse = Metal(false, 20), fine = Metal(false, 40);
        Assert.Equal(.7342789, fine.ReflectedInto(-1) + (fine.ReflectedInto(-1) - coarse.ReflectedInto(-1)) / 7, 1e-4);
        Assert.Equal(.131709, fine.Specular + (fine.Specular - coarse.Specular) / 7, 1e-4);
    }

    // The same in p: how a right Fourier modal code nears .84848, to the digits given. Computed twice by independent methods.
    [Theory]
    [InlineData(10, .84211)]
    [InlineData(20, .84425)]
    [InlineData(40, .84677)]
    public void Metal_lamellae_in_p_converge_as_a_right_code_does(int harmonics, double reflectance)
        => Assert.Equal(reflectance, Metal(true, harmonics).Specular, 6e-6);

    // Ridge 2.3 on 1.5, d .6, h .3 wavelengths, fill 1/2, 20 degrees; ridge 2.04 on 2.04, d = h = wavelength, 10 degrees. Computed
    // twice by independent methods, digits stable between 40 and 60 harmonics. Differences found: 1.02e-5 in s, 2.3e-5 in p.
    [Theory]
    [InlineData(false, 2e-5, .1602628, .2753499, .5643874, .0388909, .0047093, .0298891, .1518922, .6550642, .1195543)]
    [InlineData(true, 3e-5, .03333, .29697, .66970, .007468, .04980, .03747, .35106, .53977, .01444)]
    public void Dielectric_lamellae_match_tabulated_values(bool isP, double tolerance, params double[] expected)
    {
        PlainAnswer first = PlainModalSolver.Solve(Lamellae(.6, .3, 2.3, 1.5), new PlainLight(WavelengthNm, 20, isP), 40);
        PlainAnswer second = PlainModalSolver.Solve(Lamellae(1, 1, 2.04, 2.04), new PlainLight(WavelengthNm, 10, isP), 40);
        double[] found =
        [
            first.Specular, first.TransmittedInto(-1), first.TransmittedInto(0),
            second.ReflectedInto(-1), second.Specular, .. Enumerable.Range(-2, 4).Select(second.TransmittedInto),
        ];
        for (int i = 0; i < expected.Length; i++)
            Assert.Equal(expected[i], found[i], tolerance);
    }

    // Poynting's theorem; a truncated modal expansion keeps it. Found: 2e-14.
    [Fact]
    public void Lossless_gratings_keep_their_energy_at_any_azimuth()
    {
        var random = new Random(43);
        for (int i = 0; i < 12; i++)
        {
            PlainGrating grating = Random(random);
            var light = new PlainLight(WavelengthNm, 80 * random.NextDouble(), i % 2 == 0, i % 3 * 45 * random.NextDouble());
            PlainAnswer answer = PlainModalSolver.Solve(grating, light, 6);
            Assert.Equal(1, answer.TotalReflected + answer.TotalTransmitted, 1e-12);
        }
    }

    // The coupled equations become the two planar ones as the wave vector along the rods vanishes; the change is of second order in it
    // for powers, by the mirror y to -y. Found: 1e-14 at zero, 2e-7 at 0.1 degree.
    [Fact]
    public void Coupled_fields_go_over_into_planar_ones()
    {
        PlainGrating grating = Random(new Random(44));
        foreach (bool isP in new[] { false, true })
        {
            var light = new PlainLight(WavelengthNm, 35, isP);
            PlainAnswer planar = PlainModalSolver.Solve(grating, light, 6);
            AssertSame(planar, PlainModalSolver.Solve(grating, light, 6, keepBoth: true), 1e-12);
            AssertSame(planar, PlainModalSolver.Solve(grating, light with { AxisDeg = .1 }, 6), 1e-5);
        }
    }

    // At normal incidence rods across the plane of incidence in s and rods along it in p are one and the same light. Found: 4e-16.
    [Fact]
    public void Turning_the_rods_swaps_polarizations_at_normal_incidence()
    {
        PlainGrating grating = Random(new Random(45));
        foreach (bool isP in new[] { false, true })
        {
            PlainAnswer across = PlainModalSolver.Solve(grating, new PlainLight(WavelengthNm, 0, isP), 6);
            AssertSame(across, PlainModalSolver.Solve(grating, new PlainLight(WavelengthNm, 0, !isP, 90), 6, keepBoth: true), 1e-12);
        }
    }

    // The Fourier coefficients of a stretch wrap around the period: where it begins changes nothing but phases. Found: 1e-14.
    [Fact]
    public void Shifting_the_whole_grating_changes_no_power()
    {
        PlainSlice here = new(90, [.5, 1], [4, 1]), shifted = new(90, [.25, .75, 1], [4, 1, 4]);
        foreach (double axis in new[] { 0.0, 40 })
        {
            var light = new PlainLight(WavelengthNm, 30, true, axis);
            AssertSame(
                PlainModalSolver.Solve(new PlainGrating(600, 1, [here], 2.25), light, 6),
                PlainModalSolver.Solve(new PlainGrating(600, 1, [shifted], 2.25), light, 6), 1e-12);
        }
    }

    private static PlainAnswer Metal(bool isP, int harmonics)
    {
        var index = new Complex(.22, 6.71);
        return PlainModalSolver.Solve(Lamellae(1, 1, index, index), new PlainLight(WavelengthNm, 30, isP), harmonics);
    }

    private static PlainGrating Lamellae(double period, double depth, Complex ridge, Complex backing)
        => new(period * WavelengthNm, 1, [new PlainSlice(depth * WavelengthNm, [.5, 1], [ridge * ridge, 1])], backing * backing);

    private static PlainGrating Random(Random random)
    {
        var slices = new PlainSlice[3];
        for (int i = 0; i < slices.Length; i++)
        {
            double from = .4 * random.NextDouble(), to = .5 + .4 * random.NextDouble();
            slices[i] = new PlainSlice(150 * random.NextDouble(), [from, to, 1], [1 + random.NextDouble(), 2 + 2 * random.NextDouble(), 1.5]);
        }
        return new PlainGrating(700, 1, slices, 2.4);
    }

    private static void AssertSame(PlainAnswer expected, PlainAnswer found, double tolerance)
    {
        for (int i = 0; i < expected.Reflected.Length; i++)
        {
            Assert.Equal(expected.Reflected[i], found.Reflected[i], tolerance);
            Assert.Equal(expected.Transmitted[i], found.Transmitted[i], tolerance);
        }
    }
}
