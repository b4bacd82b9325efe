using System.Numerics;
using BarbuleOptics.Grating;
using BarbuleOptics.Layering;
using Xunit;

namespace BarbuleOptics.Tests.Grating.Modal;

/// <summary>Random and extreme slabs: power is kept, short cuts agree with the plain way.</summary>
public class ModalExtremeTests
{
    // Lossless bodies of any shape: touching, cut by a plane, with a core almost as wide, with a core of negative permittivity, at up to
    // 89.9 degrees. Measured over 1,500 of them: power 5e-11, mirrors 1.2e-9.
    [Fact]
    public void Random_slabs_keep_power_and_agree_with_the_plain_way()
    {
        var random = new Random(17);
        for (int trial = 0; trial < 60; trial++)
        {
            (PlacedOutline body, double heightNm, double periodNm) = RandomBody(random, trial);
            GratingWaves waves = RandomWaves(random, trial, periodNm);
            int harmonics = 3 + random.Next(4);
            ScatteringBlock fast = ModalCase.Solve([body], waves, harmonics, 1, heightNm);
            ScatteringBlock plain = ModalCase.Solve([body], waves, harmonics, 1, heightNm, useMirrors: false);
            Assert.True(ModalCase.Largest(fast, plain) < 1e-8, $"{trial}: {ModalCase.Largest(fast, plain)}");
            if (OrdersBeyond(waves))
                continue;
            double error = Math.Abs(PowerOut(waves, fast, waves.MostOrder) - 1);
            Assert.True(error < 1e-9, $"{trial}: {error}");
        }
    }

    private static (PlacedOutline Body, double HeightNm, double PeriodNm) RandomBody(Random random, int trial)
    {
        double periodNm = 80 + 400 * random.NextDouble(), widthNm = periodNm * (trial % 5 == 0 ? 1 : 0.3 + 0.7 * random.NextDouble());
        double heightNm = 20 + 250 * random.NextDouble(), core = trial % 7 == 0 ? 0.99 : 0.3 + 0.6 * random.NextDouble();
        OutlineShape shape = random.Next(3) == 0 ? OutlineShape.Rectangle : OutlineShape.Ellipse;
        Outline? inner = random.Next(3) == 0 ? null : new Outline(shape, widthNm / 2 * core, heightNm / 2 * core);
        var body = new CellBody(new Outline(shape, widthNm / 2, heightNm / 2), inner, 1, inner is null ? 1 : 2, 0, 0);
        bool isCut = trial % 4 == 0;
        return (new PlacedOutline(body, periodNm * random.NextDouble(), heightNm * (isCut ? 0.4 : 0.5)), heightNm * (isCut ? 0.7 : 1), periodNm);
    }

    private static GratingWaves RandomWaves(Random random, int trial, double periodNm)
    {
        Complex core = trial % 6 == 0 ? -4 - 10 * random.NextDouble() : 1;
        Complex[] permittivities = [1 + 1.5 * random.NextDouble(), 1 + 3 * random.NextDouble(), core];
        double sine = Math.Sin(double.DegreesToRadians(trial % 9 == 0 ? 89.9 : 90 * random.NextDouble())), axis = random.NextDouble() * Math.PI / 2;
        var field = (RodField)(trial % 3);
        return ModalCase.Waves(
            field, trial % 8 == 0 ? 0 : sine * Math.Cos(axis), field == RodField.Both ? sine * Math.Sin(axis) : 0, permittivities,
            3, 200 + 700 * random.NextDouble(), periodNm);
    }

    private static bool OrdersBeyond(GratingWaves waves)
        => Math.Abs(waves.Kx0) - 2 * Math.PI * (waves.MostOrder + 1) / waves.PeriodNm > -Complex.Sqrt(waves.MatrixAcross).Real;

    private static double PowerOut(GratingWaves waves, ScatteringBlock block, int incident)
    {
        double sum = 0;
        for (int i = 0; i < waves.ChannelCount; i++)
        {
            sum += Power(waves, i) * (Math.Pow(block.ReflectTop[i, incident].Magnitude, 2) + Math.Pow(block.TransmitDown[i, incident].Magnitude, 2));
        }
        return sum / Power(waves, incident);
    }

    private static double Power(GratingWaves waves, int channel)
        => waves.Kz[channel % waves.OrderCount].Real * (waves.Field == RodField.Both && channel < waves.OrderCount ? waves.Matrix.Real : 1);
}
