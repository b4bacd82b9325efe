using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;
using Xunit;

namespace BarbuleOptics.Tests.Grating;

/// <summary>What any right solution of a section obeys: power balance (Poynting), reciprocity, mirror images, the choice of the frame.</summary>
public class SectionIdentityTests
{
    // Largest gap found over 2,000 random sections of rods: 2e-14.
    private const double PowerTolerance = 1e-10;

    // Unlike rods side by side at unlike depths: neither mirror image nor upside down the same.
    private const string Lopsided = """
        backing = { n = 1.2, k = 0.1 }
        [cortex]
        thickness = 90
        [[layer]]
        spacing = 330
        rows = 2
        pitch = 210
        gap = 30
        [[layer.body]]
        form = "rod"
        diameter = 120
        lumen = 60
        [[layer.body]]
        form = "rod"
        material = "air"
        diameter = 60
        x = 0.3
        z = 80
        """;

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public void Power_balances_over_random_rows_of_rods(bool lossless)
    {
        var random = new RandomSections(seed: lossless ? 501 : 502);
        for (int i = 0; i < 150; i++)
        {
            string text = random.Rods(lossless);
            CheckPower(GratingCase.Of(text).At(random.Axis()), random, 1e-5, text);
        }
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public void Power_balances_over_random_rows_of_flat_bodies(bool lossless)
    {
        var random = new RandomSections(seed: lossless ? 503 : 504);
        for (int i = 0; i < 20; i++)
        {
            string text = random.Flat(lossless);
            CheckPower(GratingCase.Of(text).At(random.Axis()), random, 3e-2, text);
        }
    }

    // Reciprocity: the specular order is the same from either side of the normal, for any section (R from mirror image).
    [Theory]
    [InlineData(0.0)]
    [InlineData(90.0)]
    [InlineData(30.0)]
    public void Specular_reflection_is_that_of_the_mirror_image(double axisDegrees)
    {
        GratingCase section = GratingCase.Of("[barbule]\n" + Lopsided).At(axisDegrees), image = Mirrored(section);
        foreach (double wavelengthNm in (double[])[340, 520])
        {
            GratingAnswer one = section.Solve(wavelengthNm, 37, Polarizations.Unpolarized), other = image.Solve(wavelengthNm, 37, Polarizations.Unpolarized);
            // Largest difference found: 3e-13.
            Assert.Equal(one.Reflected, other.Reflected, 1e-10);
        }
    }

    [Fact]
    public void The_mirror_image_sends_light_into_mirrored_orders()
    {
        GratingCase section = GratingCase.Of("[barbule]\nsurround = { n = 1.33, k = 0 }\n" + Lopsided), image = Mirrored(section);
        foreach (Polarizations polarization in (Polarizations[])[Polarizations.S, Polarizations.P])
        {
            GratingAnswer one = section.Solve(400, 0, polarization), other = image.Solve(400, 0, polarization);
            int zeroth = GratingCase.MostOrder;
            Assert.True(Math.Abs(one.ReflectedOrders[zeroth + 1] - one.ReflectedOrders[zeroth - 1]) > 1e-5);
            for (int n = -2; n <= 2; n++)
            {
                Assert.Equal(one.ReflectedOrders[zeroth + n], other.ReflectedOrders[zeroth - n], 1e-10);
                Assert.Equal(one.TransmittedOrders[zeroth + n], other.TransmittedOrders[zeroth - n], 1e-10);
            }
        }
    }

    [Fact]
    public void Along_at_normal_incidence_s_and_p_change_places()
    {
        GratingCase across = GratingCase.Of("[barbule]\n" + Lopsided), along = across.At(90), between = across.At(30);
        GratingAnswer s = across.Solve(431, 0, Polarizations.S), p = across.Solve(431, 0, Polarizations.P);
        Assert.True(Math.Abs(s.Reflected - p.Reflected) > 1e-3);
        Assert.Equal(0, s.Difference(along.Solve(431, 0, Polarizations.P)), 1e-14);
        Assert.Equal(0, p.Difference(along.Solve(431, 0, Polarizations.S)), 1e-14);
        // The electric field of s makes 30 degrees with the rods: cos^2 of 30 degrees of one, sin^2 of the other.
        Assert.Equal(0.75 * s.Reflected + 0.25 * p.Reflected, between.Solve(431, 0, Polarizations.S).Reflected, 1e-14);
    }

    // The coupled equations against the uncoupled ones.
    [Fact]
    public void Rods_almost_across_are_rods_across()
    {
        GratingCase section = GratingCase.Of("[barbule]\n" + Lopsided);
        foreach (Polarizations polarization in (Polarizations[])[Polarizations.S, Polarizations.P])
            Assert.Equal(0, section.Solve(431, 50, polarization).Difference(section.At(1e-5).Solve(431, 50, polarization)), 1e-8);
    }

    [Fact]
    public void Nearly_normal_incidence_is_normal_incidence()
    {
        GratingCase section = GratingCase.Of("[barbule]\n" + Lopsided).At(35);
        foreach (Polarizations polarization in (Polarizations[])[Polarizations.S, Polarizations.P])
            Assert.Equal(0, section.Solve(431, 0, polarization).Difference(section.Solve(431, 1e-6, polarization)), 1e-6);
    }

    [Fact]
    public void Losses_of_the_materials_add_up_to_the_absorptance()
    {
        GratingAnswer answer = GratingCase.Of("[barbule]\nmatrix = { n = 1.56, k = 0.02 }\n" + Lopsided).Solve(431, 20, Polarizations.P);
        Assert.Equal(answer.Absorbed, answer.ByMaterial.Sum(), 1e-12);
        Assert.True(answer.ByMaterial.Count(share => share > 0.01) == 2);
    }

    private static void CheckPower(GratingCase section, RandomSections random, double accuracy, string text)
    {
        double degrees = random.Incidence(), wavelengthNm = random.WavelengthNm();
        GratingAnswer answer = section.Solve(wavelengthNm, degrees, random.Polarization(), accuracy);
        Assert.True(answer.Gap < PowerTolerance, FormattableString.Invariant($"{answer} at {wavelengthNm} nm, {degrees} deg of {text}"));
        Assert.True(answer.Reflected >= 0 && answer.Diffracted >= 0 && answer.Transmitted >= 0 && answer.Absorbed >= -PowerTolerance);
    }

    private static GratingCase Mirrored(GratingCase section) => new(section.Section with
    {
        Runs = ValueList.Create<BarbuleOptics.Layering.SectionRun>([.. section.Section.Runs.Select(run => run with
        {
            Cell = ValueList.Create<BarbuleOptics.Layering.CellBody>([.. run.Cell.Select(body => body with { XNm = -body.XNm })]),
            Rows = ValueList.Create<BarbuleOptics.Layering.SectionRow>([.. run.Rows.Select(row => row with { ShiftNm = -row.ShiftNm })]),
        })]),
    });
}
