using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Tests.Multilayer;
using Xunit;

namespace BarbuleOptics.Tests.Published;

/// <summary>A film with its optic axis along the normal. Formulas: Born and Wolf, Principles of Optics, section 15.3; Yeh, Optical Waves in
/// Layered Media, chapter 9 (both from memory): s sees n_o, p has (kx/n_e)^2 + (kz/n_o)^2 = k0^2. Digits computed twice outside this project.</summary>
public class UniaxialFilmTests
{
    private static readonly DiagonalPermittivity Uniaxial = new(1.6 * 1.6, 1.6 * 1.6, 1.7 * 1.7);

    [Theory]
    [InlineData(0, .0404556, .0404556)]
    [InlineData(45, .1011528, .0095713)]
    [InlineData(70, .3345203, .0428075)]
    public void Film_matches_tabulated_values(double degrees, double s, double p)
    {
        TestStack film = TestStack.OnIndex(1, 1.5, new Film(Uniaxial, .3 * 500)).At(500);
        Assert.Equal(s, film.Solve(degrees, Polarizations.S).Reflected, 5.1e-8);
        Assert.Equal(p, film.Solve(degrees, Polarizations.P).Reflected, 5.1e-8);
    }

    // Brewster's angle of a crystal face cut across its axis: tan^2 = e_z (e_x - 1)/(e_z - 1), e_x in the surface (from r_p = 0 with the
    // dispersion relation above; Lekner 1991, J. Phys.: Condens. Matter 3, 6121, from memory). A film so thick that it absorbs
    // all but exp(-25) of what enters it stands for the crystal.
    [Fact]
    public void Crystal_face_has_its_Brewster_angle()
    {
        (double ex, double ez) = (1.6 * 1.6, 1.7 * 1.7);
        double angle = double.RadiansToDegrees(Math.Atan(Math.Sqrt(ez * (ex - 1) / (ez - 1))));
        var crystal = new DiagonalPermittivity(new(ex, 1e-6), new(ex, 1e-6), new(ez, 1e-6));
        TestStack thick = TestStack.OnIndex(1, 1.5, new Film(crystal, 5e9)).At(500);
        Assert.Equal(0, thick.Solve(angle, Polarizations.P).Reflected, 1e-12);
        Assert.InRange(thick.Solve(angle, Polarizations.S).Reflected, .15, .25);
    }

    // Along the axis there is but one index: s and p agree at normal incidence.
    [Fact]
    public void S_equals_p_at_normal_incidence()
    {
        TestStack film = TestStack.OnIndex(1, 1.5, new Film(Uniaxial, 321), Film.OfIndex(new(1.7, .2), 77));
        Assert.Equal(film.Solve(0, Polarizations.S).Reflected, film.Solve(0, Polarizations.P).Reflected, 1e-15);
    }
}
