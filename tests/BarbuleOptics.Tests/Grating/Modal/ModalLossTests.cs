using System.Numerics;
using BarbuleOptics.Grating;
using BarbuleOptics.Grating.Modal;
using BarbuleOptics.Layering;
using Xunit;

namespace BarbuleOptics.Tests.Grating.Modal;

/// <summary>Losses by material against the balance of power.</summary>
public class ModalLossTests
{
    public static TheoryData<string, double, double> Directions => ModalIdentityTests.Directions;

    // Two bodies one below the other: the loss of each is the net power into a slab around it, when the slab is cut between them.
    // Measured: 3e-5 of the loss in the sum, the error of the depth meshes where they are cut, and 4e-4 in the parts.
    [Theory]
    [MemberData(nameof(Directions))]
    public void Losses_of_two_materials_are_told_apart(string field, double kx, double ky)
    {
        Complex[] permittivities = [2.4, new(3, 0.5), new(1.5, 0.2)];
        GratingWaves waves = ModalCase.Waves(Enum.Parse<RodField>(field), kx, ky, permittivities, mostOrder: 6);
        var resolution = new Resolution(6, 0, 6, 2);
        CellBody upper = ModalCase.Ellipse(120, 50), lower = ModalCase.Rectangle(90, 40, 2);
        var whole = new ModalSlab([upper.At(0, 25), lower.At(40, 75)], 100, 170);
        var top = new ModalSlab([upper.At(0, 25)], 50, 170);
        // Plain harmonics, as the whole has.
        var bottom = new ModalSlab([lower.At(40, 25)], 50, 170, crowd: false);

        Complex[] down = Amplitudes(waves, 1), up = Amplitudes(waves, 2);
        ScatteringBlock first = ModalCase.Solve(top, waves, 6, 2), second = ModalCase.Solve(bottom, waves, 6, 2);
        Complex[] middleDown = Between(first, second, down, up);
        Complex[] middleUp = Add(Apply(second.ReflectTop, middleDown), Apply(second.TransmitUp, up));
        var expected = new double[3];
        top.AddLoss(waves, resolution, down, middleUp, expected);
        bottom.AddLoss(waves, resolution, middleDown, up, expected);

        _ = ModalCase.Solve(whole, waves, 6, 2);
        var actual = new double[3];
        whole.AddLoss(waves, resolution, down, up, actual);
        double total = expected.Sum();
        Assert.Equal(0, actual[0]);
        Assert.Equal(1, actual.Sum() / total, 1e-4);
        Assert.Equal(expected[1] / total, actual[1] / total, 1e-3);
        // The integral over the bodies, which nothing ties to the net power through the planes. Measured: 2.2e-4 at most.
        Assert.Equal(1, whole.Integrated.ToArray().Sum() / actual.Sum(), 5e-4);
    }

    // One absorber has it all, and it is what a wave loses. Measured: 3e-15.
    [Theory]
    [InlineData("Electric")]
    [InlineData("Magnetic")]
    public void One_absorber_takes_what_is_missing(string field)
    {
        GratingWaves waves = ModalCase.Waves(Enum.Parse<RodField>(field), 0.4, 0, [2.4, new(3, 0.5), 1]);
        var slab = new ModalSlab([ModalCase.HollowEllipse(140, 100, 80, 50).At(13, 50)], 100, 170);
        ScatteringBlock block = ModalCase.Solve(slab, waves, 5);
        var down = new Complex[5];
        down[2] = 1;
        var loss = new double[3];
        slab.AddLoss(waves, new Resolution(2, 0, 5, 1), down, new Complex[5], loss);
        double scale = waves.Kz[2].Real / (field == "Magnetic" ? 2.4 : 1), left = 1;
        for (int i = 0; i < 5; i++)
        {
            double power = waves.Kz[i].Real / waves.Kz[2].Real;
            left -= power * (Math.Pow(block.ReflectTop[i, 2].Magnitude, 2) + Math.Pow(block.TransmitDown[i, 2].Magnitude, 2));
        }
        Assert.Equal(left, loss[1] / scale, 1e-12);
        Assert.Equal(0, loss[0]);
        Assert.Equal(0, loss[2]);
    }

    // Rounding of a power balance would make every transparent material a weak absorber, or a source.
    [Fact]
    public void Transparent_bodies_take_nothing()
    {
        GratingWaves waves = ModalCase.Waves(RodField.Magnetic, 0.4, 0, ModalCase.Lossless);
        var slab = new ModalSlab([ModalCase.HollowEllipse(140, 100, 80, 50).At(13, 50)], 100, 170);
        _ = ModalCase.Solve(slab, waves, 5);
        var loss = new double[3];
        slab.AddLoss(waves, new Resolution(2, 0, 5, 1), Amplitudes(waves, 1), Amplitudes(waves, 2), loss);
        Assert.Equal([0, 0, 0], loss);
    }

    private static Complex[] Amplitudes(GratingWaves waves, int seed)
    {
        var random = new Random(seed);
        var amplitudes = new Complex[waves.ChannelCount];
        for (int i = 0; i < amplitudes.Length; i++)
        {
            if (waves.Kz[i % waves.OrderCount].Imaginary == 0)
                amplitudes[i] = new Complex(random.NextDouble() - 0.5, random.NextDouble() - 0.5);
        }
        return amplitudes;
    }

    private static Complex[] Between(ScatteringBlock first, ScatteringBlock second, Complex[] down, Complex[] up)
        => Apply(
            ModalCase.Bounces(first.ReflectBottom, second.ReflectTop),
            Add(Apply(first.TransmitDown, down), Apply(first.ReflectBottom, Apply(second.TransmitUp, up))));

    private static Complex[] Apply(ComplexMatrix matrix, Complex[] vector)
    {
        var result = new Complex[matrix.Rows];
        matrix.Apply(vector, result);
        return result;
    }

    private static Complex[] Add(Complex[] first, Complex[] second) => [.. first.Zip(second, (one, other) => one + other)];
}
