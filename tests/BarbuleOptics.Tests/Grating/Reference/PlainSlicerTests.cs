using Xunit;

namespace BarbuleOptics.Tests.Grating.Reference;

/// <summary>Curved bodies as staircases against methods that know no staircase: multipoles and spectral elements. Two errors are left,
/// of the slices (like their inverse square) and, in p and at azimuths, of the harmonics (like 1/N): both are extrapolated.</summary>
public class PlainSlicerTests
{
    public static TheoryData<int> Values => [.. Enumerable.Range(0, EllipseValue.All.Count)];

    // Spectral elements, hollow-ellipses.csv. With 5 and 10 harmonics, 12 and 24 slices differences are up to 1e-4 in s, 3e-4 in p and at azimuths;
    // up to 1.3e-3 for the thin shell (lumen 72 x 132 in 80 x 140), whose slices are hardly thinner than its wall.
    [Theory]
    [MemberData(nameof(Values))]
    public void Staircases_of_hollow_ellipses_near_the_spectral_elements(int number)
    {
        EllipseValue value = EllipseValue.All[number];
        double tolerance = value.HasThinShell ? 3e-3 : value.Light.IsP || value.Light.AxisDeg != 0 ? 6e-4 : 2e-4;
        PlainGrating few = PlainSlicer.Cut(value.Section(), 0, 12), many = PlainSlicer.Cut(value.Section(), 0, 24);
        PlainAnswer coarse = PlainModalSolver.Solve(few, value.Light, value.Harmonics);
        PlainAnswer finer = PlainModalSolver.Solve(few, value.Light, 2 * value.Harmonics);
        PlainAnswer thinner = PlainModalSolver.Solve(many, value.Light, value.Harmonics);
        double harmonicsLeft = value.Light.IsP || value.Light.AxisDeg != 0 ? 2 : 1;

        AssertNear(value.Reflectance, answer => answer.Specular);
        AssertNear(value.Diffracted, answer => answer.TotalReflected - answer.Specular);
        AssertNear(value.Transmittance, answer => answer.TotalTransmitted);

        void AssertNear(double expected, Func<PlainAnswer, double> of)
        {
            double limit = of(coarse) + harmonicsLeft * (of(finer) - of(coarse)) + 4.0 / 3 * (of(thinner) - of(coarse));
            Assert.Equal(expected, limit, tolerance);
        }
    }
}
