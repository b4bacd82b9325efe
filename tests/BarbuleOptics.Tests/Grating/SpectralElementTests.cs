using BarbuleOptics.Multilayer;
using BarbuleOptics.Tests.Grating.Reference;
using Xunit;

namespace BarbuleOptics.Tests.Grating;

/// <summary>The product against spectral elements on rows of hollow rods, flattened and round, and of hollow platelets: the hard cases of a
/// Fourier modal method.</summary>
/// <remarks>Expected values: hollow-ellipses.csv and platelets.csv, computed by an independent method (spectral elements; the scripts in
/// Reference print them), not published; each line says how much it changes from the next coarser grid. The plain modal code of
/// the tests agrees with them too (<see cref="PlainSlicerTests"/>).</remarks>
public class SpectralElementTests
{
    public static TheoryData<int> Ellipses => [.. Enumerable.Range(0, ReferenceValue.Ellipses.Count)];

    public static TheoryData<int> Platelets => [.. Enumerable.Range(0, ReferenceValue.Platelets.Count)];

    [Theory]
    [MemberData(nameof(Ellipses))]
    public void Hollow_rods_match_spectral_elements(int number) => AssertMatches(ReferenceValue.Ellipses[number]);

    [Theory]
    [MemberData(nameof(Platelets))]
    public void Hollow_platelets_match_spectral_elements(int number) => AssertMatches(ReferenceValue.Platelets[number]);

    // Held to its own estimate: the true error may be three times that at most, which is what it promises. Half of the accuracy asked is added,
    // for where slabs are almost right the estimate leaves out the error of the depth mesh (2e-6 to 2e-5 found).
    private static void AssertMatches(ReferenceValue value)
    {
        SolvedSection found = SolvedSection.Of(
            value.Section(), value.Light.IncidenceDeg, value.Light.IsP ? Polarizations.P : Polarizations.S, 1e-4);
        double tolerance = 3 * found.Estimate + value.Change + (value.IsRound ? 1e-10 : 5e-5);
        Assert.InRange(found.Estimate, 0, 1e-3);
        Assert.Equal(value.Reflectance, found.Specular, tolerance);
        Assert.Equal(value.Diffracted, found.Diffracted, tolerance);
        Assert.Equal(value.Transmittance, found.Transmittance, tolerance);
    }
}
