using BarbuleOptics.Multilayer;
using Xunit;

namespace BarbuleOptics.Tests.Grating;

/// <summary>Where solvers fail: orders at their opening, grazing light, touching bodies, thin shells, many rows, other spacings.</summary>
public class HardSectionTests
{
    // The largest gap found over the cases below, lossless ones included, is some 1e-12.
    private const double Tolerance = 1e-10;

    private const string Rods = """
        [cortex]
        thickness = 120
        [[layer]]
        form = "rod"
        diameter = 120
        spacing = 320
        rows = 3
        pitch = 150
        stacking = "staggered"
        gap = 20
        """;

    // The plane of incidence turns nothing that normal incidence does not see: the square of such a wave vector is 0.
    /// <summary>Hollow platelets that touch side by side are the limit of those that nearly do: a gap of 0.03 nm of keratin changes R, T and A
    /// by less than 5e-4, where taking the walls that touch for keratin would change A by 0.03.</summary>
    [Theory]
    [InlineData(Polarizations.S)]
    [InlineData(Polarizations.P)]
    public void Hollow_platelets_that_touch_are_the_limit_of_those_that_nearly_do(Polarizations polarization)
    {
        const string platelets = "[cortex]\nthickness = 120\n[[layer]]\nform = \"platelet\"\nthickness = 54\nwidth = 126\nwall = 12\ncore_air = 0.3\nspacing = ";
        GratingAnswer touching = GratingCase.Of(platelets + "126\n").Solve(420, 20, polarization, 1e-4);
        GratingAnswer apart = GratingCase.Of(platelets + "126.03\n").Solve(420, 20, polarization, 1e-4);
        Assert.InRange(touching.Difference(apart), 0, 5e-4);
    }

    [Theory]
    [InlineData(90, 1e-200)]
    [InlineData(90, 1e-320)]
    [InlineData(30, 1e-200)]
    public void A_tiny_angle_is_normal_incidence(double axis, double degrees)
    {
        GratingCase section = GratingCase.Of("[cortex]\nthickness = 100\n[[layer]]\nform = 'rod'\ndiameter = 100\nspacing = 150\n").At(axis);
        foreach (Polarizations polarization in (Polarizations[])[Polarizations.S, Polarizations.P])
        {
            GratingAnswer tiny = section.Solve(450, degrees, polarization), normal = section.Solve(450, 0, polarization);
            Assert.True(tiny.Difference(normal) <= tiny.Error + normal.Error, $"{tiny} not {normal}");
        }
    }

    [Fact]
    public void Orders_may_open_exactly_at_a_wavelength()
    {
        // In air: P (1 + sin a); in the matrix of index 1.5 and in the backing of 1.25 likewise.
        const string text = "[barbule]\nmatrix = { n = 1.5, k = 0 }\nbacking = { n = 1.25, k = 0 }\n" + Rods;
        foreach (double axis in (double[])[0, 90, 40])
        {
            GratingCase section = GratingCase.Of(text).At(axis);
            foreach (double wavelengthNm in (double[])[320, 480, 400, 640, 800, 720])
                CheckBoth(section, wavelengthNm, axis == 0 && wavelengthNm > 480 ? 30 : 0);
        }
    }

    [Fact]
    public void Light_may_graze_at_an_opening()
    {
        const string text = "[barbule]\nmatrix = { n = 1.5, k = 0 }\nbacking = { n = 1.25, k = 0 }\n" + Rods;
        double sine = Math.Sin(double.DegreesToRadians(89.9));
        CheckBoth(GratingCase.Of(text), 320 * (1 + sine), 89.9);
        CheckBoth(GratingCase.Of(text), 320 * (1.5 + sine), 89.9);
        CheckBoth(GratingCase.Of(text).At(90), 320 * Math.Sqrt(1.5 * 1.5 - sine * sine), 89.9);
        CheckBoth(GratingCase.Of(text).At(90), 470, 89.9);
    }

    [Theory]
    [InlineData("diameter = 150\nlumen = 149.5\nseparation = 0\nrows = 4\nrow_separation = 0\nstacking = \"staggered\"")]
    [InlineData("diameter = 150\nseparation = 0\nrows = 4\nrow_separation = 0\nstacking = \"staggered\"")]
    [InlineData("diameter = 150\nseparation = 0\nrows = 4\nrow_separation = 0")]
    [InlineData("diameter = 120\nspacing = 170\nrows = 100\npitch = 130\nstacking = \"staggered\"")]
    [InlineData("diameter = 120\nlumen = 70\nspacing = 500\nrows = 100\npitch = 130")]
    public void Rods_may_touch_be_thin_shells_and_lie_in_many_rows(string rods)
    {
        foreach (string matrix in (string[])["", "[barbule]\nmatrix = { n = 1.55, k = 0 }\n"])
        {
            GratingCase section = GratingCase.Of(matrix + "[cortex]\nthickness = 0\n[[layer]]\nform = \"rod\"\n" + (matrix == "" ? "" : "material = { n = 1.8, k = 0 }\n") + rods);
            CheckBoth(section, 450, 0);
            CheckBoth(section.At(90), 610, 40);
        }
    }

    // Rods of a period so small that only the quasi-static limit is left: s sees the mean permittivity (Rytov 1956; from memory),
    // with an error that falls like the square of the period: 4 times from each period to its half.
    [Fact]
    public void Small_periods_in_s_are_the_mean_permittivity()
    {
        double coarse = Difference(16), fine = Difference(8);
        Assert.InRange(coarse / fine, 3, 5);
        Assert.True(fine < 1e-3);

        static double Difference(double periodNm)
        {
            string text = FormattableString.Invariant($$"""
                [cortex]
                thickness = 50
                [[layer]]
                form = "platelet"
                material = { n = 2, k = 0.1 }
                thickness = 160
                width = {{periodNm / 2}}
                spacing = {{periodNm}}
                """);
            string film = """
                [cortex]
                thickness = 50
                [[layer]]
                form = "film"
                material = { n = MEAN }
                thickness = 160
                """;
            const double wavelengthNm = 500;
            System.Numerics.Complex keratin = 1.532 + 5890 / (wavelengthNm * wavelengthNm), platelet = new(2, 0.1);
            System.Numerics.Complex mean = System.Numerics.Complex.Sqrt((keratin * keratin + platelet * platelet) / 2);
            film = film.Replace("MEAN", FormattableString.Invariant($"{mean.Real:R}, k = {mean.Imaginary:R}"), StringComparison.Ordinal);
            return GratingCase.Of(text).Solve(wavelengthNm, 20, Polarizations.S, 1e-5)
                .Difference(GratingCase.Of(film).Solve(wavelengthNm, 20, Polarizations.S));
        }
    }

    private static void CheckBoth(GratingCase section, double wavelengthNm, double degrees)
    {
        foreach (Polarizations polarization in (Polarizations[])[Polarizations.S, Polarizations.P])
        {
            GratingAnswer answer = section.Solve(wavelengthNm, degrees, polarization, 1e-6);
            Assert.True(answer.Gap < Tolerance, FormattableString.Invariant($"{answer} at {wavelengthNm} nm, {degrees} deg, {polarization}"));
        }
    }
}
