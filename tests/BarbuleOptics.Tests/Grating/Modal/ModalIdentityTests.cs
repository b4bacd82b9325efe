using System.Numerics;
using BarbuleOptics.Grating;
using BarbuleOptics.Grating.Modal;
using BarbuleOptics.Layering;
using Xunit;

namespace BarbuleOptics.Tests.Grating.Modal;

/// <summary>Laws that hold at any number of harmonics, and limits with a closed form.</summary>
public class ModalIdentityTests
{
    private static readonly PlacedOutline[] Hollow = [ModalCase.HollowEllipse(140, 100, 80, 50).At(13, 50)];

    private static readonly PlacedOutline[] Crooked =
        [ModalCase.Ellipse(90, 70).At(0, 55), ModalCase.Rectangle(30, 20, 2).At(72, 30), ModalCase.Ellipse(30, 120, 2).At(-65, 60)];

    // All walls upright, where harmonics crowd at them: without any mirror, and with both.
    private static readonly PlacedOutline[] Upright =
        [ModalCase.Rectangle(90, 50).At(0, 30), ModalCase.Rectangle(30, 20, 2).At(72, 30), ModalCase.Rectangle(60, 25, 2).At(-35, 80)];

    private static readonly PlacedOutline[] Walled = [ModalCase.Walled(120, 80, 15).At(20, 50)];

    public static TheoryData<string, double, double> Directions => new()
    {
        { "Electric", 0, 0 }, { "Electric", 0.4, 0 }, { "Magnetic", 0, 0 }, { "Magnetic", 0.4, 0 }, { "Both", 0, 0.5 }, { "Both", 0.4, 0.5 },
    };

    // Bodies of the matrix' own material: waves go through unchanged. Measured: 3e-14.
    [Theory]
    [MemberData(nameof(Directions))]
    public void Bodies_of_the_matrix_are_not_seen(string field, double kx, double ky)
    {
        GratingWaves waves = ModalCase.Waves(Enum.Parse<RodField>(field), kx, ky, [2.4, 2.4, 2.4]);
        ScatteringBlock block = ModalCase.Solve(Crooked, waves, 4);
        var gap = new ScatteringBlock(waves.ChannelCount);
        for (int i = 0; i < waves.ChannelCount; i++)
            gap.TransmitDown[i, i] = gap.TransmitUp[i, i] = Complex.Exp(Complex.ImaginaryOne * waves.Kz[i % waves.OrderCount] * 100);
        Assert.True(ModalCase.Largest(block, gap) < 1e-12);
    }

    // Power of all orders that propagate, and nothing else, leaves a lossless slab; at 3 harmonics as at any. Measured: 2e-14.
    [Theory]
    [MemberData(nameof(Directions))]
    public void Lossless_slabs_keep_power(string field, double kx, double ky)
    {
        foreach (PlacedOutline[] bodies in (PlacedOutline[][])[Hollow, Crooked, Upright, Walled])
        {
            GratingWaves waves = ModalCase.Waves(Enum.Parse<RodField>(field), kx, ky, ModalCase.Lossless, mostOrder: 2, wavelengthNm: 230);
            ScatteringBlock block = ModalCase.Solve(bodies, waves, 3);
            for (int incident = 0; incident < waves.ChannelCount; incident++)
            {
                if (waves.Kz[incident % waves.OrderCount].Imaginary != 0)
                    continue;
                double sum = 0;
                for (int i = 0; i < waves.ChannelCount; i++)
                    sum += Power(waves, i) * (Square(block.ReflectTop[i, incident]) + Square(block.TransmitDown[i, incident]));
                Assert.Equal(1, sum / Power(waves, incident), 1e-12);
            }
        }
    }

    // Light goes back the way it came. With absorption and without any mirror. Measured: 1e-13.
    [Theory]
    [InlineData("Electric")]
    [InlineData("Magnetic")]
    public void Exchange_of_source_and_receiver_changes_nothing(string field)
    {
        GratingWaves there = ModalCase.Waves(Enum.Parse<RodField>(field), 0.4, 0, ModalCase.Absorbing);
        GratingWaves back = ModalCase.Waves(Enum.Parse<RodField>(field), -0.4, 0, ModalCase.Absorbing);
        foreach (PlacedOutline[] bodies in (PlacedOutline[][])[Crooked, Upright])
        {
            ScatteringBlock one = ModalCase.Solve(bodies, there, 4), other = ModalCase.Solve(bodies, back, 4);
            for (int p = -2; p <= 2; p++)
            {
                for (int q = -2; q <= 2; q++)
                {
                    Complex ratio = there.Kz[q + 2] / there.Kz[p + 2];
                    Assert.True((one.ReflectTop[p + 2, q + 2] - ratio * other.ReflectTop[-q + 2, -p + 2]).Magnitude < 1e-11);
                    Assert.True((one.TransmitDown[p + 2, q + 2] - ratio * other.TransmitUp[-q + 2, -p + 2]).Magnitude < 1e-11);
                }
            }
        }
    }

    // Measured: 2e-14.
    [Theory]
    [MemberData(nameof(Directions))]
    public void A_mirror_image_gives_the_mirror_image(string field, double kx, double ky)
    {
        PlacedOutline[] image = [.. Crooked.Select(placed => placed with { XNm = -placed.XNm })];
        GratingWaves waves = ModalCase.Waves(Enum.Parse<RodField>(field), kx, ky, ModalCase.Absorbing);
        GratingWaves mirrored = ModalCase.Waves(Enum.Parse<RodField>(field), -kx, ky, ModalCase.Absorbing);
        ScatteringBlock block = ModalCase.Solve(Crooked, waves, 4), other = ModalCase.Solve(image, mirrored, 4);
        foreach ((ComplexMatrix one, ComplexMatrix two) in ModalCase.Pairs(block, other))
        {
            for (int row = 0; row < waves.ChannelCount; row++)
            {
                for (int column = 0; column < waves.ChannelCount; column++)
                {
                    // A mirror turns the magnetic field along the rods round.
                    double sign = row / waves.OrderCount == column / waves.OrderCount ? 1 : -1;
                    Assert.True((one[row, column] - sign * two[Image(waves, row), Image(waves, column)]).Magnitude < 1e-11);
                }
            }
        }
    }

    // No wave vector along the rods: both fields together are the two problems apart. Measured: 0.
    [Fact]
    public void Without_a_wave_vector_along_the_rods_the_fields_part()
    {
        ScatteringBlock both = ModalCase.Solve(Crooked, ModalCase.Waves(RodField.Both, 0.4, 0, ModalCase.Absorbing), 4);
        ScatteringBlock electric = ModalCase.Solve(Crooked, ModalCase.Waves(RodField.Electric, 0.4, 0, ModalCase.Absorbing), 4);
        ScatteringBlock magnetic = ModalCase.Solve(Crooked, ModalCase.Waves(RodField.Magnetic, 0.4, 0, ModalCase.Absorbing), 4);
        ScatteringBlock near = ModalCase.Solve(Crooked, ModalCase.Waves(RodField.Both, 0.4, 1e-7, ModalCase.Absorbing), 4);
        Assert.True(ModalCase.Largest(both, near) < 1e-6);
        for (int i = 0; i < 5; i++)
        {
            for (int j = 0; j < 5; j++)
            {
                Assert.True((both.ReflectTop[i, j] - electric.ReflectTop[i, j]).Magnitude < 1e-12);
                Assert.True((both.TransmitUp[5 + i, 5 + j] - magnetic.TransmitUp[i, j]).Magnitude < 1e-12);
                Assert.True(both.ReflectTop[i, 5 + j].Magnitude < 1e-12);
            }
        }
    }

    // A rectangle as wide as the period is a film. Its s and p waves, r = (y1 - y2)/(y1 + y2) with y = kz and kz/e, turned into the frame
    // of the rods. Measured: 3e-16.
    [Theory]
    [InlineData(0.4, 0.5)]
    [InlineData(0.0, 0.5)]
    [InlineData(0.6, 0.1)]
    public void A_body_as_wide_as_the_period_is_a_film(double kx, double ky)
    {
        GratingWaves waves = ModalCase.Waves(RodField.Both, kx, ky, ModalCase.Absorbing);
        ScatteringBlock block = ModalCase.Solve([ModalCase.Rectangle(170, 100).At(13, 50)], waves, 3);
        double along = Math.Sqrt(kx * kx + ky * ky), cos = kx / along, sin = ky / along;
        Complex matrix = ModalCase.Absorbing[0], body = ModalCase.Absorbing[1];
        Complex above = Complex.Sqrt(matrix - along * along), inside = Complex.Sqrt(body - along * along);
        Complex phase = Complex.Exp(2 * Complex.ImaginaryOne * inside * waves.K0 * 100);
        Complex s = Film(above, inside, phase), p = Film(above / matrix, inside / body, phase);
        // A downward s wave of strength S and p wave of strength T have Ey = S cos + T kz sin/e, Hy = T cos - S kz sin.
        Complex electric = above * sin / matrix, magnetic = -above * sin, size = cos * cos - electric * magnetic;
        foreach (bool isElectric in (ReadOnlySpan<bool>)[true, false])
        {
            Complex strengthS = (isElectric ? cos : -electric) / size, strengthP = (isElectric ? -magnetic : cos) / size;
            Complex expectedE = cos * s * strengthS - electric * p * strengthP, expectedH = -magnetic * s * strengthS + cos * p * strengthP;
            int column = isElectric ? 2 : 7;
            Assert.True((block.ReflectTop[2, column] - expectedE).Magnitude < 1e-13);
            Assert.True((block.ReflectTop[7, column] - expectedH).Magnitude < 1e-13);
        }
    }

    // The same slab as two slabs, cut through its bodies, with all harmonics as orders.
    // Measured: 3e-7, the error of the depth meshes at the cut.
    [Theory]
    [MemberData(nameof(Directions))]
    public void A_slab_can_be_cut(string field, double kx, double ky)
    {
        GratingWaves waves = ModalCase.Waves(Enum.Parse<RodField>(field), kx, ky, ModalCase.Absorbing, mostOrder: 3);
        PlacedOutline[] lower = [.. Crooked.Select(placed => placed with { CenterNm = placed.CenterNm - 42 })];
        ScatteringBlock whole = ModalCase.Solve(Crooked, waves, 3, depth: 5);
        ScatteringBlock joined = ModalCase.Join(ModalCase.Solve(Crooked, waves, 3, 5, heightNm: 42), ModalCase.Solve(lower, waves, 3, 5, heightNm: 58));
        Assert.True(ModalCase.Largest(whole, joined) < 1e-6, $"{ModalCase.Largest(whole, joined)}");
    }

    private static Complex Film(Complex above, Complex inside, Complex phase)
    {
        Complex face = (above - inside) / (above + inside);
        return face * (1 - phase) / (1 - face * face * phase);
    }

    private static int Image(GratingWaves waves, int channel)
        => channel / waves.OrderCount * waves.OrderCount + waves.OrderCount - 1 - channel % waves.OrderCount;

    private static double Power(GratingWaves waves, int channel)
        => waves.Kz[channel % waves.OrderCount].Real
            * (waves.Field == RodField.Both && channel < waves.OrderCount ? waves.Matrix.Real : 1);

    private static double Square(Complex value) => value.Real * value.Real + value.Imaginary * value.Imaginary;
}
