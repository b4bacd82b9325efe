using System.Numerics;
using BarbuleOptics.Grating;
using BarbuleOptics.Grating.Modal;
using BarbuleOptics.Tests.Grating.Modal;
using Xunit;

namespace BarbuleOptics.Tests.Published;

/// <summary>The Fourier modal slab against published gratings, and against values computed by independent methods.</summary>
public class ModalSlabTests
{
    // Lamellar metal grating, index 0.22 + 6.71 i, period = depth = wavelength, half filled, 30 degrees.
    // Geometry: Li & Haggans, J. Opt. Soc. Am. A 10, 1184 (1993); Granet & Guizal, J. Opt. Soc. Am. A 13, 1019 (1996).
    // In TM a Fourier series of -N..N converges slowly, and every right one through the same numbers; these were computed by an
    // independent method, as was the limit 0.84848. Tolerance: half a unit of the last digit given.
    [Theory]
    [InlineData(10, 0.84211)]
    [InlineData(20, 0.84425)]
    [InlineData(40, 0.84677)]
    public void Metal_grating_in_TM_converges_through_the_known_numbers(int harmonics, double specular)
    {
        Lamellar metal = new(new Complex(0.22, 6.71), new Complex(0.22, 6.71), 1, 1, 30, RodField.Magnetic);
        Assert.Equal(specular, metal.Solve(harmonics).Reflected(0), 5.1e-6);
    }

    // The same in TE: R-1 0.7342789 (from memory of the papers above, and computed twice by independent methods), R0 0.131709 (computed
    // twice). Measured at 40 harmonics: 6e-4; the error falls like N^-3.
    [Fact]
    public void Metal_grating_in_TE()
    {
        LamellarAnswer answer = new Lamellar(new Complex(0.22, 6.71), new Complex(0.22, 6.71), 1, 1, 30, RodField.Electric).Solve(40);
        Assert.Equal(0.7342789, answer.Reflected(-1), 8e-4);
        Assert.Equal(0.131709, answer.Reflected(0), 8e-4);
    }

    // Ridges of index 2.3 on 1.5, period 0.6, height 0.3 wavelengths, half filled, 20 degrees; computed twice by independent methods,
    // digits stable between 40 and 60 harmonics. Measured at 40 harmonics: 2e-6 (TE), 4e-5 (TM, which converges like N^-2).
    [Theory]
    [InlineData("Electric", 0.1602628, 0.2753499, 0.5643874, 3e-6)]
    [InlineData("Magnetic", 0.03333, 0.29697, 0.66970, 5e-5)]
    public void Dielectric_ridges(string field, double r0, double transmittedFirst, double t0, double tolerance)
    {
        LamellarAnswer answer = new Lamellar(2.3, 1.5, 0.6, 0.3, 20, Enum.Parse<RodField>(field)).Solve(40);
        Assert.Equal(r0, answer.Reflected(0), tolerance);
        Assert.Equal(transmittedFirst, answer.Transmitted(-1), tolerance);
        Assert.Equal(t0, answer.Transmitted(0), tolerance);
    }

    // Ridges and substrate of index 2.04, period = height = wavelength, half filled, 10 degrees; as above.
    // Measured at 40 harmonics: 1.0e-5 (TE), 8e-6 (TM).
    [Theory]
    [InlineData("Electric", 0.0388909, 0.0047093, 0.0298891, 0.1518922, 0.6550642, 0.1195543, 2e-5)]
    [InlineData("Magnetic", 0.007468, 0.04980, 0.03747, 0.35106, 0.53977, 0.01444, 2e-5)]
    public void Dielectric_ridges_with_many_orders(
        string field, double reflectedFirst, double r0, double transmittedSecond, double transmittedFirst, double t0, double t1, double tolerance)
    {
        LamellarAnswer answer = new Lamellar(2.04, 2.04, 1, 1, 10, Enum.Parse<RodField>(field)).Solve(40);
        Assert.Equal(reflectedFirst, answer.Reflected(-1), tolerance);
        Assert.Equal(r0, answer.Reflected(0), tolerance);
        Assert.Equal(transmittedSecond, answer.Transmitted(-2), tolerance);
        Assert.Equal(transmittedFirst, answer.Transmitted(-1), tolerance);
        Assert.Equal(t0, answer.Transmitted(0), tolerance);
        Assert.Equal(t1, answer.Transmitted(1), tolerance);
    }

    // One row of circular rods in their matrix; multipole expansion with lattice sums, computed by an independent method.
    // Contrast 2 : 1 far from the film picture, near a resonance in H: measured at 20 harmonics 7e-8, 6e-6, 8e-6, 2e-4.
    // Melanin in keratin: measured 2e-9, 2e-9 in R, 7e-8, 2e-7 in T.
    [Theory]
    [InlineData("Electric", 0, 0.0001069615, 3e-7)]
    [InlineData("Electric", 30, 0.1124952, 2e-5)]
    [InlineData("Magnetic", 0, 0.01200094, 2e-5)]
    [InlineData("Magnetic", 30, 0.5488832, 4e-4)]
    public void Circular_rods_in_air(string field, double degrees, double reflectance, double tolerance)
    {
        (double r, _) = Rods(Enum.Parse<RodField>(field), degrees, 1, 2, 0.3, 1, 1.7);
        Assert.Equal(reflectance, r, tolerance);
    }

    [Theory]
    [InlineData("Electric", 0.006600077, 0.8091244)]
    [InlineData("Magnetic", 0.006154916, 0.8254788)]
    public void Melanin_rods_in_keratin(string field, double reflectance, double transmittance)
    {
        (double r, double t) = Rods(Enum.Parse<RodField>(field), 0, 1.55, new Complex(1.75, 0.1), 60, 140, 500);
        Assert.Equal(reflectance, r, 5e-9);
        Assert.Equal(transmittance, t, 4e-7);
    }

    private static (double Reflectance, double Transmittance) Rods(
        RodField field, double degrees, double host, Complex rod, double radius, double period, double wavelength)
    {
        GratingWaves waves = ModalCase.Waves(field, host * Math.Sin(degrees * Math.PI / 180), 0, [host * host, rod * rod], 1, wavelength, period);
        ScatteringBlock block = ModalCase.Solve([ModalCase.Ellipse(2 * radius, 2 * radius).At(0.1 * period, radius)], waves, 20, 2, 2 * radius);
        return (Math.Pow(block.ReflectTop[1, 1].Magnitude, 2), Math.Pow(block.TransmitDown[1, 1].Magnitude, 2));
    }

    /// <summary>Half-filled ridges in air on a substrate, lengths in wavelengths.</summary>
    private sealed record Lamellar(Complex Ridge, Complex Substrate, double Period, double Height, double Degrees, RodField Field)
    {
        public LamellarAnswer Solve(int harmonics)
        {
            Complex below = Substrate * Substrate;
            GratingWaves waves = ModalCase.Waves(Field, Math.Sin(Degrees * Math.PI / 180), 0, [1, Ridge * Ridge], harmonics, 1, Period);
            ScatteringBlock ridges = ModalCase.Solve(
                new ModalSlab([ModalCase.Rectangle(Period / 2, Height).At(0, Height / 2)], Height, Period, crowd: false), waves, harmonics);
            return new LamellarAnswer(waves, below, ModalCase.Join(ridges, ModalCase.Interface(waves, 1, below)));
        }
    }

    private sealed record LamellarAnswer(GratingWaves Waves, Complex Below, ScatteringBlock Block)
    {
        public double Reflected(int order) => Efficiency(Block.ReflectTop, order, 1);

        public double Transmitted(int order) => Efficiency(Block.TransmitDown, order, Below);

        private double Efficiency(ComplexMatrix amplitudes, int order, Complex medium)
        {
            int center = Waves.MostOrder;
            double ratio = ModalCase.Admittance(Waves, medium, order + center).Real / ModalCase.Admittance(Waves, 1, center).Real;
            return ratio * Math.Pow(amplitudes[order + center, center].Magnitude, 2);
        }
    }
}
