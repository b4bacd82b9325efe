using System.Numerics;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Tests.Multilayer;
using Xunit;

namespace BarbuleOptics.Tests.Published;

/// <summary>One face. Formulas: Fresnel's equations, Born and Wolf, Principles of Optics, section 1.5; Hecht, Optics, section 4.6
/// (section numbers from memory). Digits were computed from these formulas by two programs outside this project.</summary>
public class FresnelTests
{
    [Theory]
    [InlineData(1.5, 0, .04)] // (n - 1)^2/(n + 1)^2 = 1/25, Hecht, section 4.6
    [InlineData(1.52, 0, .042580)]
    [InlineData(2, .5, 5.0 / 37)] // ((n - 1)^2 + k^2)/((n + 1)^2 + k^2)
    public void Bare_face_at_normal_incidence_matches_Fresnel(double n, double k, double reflectance)
    {
        TestStack face = TestStack.OnIndex(1, new Complex(n, k));
        Assert.Equal(reflectance, face.Solve(0, Polarizations.S).Reflected, 5e-7);
        Assert.Equal(reflectance, face.Solve(0, Polarizations.P).Reflected, 5e-7);
    }

    [Theory]
    [InlineData(30, .0577961, .0252491)]
    [InlineData(45, .0920134, .0084665)]
    [InlineData(60, .1765715, .0018019)]
    [InlineData(75, .3993560, .1067651)]
    public void Bare_face_of_index_1_5_matches_Fresnel_at_an_angle(double degrees, double s, double p)
    {
        TestStack face = TestStack.OnIndex(1, 1.5);
        Assert.Equal(s, face.Solve(degrees, Polarizations.S).Reflected, 5.1e-8);
        Assert.Equal(p, face.Solve(degrees, Polarizations.P).Reflected, 5.1e-8);
        Assert.Equal((s + p) / 2, face.Solve(degrees, Polarizations.Unpolarized).Reflected, 5.1e-8);
    }

    // Brewster's law: tan = n; there R_p = 0 and R_s = ((n^2 - 1)/(n^2 + 1))^2 = (5/13)^2 for n = 1.5. Born and Wolf, section 1.5.
    [Fact]
    public void P_vanishes_at_Brewsters_angle()
    {
        double brewster = double.RadiansToDegrees(Math.Atan(1.5));
        Assert.Equal(56.309932, brewster, 5e-7);
        TestStack face = TestStack.OnIndex(1, 1.5);
        Assert.Equal(0, face.Solve(brewster, Polarizations.P).Reflected, 1e-30);
        Assert.Equal(25.0 / 169, face.Solve(brewster, Polarizations.S).Reflected, 1e-15);
    }

    // Critical angle arcsin(1/1.5) = 41.810315 degrees. Born and Wolf, section 1.5.
    [Theory]
    [InlineData(Polarizations.S)]
    [InlineData(Polarizations.P)]
    public void Reflection_is_total_just_above_the_critical_angle_and_partial_just_below(Polarizations polarization)
    {
        TestStack face = TestStack.OnIndex(1.5, 1);
        Powers above = face.Solve(41.810316, polarization);
        Assert.Equal(1, above.Reflected);
        Assert.Equal(0, above.Transmitted);
        Assert.InRange(face.Solve(41.810314, polarization).Reflected, .99, .9999);
    }

    // The flux through the face, from the same equations: T = 1 - R, into an absorbing medium too.
    [Theory]
    [InlineData(2, .5)]
    [InlineData(.05, 3.5)]
    public void What_an_absorbing_half_space_takes_is_transmitted(double n, double k)
    {
        Powers power = TestStack.OnIndex(1, new Complex(n, k)).Solve(40, Polarizations.Unpolarized);
        Assert.Equal(1 - power.Reflected, power.Transmitted, 1e-15);
        Assert.Equal(0, power.Absorbed);
    }
}
