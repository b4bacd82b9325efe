using Xunit;

namespace BarbuleOptics.Tests.Grating.Reference;

/// <summary>Rows of bodies cut into slices against a method that knows no slices, spectral elements. Two errors are left: of the slices
/// of curved bodies (like their inverse square) and of the harmonics (on a staircase like 1/N in p and at azimuths).</summary>
public class PlainSlicerTests
{
    public static TheoryData<int> Ellipses => [.. Enumerable.Range(0, ReferenceValue.Ellipses.Count)];

    public static TheoryData<int> Platelets => [.. Enumerable.Range(0, ReferenceValue.Platelets.Count)];

    // hollow-ellipses.csv. Extrapolated from N and 2 N harmonics (N 5 or 9), 12 and 24 slices, differences are up to 4e-5 in s, 3e-4 in p
    // and at azimuths; up to 1.3e-3 for the thin shell (lumen 72 x 132 in 80 x 140), whose slices are hardly thinner than its wall.
    [Theory]
    [MemberData(nameof(Ellipses))]
    public void Staircases_of_hollow_ellipses_near_the_spectral_elements(int number)
    {
        ReferenceValue value = ReferenceValue.Ellipses[number];
        bool isLikeP = value.Light.IsP || value.Light.AxisDeg != 0;
        PlainGrating few = PlainSlicer.Cut(value.Section(), 0, 12), many = PlainSlicer.Cut(value.Section(), 0, 24);
        PlainAnswer coarse = PlainModalSolver.Solve(few, value.Light, value.Harmonics);
        PlainAnswer finer = PlainModalSolver.Solve(few, value.Light, 2 * value.Harmonics);
        PlainAnswer thinner = PlainModalSolver.Solve(many, value.Light, value.Harmonics);
        AssertNear(value, value.HasThinShell ? 3e-3 : isLikeP ? 1e-3 : 2e-4, of =>
            of(coarse) + (isLikeP ? 2 : 1) * (of(finer) - of(coarse)) + 4.0 / 3 * (of(thinner) - of(coarse)));
    }

    // platelets.csv. Rectangles are their own slices; corners leave an error like 1/N^2 in p, extrapolated from N and 2 N.
    [Theory]
    [MemberData(nameof(Platelets))]
    public void Platelets_near_the_spectral_elements(int number)
    {
        ReferenceValue value = ReferenceValue.Platelets[number];
        PlainGrating grating = PlainSlicer.Cut(value.Section(), 0, 1);
        PlainAnswer coarse = PlainModalSolver.Solve(grating, value.Light, value.Harmonics);
        PlainAnswer finer = PlainModalSolver.Solve(grating, value.Light, 2 * value.Harmonics);
        AssertNear(value, 5e-5, of => of(finer) + (of(finer) - of(coarse)) / 3);
    }

    private static void AssertNear(ReferenceValue value, double tolerance, Func<Func<PlainAnswer, double>, double> limit)
    {
        Assert.Equal(value.Reflectance, limit(answer => answer.Specular), tolerance);
        Assert.Equal(value.Diffracted, limit(answer => answer.TotalReflected - answer.Specular), tolerance);
        Assert.Equal(value.Transmittance, limit(answer => answer.TotalTransmitted), tolerance);
    }
}
