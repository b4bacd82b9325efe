using System.Numerics;
using BarbuleOptics.Grating;
using BarbuleOptics.Grating.Modal;
using BarbuleOptics.Layering;
using Xunit;

namespace BarbuleOptics.Tests.Grating.Modal;

/// <summary>Short cuts against the plain way, coarse meshes against fine ones.</summary>
public class ModalAgreementTests
{
    public static TheoryData<string, double, double> Directions => ModalIdentityTests.Directions;

    private static readonly PlacedOutline[][] Mirrored =
    [
        [ModalCase.HollowEllipse(140, 100, 80, 50).At(13, 50)],
        [ModalCase.Ellipse(140, 100).At(13, 55)],
        [ModalCase.Ellipse(60, 100).At(0, 50), ModalCase.Ellipse(60, 100).At(70, 50)],
        [ModalCase.Rectangle(60, 50).At(-20, 50), ModalCase.Ellipse(100, 100).At(65, 0), ModalCase.Ellipse(100, 100).At(65, 100)],
        [ModalCase.Walled(120, 80, 15).At(20, 50)],
    ];

    // Mirrors in x and z, symmetric elimination, even and odd orders apart. Measured: 2e-13.
    [Theory]
    [MemberData(nameof(Directions))]
    public void Mirrors_change_nothing(string field, double kx, double ky)
    {
        GratingWaves waves = ModalCase.Waves(Enum.Parse<RodField>(field), kx, ky, ModalCase.Absorbing);
        foreach (PlacedOutline[] bodies in Mirrored)
        {
            ScatteringBlock fast = ModalCase.Solve(bodies, waves, 4), plain = ModalCase.Solve(bodies, waves, 4, useMirrors: false);
            Assert.True(ModalCase.Largest(fast, plain) < 1e-11, $"{ModalCase.Largest(fast, plain)}");
        }
    }

    // Harmonics that crowd at walls and plain ones, all channels of the plane waves -1..1, with a mirror and without. Measured: 3e-6
    // in E, 1.2e-5 with H.
    [Theory]
    [MemberData(nameof(Directions))]
    public void Crowded_and_plain_harmonics_agree(string field, double kx, double ky)
    {
        GratingWaves waves = ModalCase.Waves(Enum.Parse<RodField>(field), kx, ky, ModalCase.Absorbing, mostOrder: 1);
        foreach (PlacedOutline[] bodies in (PlacedOutline[][])[
            [ModalCase.Walled(120, 80, 15).At(20, 50)], [ModalCase.Rectangle(90, 50).At(0, 30), ModalCase.Rectangle(60, 25, 2).At(-35, 80)]])
        {
            ScatteringBlock crowded = ModalCase.Solve(bodies, waves, 10);
            ScatteringBlock plain = ModalCase.Solve(new ModalSlab(bodies, 100, 170, crowd: false), waves, 24);
            Assert.True(ModalCase.Largest(crowded, plain) < (waves.Field == RodField.Electric ? 6e-6 : 2.5e-5));
        }
    }

    // Twice the same question, once after another wavelength.
    [Fact]
    public void What_is_kept_does_not_show()
    {
        var slab = new ModalSlab(Mirrored[0], 100, 170);
        GratingWaves first = ModalCase.Waves(RodField.Magnetic, 0.4, 0, ModalCase.Absorbing);
        ScatteringBlock before = ModalCase.Solve(slab, first, 4);
        _ = ModalCase.Solve(slab, ModalCase.Waves(RodField.Both, 0.1, 0.3, ModalCase.Lossless, wavelengthNm: 500), 4, depth: 2);
        _ = ModalCase.Solve(slab, ModalCase.Waves(RodField.Electric, 0, 0, ModalCase.Absorbing), 4);
        Assert.Equal(0, ModalCase.Largest(before, ModalCase.Solve(slab, first, 4)));
    }

    // Largest error of any element of the block, evanescent orders next to cut bodies included, at fineness 0 to 3 against 6.
    // Measured: 1.1e-3, 1.2e-4, 1.9e-5, 7e-7; in the zeroth orders ten times less.
    [Theory]
    [MemberData(nameof(Directions))]
    public void Depth_meshes_converge(string field, double kx, double ky)
    {
        double[] allowed = [3e-3, 4e-4, 5e-5, 2e-6];
        GratingWaves waves = ModalCase.Waves(Enum.Parse<RodField>(field), kx, ky, ModalCase.Absorbing);
        foreach (PlacedOutline[] bodies in Mirrored)
        {
            ScatteringBlock fine = ModalCase.Solve(bodies, waves, 3, depth: 6);
            for (int depth = 0; depth < allowed.Length; depth++)
            {
                double error = ModalCase.Largest(ModalCase.Solve(bodies, waves, 3, depth), fine);
                Assert.True(error < allowed[depth], $"depth {depth}: {error}");
            }
        }
    }
}
