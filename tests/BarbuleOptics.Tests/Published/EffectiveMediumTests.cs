using System.Numerics;
using BarbuleOptics.Layering;
using BarbuleOptics.Layering.Mixing;
using Xunit;

namespace BarbuleOptics.Tests.Published;

/// <summary>Mixing rules against closed forms and published limits.</summary>
public sealed class EffectiveMediumTests
{
    private static readonly Complex Melanin = new Complex(1.75, 0.1) * new Complex(1.75, 0.1);
    private static readonly Complex Keratin = 1.55 * 1.55;

    // Rytov 1956, Sov. Phys. JETP 2:466: glass of index 1.5 in air, equal shares; n along and across the lamellae. The digits were
    // computed from the closed form outside this project, twice.
    [Fact]
    public void Form_birefringence_of_glass_plates_is_that_of_Rytov()
    {
        DiagonalPermittivity mixed = new FormBirefringence().Mix(Lamellae(0.5), [1.0, 2.25], 500);
        Assert.Equal(1.274755, Complex.Sqrt(mixed.Y).Real, 5e-7);
        Assert.Equal(1.176697, Complex.Sqrt(mixed.X).Real, 5e-7);
        Assert.Equal(mixed.Y, mixed.Z);
    }

    // The same source, second order in period over wavelength.
    [Theory]
    [InlineData(0.1, 1.276014, 1.177859)]
    [InlineData(0.2, 1.279786, 1.181341)]
    [InlineData(0.3, 1.286046, 1.187120)]
    public void Second_order_form_birefringence_is_that_of_Rytov(double periodOverWavelength, double along, double across)
    {
        DiagonalPermittivity mixed = new SecondOrderFormBirefringence().Mix(Lamellae(0.5), [1.0, 2.25], 100 / periodOverWavelength);
        Assert.Equal(along, Complex.Sqrt(mixed.Y).Real, 5e-7);
        Assert.Equal(across, Complex.Sqrt(mixed.X).Real, 5e-7);
    }

    // Rytov's second-order terms written out for two lamellae: along, (pi P f (1 - f) (e1 - e2) / lambda)^2 / 3; across,
    // (pi P f (1 - f) (1/e1 - 1/e2) / lambda)^2 e0^3 e_along / 3 (from memory). Here for absorbing lamellae and uneven shares.
    [Theory]
    [InlineData(0.2)]
    [InlineData(0.7)]
    public void Second_order_terms_equal_the_closed_form_for_two_absorbing_lamellae(double share)
    {
        const double PeriodNm = 100, WavelengthNm = 430;
        DiagonalPermittivity mixed = new SecondOrderFormBirefringence().Mix(Lamellae(share), [Keratin, Melanin], WavelengthNm);
        Complex mean = share * Melanin + (1 - share) * Keratin, series = 1 / (share / Melanin + (1 - share) / Keratin);
        double q = Math.PI * PeriodNm * share * (1 - share) / WavelengthNm;
        Complex along = mean + q * q * (Melanin - Keratin) * (Melanin - Keratin) / 3;
        Complex contrast = 1 / Melanin - 1 / Keratin;
        Complex across = series + q * q * contrast * contrast * series * series * series * mean / 3;
        Assert.InRange(Complex.Abs(mixed.Y - along), 0, 1e-14);
        Assert.InRange(Complex.Abs(mixed.X - across), 0, 1e-14);
    }

    // The same source along the rods; across them and in depth the closed forms of the two quasi-static rules: Maxwell Garnett
    // eh (1 + f a)/(1 - f a), a = (ei - eh)/(ei + eh); Bruggeman at equal shares sqrt(e1 e2).
    [Fact]
    public void Second_order_along_the_rods_joins_Rytov_with_the_rule_across()
    {
        DiagonalPermittivity garnett = new SecondOrderAlongRods(new MaxwellGarnett()).Mix(Lamellae(0.5), [1.0, 2.25], 500);
        DiagonalPermittivity bruggeman = new SecondOrderAlongRods(new Bruggeman()).Mix(Lamellae(0.5), [1.0, 2.25], 500);
        Assert.Equal(1.279786, Complex.Sqrt(garnett.Y).Real, 5e-7);
        Assert.Equal(garnett.Y, bruggeman.Y);
        const double Polarizability = 1.25 / 3.25;
        Near((1 + 0.5 * Polarizability) / (1 - 0.5 * Polarizability), garnett.X);
        Near(1.5, bruggeman.Z);
        Assert.Equal(garnett.X, garnett.Z);
    }

    // Permittivity 4 in 1, share 0.3, and melanin in keratin, share 0.5: closed forms of each rule (Maxwell Garnett 1904 and
    // Bruggeman 1935 in two dimensions, Wiener 1912), computed twice outside this project.
    [Fact]
    public void Each_rule_gives_its_closed_form()
    {
        Complex[] plain = [1, 4], feather = [Keratin, Melanin];
        SectionCut third = Lamellae(0.3), half = Lamellae(0.5);
        Near(1.439024, new MaxwellGarnett().Mix(third, plain, 500).X);
        Near(1.488061, new Bruggeman().Mix(third, plain, 500).X);
        Near(1.9, new MeanPermittivity().Mix(third, plain, 500).X);
        Near(1.290323, new FormBirefringence().Mix(third, plain, 500).X);
        Near(new Complex(2.712142, 0.15335), new MaxwellGarnett().Mix(half, feather, 500).X, 1e-6);
        Near(new Complex(2.7125, 0.155), new Bruggeman().Mix(half, feather, 500).X, 6e-5);
        Near(new Complex(2.7275, 0.175), new MeanPermittivity().Mix(half, feather, 500).X);
        Near(new Complex(2.69745, 0.135223), new FormBirefringence().Mix(half, feather, 500).X, 5e-6);
        Near(Complex.Pow(1.65 + 0.05 * Complex.ImaginaryOne, 2), new MeanIndex().Mix(half, feather, 500).X);
    }

    // Dykhne 1970, Sov. Phys. JETP 32:63: equal shares of two phases in the plane, e = sqrt(e1 e2), exactly; a rule that treats the
    // phases alike must give it, for metals too.
    [Theory]
    [InlineData(4, 0, 1, 0)]
    [InlineData(-10, 0, 2, 0)]
    [InlineData(-12, 0.8, 2.4, 0)]
    public void Bruggeman_at_equal_shares_is_the_geometric_mean(double r1, double i1, double r2, double i2)
    {
        Complex e1 = new(r1, i1), e2 = new(r2, i2);
        Complex expected = Complex.Sqrt(e1 * e2);
        if (expected.Imaginary < 0)
            expected = -expected;
        Near(expected, new Bruggeman().Mix(Lamellae(0.5), [e2, e1], 500).X, 1e-12);
    }

    [Fact]
    public void Bruggeman_of_three_materials_with_two_alike_is_that_of_two()
    {
        Complex[] three = [Keratin, Melanin, Melanin, 1];
        SectionCut split = new(100, 0, 4, [new(0, 0.5), new(1, 0.2), new(2, 0.3)], []);
        Near(new Bruggeman().Mix(Lamellae(0.5), [Keratin, Melanin], 500).X, new Bruggeman().Mix(split, three, 500).X, 1e-13);
    }

    [Fact]
    public void Bruggeman_of_many_materials_solves_its_equation_and_stays_passive()
    {
        var random = new Random(4711);
        for (int trial = 0; trial < 20_000; trial++)
        {
            int count = random.Next(3, 6);
            Complex[] e = new Complex[count];
            double[] weights = [.. Enumerable.Range(0, count).Select(_ => random.NextDouble())];
            for (int m = 0; m < count; m++)
                e[m] = new Complex(random.NextDouble() * 14 - 4, random.Next(3) == 0 ? 0 : random.NextDouble() * 5);
            SectionCut cut = new(100, 0, count, [.. weights.Select((w, m) => new Lamella(m, w / weights.Sum()))], []);
            Complex found = new Bruggeman().Mix(cut, e, 500).X;
            Complex residual = 0;
            for (int m = 0; m < count; m++)
                residual += cut.Fractions[m] * (e[m] - found) / (e[m] + found);
            Assert.True(found.Imaginary >= 0 && double.IsFinite(found.Real));
            // Measured largest below 1e-9, with lossless metals among the materials.
            Assert.InRange(Complex.Abs(residual), 0, 1e-8);
        }
    }

    // Landauer 1952, J. Appl. Phys. 23:779: spheres of vacuum with no response in a solid, e = es (1 - 3 f / 2) below the threshold 2/3.
    [Theory]
    [InlineData(0.1)]
    [InlineData(0.4)]
    [InlineData(0.6)]
    public void Porous_core_has_the_dilute_line_of_three_dimensional_Bruggeman(double pores)
        => Near(3.0 * (1 - 1.5 * pores), PorousCore.Average(3.0, 1e-13, pores), 1e-9);

    [Fact]
    public void Porous_core_solves_its_equation_for_melanin_and_air()
    {
        foreach (double f in new[] { 0.05, 1.0 / 3, 0.5, 0.9, 1 })
        {
            Complex e = PorousCore.Average(Melanin, 1, f);
            Near(0, f * (1 - e) / (1 + 2 * e) + (1 - f) * (Melanin - e) / (Melanin + 2 * e), 1e-14);
            Assert.True(e.Imaginary >= 0);
        }
    }

    // Perrins, McKenzie and McPhedran 1979, Proc. R. Soc. A 369:207 (values from memory): square array of perfectly conducting cylinders.
    // Maxwell Garnett holds while the cylinders are dilute: within 0.3 % up to a share of 0.3, and is 5 % short at 0.5.
    [Theory]
    [InlineData(0.1, 1.222, 0.001)]
    [InlineData(0.2, 1.500, 0.001)]
    [InlineData(0.3, 1.860, 0.003)]
    [InlineData(0.4, 2.351, 0.01)]
    public void Maxwell_Garnett_follows_the_square_array_of_conductors(double share, double published, double relative)
    {
        Complex mixed = new MaxwellGarnett().Mix(Lamellae(share), [1, 1e12], 500).X;
        Assert.Equal(published, mixed.Real, published * relative);
    }

    // Hashin and Shtrikman 1962 (Milton, The Theory of Composites, section 7.1; from memory): a coated cylinder whose host has
    // (eh - es)/(eh + es) = q (ec - es)/(ec + es) is neutral: the host does not feel it, whatever its share.
    [Theory]
    [InlineData(0.2)]
    [InlineData(0.5)]
    public void Neutral_coated_cylinders_leave_Maxwell_Garnett_unmoved(double q)
    {
        Complex core = 1, shell = Melanin;
        Complex beta = q * (core - shell) / (core + shell);
        Complex host = shell * (1 + beta) / (1 - beta);
        const double Area = 0.55;
        SectionCut cut = new(100, 0, 3, [new(0, 1 - Area), new(1, Area * (1 - q)), new(2, Area * q)], [new CutBody(1, 2, Area * (1 - q), Area * q)]);
        Near(host, new MaxwellGarnett().Mix(cut, [host, shell, core], 500).X, 1e-13);
    }

    [Fact]
    public void A_core_of_the_shells_own_material_is_no_core()
    {
        SectionCut hollow = new(100, 0, 3, [new(0, 0.5), new(1, 0.3), new(2, 0.2)], [new CutBody(1, 2, 0.3, 0.2)]);
        foreach (IMixingRule rule in MixingRules.All)
        {
            DiagonalPermittivity a = rule.Mix(hollow, [Keratin, Melanin, Melanin], 500), b = rule.Mix(Lamellae(0.5), [Keratin, Melanin], 500);
            Near(b.X, a.X, 1e-13);
            Near(b.Y, a.Y, 1e-13);
        }
    }

    [Fact]
    public void Every_rule_leaves_one_material_as_it_is()
    {
        foreach (IMixingRule rule in MixingRules.All)
        {
            DiagonalPermittivity mixed = rule.Mix(Lamellae(0.4), [Melanin, Melanin], 450);
            Near(Melanin, mixed.X, 1e-13);
            Near(Melanin, mixed.Y, 1e-13);
            Near(Melanin, mixed.Z, 1e-13);
        }
    }

    /// <summary>One body of material 1 in a matrix of material 0, over a period of 100 nm.</summary>
    private static SectionCut Lamellae(double share)
        => new(100, 0, 2, [new Lamella(1, share), new Lamella(0, 1 - share)], [new CutBody(1, 1, share, 0)]);

    private static void Near(Complex expected, Complex found, double tolerance = 6e-7)
        => Assert.True(Complex.Abs(expected - found) <= tolerance, $"expected {expected}, found {found}");
}
