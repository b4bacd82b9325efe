using System.Numerics;
using BarbuleOptics.Grating;
using BarbuleOptics.Grating.Multipoles;
using BarbuleOptics.Grating.Multipoles.Lanes;
using BarbuleOptics.Lanes;
using Xunit;

namespace BarbuleOptics.Tests.Grating;

/// <summary>Answers of flattened rods at several wavelengths side by side, against fundamental solutions and the closed form of round rods.</summary>
public sealed class EllipseLanesTests
{
    private const int Top = 10;

    public static TheoryData<int> Widths => [512, 256, 128, 64];

    // Null-field equations against fundamental solutions, whose misfit is below 1e-5 (measured 1e-8 in the answers): two methods with nothing in common but the
    // waves. Measured here: 4e-9 (E) and 5e-8 (H) at aspect 2.4 with core, 1e-10 without, 9e-7 at aspects 4 and 5.
    [Theory]
    [InlineData(140, 80, 0, 0, 1e-10)]
    [InlineData(140, 80, 90, 40, 1e-8)]
    [InlineData(190, 80, 120, 40, 2e-7)]
    [InlineData(140, 80, 132, 72, 1e-8)]
    [InlineData(300, 80, 0, 0, 1e-8)]
    [InlineData(160, 40, 100, 20, 4e-6)]
    [InlineData(100, 160, 50, 110, 1e-8)]
    public void Answers_agree_with_fundamental_solutions(double width, double height, double coreWidth, double coreHeight, double tolerance)
    {
        Complex matrix = 1.55, body = new(1.75, 0.1), core = 1;
        var outline = new EllipseOutline(width / 2, height / 2);
        var coreOutline = new EllipseOutline(coreWidth / 2, coreHeight / 2);
        Complex[] found = Answers(LaneWidth.Default, outline, coreOutline, matrix, body, core);
        foreach (RodField field in new[] { RodField.Electric, RodField.Magnetic })
        {
            double k0 = 2 * Math.PI / 450;
            var waves = new GratingWaves();
            waves.Set(450, 0.1 * k0, 0, 400, [matrix * matrix, body * body, core * core], 1, field);
            var reference = new EllipseScatterer(outline, coreOutline, 1, 2);
            Assert.True(reference.TryPrepare(waves, Top));
            int number = field == RodField.Electric ? 0 : 1;
            ForEachPair((sine, outgoing, incoming) =>
            {
                double scale = Scale(k0 * matrix.Real * reference.RadiusNm / 2, outgoing) * Scale(k0 * matrix.Real * reference.RadiusNm / 2, incoming);
                Complex expected = scale * reference.Answer(number, number, !sine, outgoing, incoming);
                // Where both waves are of high order answers are far below what can matter.
                Complex difference = expected - found[Place(number == 1, sine, outgoing, incoming)];
                Assert.True(difference.Magnitude <= tolerance, $"{field} {sine} {outgoing} {incoming}: off by {difference.Magnitude}");
            });
        }
    }

    // A round hollow rod: the coated cylinder in closed form. Source: Bohren and Huffman, Absorption and Scattering of Light by Small Particles, section 8.4 for
    // the cylinder (number from memory), as RodScatterer has it. Rounding only.
    [Theory]
    [MemberData(nameof(Widths))]
    public void Round_body_answers_like_a_coated_cylinder(int bits)
    {
        Complex matrix = 1.55, body = new(1.75, 0.1), core = 1;
        Complex[] found = Answers(LaneWidth.Parse($"{bits}")!.Value, new EllipseOutline(60, 60), new EllipseOutline(35, 35), matrix, body, core);
        foreach (RodField field in new[] { RodField.Electric, RodField.Magnetic })
        {
            double k0 = 2 * Math.PI / 450;
            var waves = new GratingWaves();
            waves.Set(450, 0.1 * k0, 0, 400, [matrix * matrix, body * body, core * core], 1, field);
            var reference = new RodScatterer(60, 35, 1, 2);
            Assert.True(reference.TryPrepare(waves, Top));
            int number = field == RodField.Electric ? 0 : 1;
            ForEachPair((sine, outgoing, incoming) =>
            {
                double scale = Scale(k0 * matrix.Real * 60 / 2, outgoing) * Scale(k0 * matrix.Real * 60 / 2, incoming);
                Complex expected = outgoing == incoming ? scale * reference.Answer(number, number, !sine, outgoing, incoming) : Complex.Zero;
                Complex difference = expected - found[Place(number == 1, sine, outgoing, incoming)];
                Assert.True(difference.Magnitude <= 2e-13, $"{field} {sine} {outgoing} {incoming}: off by {difference.Magnitude}");
            });
        }
    }

    // Scalar functions of another algorithm for large arguments; over the whole range that Covers admits. Measured: 1e-13.
    [Fact]
    public void Bessel_functions_agree_with_the_scalar_ones()
    {
        var random = new Random(3);
        var reference = new CylinderFunctions();
        for (int run = 0; run < 2000; run++)
        {
            Complex z = Complex.FromPolarCoordinates(Math.Exp(-4 + random.NextDouble() * 6.48), random.NextDouble() * Math.PI / 2);
            if (z.Imaginary > BesselLanes.MostDecay || z.Magnitude > BesselLanes.MostArgument)
                continue;
            reference.Set(z, 12);
            (Complex[] j, Complex[] h) = LaneWidth.Default.Invoke<BesselTrial, (Complex[], Complex[])>(new BesselTrial(z));
            for (int m = 0; m <= 12; m++)
            {
                double scale = Scale(z.Magnitude / 2, m) * Math.Exp(z.Imaginary);
                // A zero of one function is no accuracy lost where the other is large.
                double size = m > z.Magnitude ? (reference.J[m] * scale).Magnitude : (reference.H[m] / scale).Magnitude + (reference.J[m] * scale).Magnitude;
                Assert.True((reference.J[m] * scale - j[m]).Magnitude <= 5e-13 * size, $"J {m} at {z}");
                Assert.True((reference.H[m] / scale - h[m]).Magnitude <= 5e-13 * ((reference.H[m] / scale).Magnitude + (reference.J[m] * scale).Magnitude), $"H {m} at {z}");
            }
        }
    }

    [Fact]
    public void Arguments_beyond_what_was_tested_are_refused()
    {
        var far = new EllipseOutline(3000, 1000);
        Assert.False(LaneWidth.Default.Invoke<EllipseTrial, Complex[]?>(
            new EllipseTrial(far, default, 0.02, 0.02, 0.02)) is not null);
    }

    private static double Scale(double s, int m)
    {
        double scale = 1;
        for (int i = 1; i <= m; i++)
            scale *= s / i;
        return scale;
    }

    private static void ForEachPair(Action<bool, int, int> check)
    {
        foreach (bool sine in new[] { false, true })
        {
            for (int outgoing = sine ? 1 : 0; outgoing <= Top; outgoing++)
            {
                for (int incoming = outgoing % 2 == 0 && sine ? 2 : outgoing % 2; incoming <= Top; incoming += 2)
                    check(sine, outgoing, incoming);
            }
        }
    }

    private static int Place(bool magnetic, bool sine, int outgoing, int incoming)
        => (((magnetic ? 2 : 0) + (sine ? 1 : 0)) * (Top + 1) + outgoing) * (Top + 1) + incoming;

    private static Complex[] Answers(LaneWidth width, EllipseOutline outline, EllipseOutline core, Complex matrix, Complex body, Complex inside)
    {
        double k0 = 2 * Math.PI / 450;
        return width.Invoke<EllipseTrial, Complex[]?>(new EllipseTrial(outline, core, k0 * matrix, k0 * body, k0 * inside))
            ?? throw new InvalidOperationException("No solution.");
    }

    private readonly struct EllipseTrial(EllipseOutline outline, EllipseOutline core, Complex matrix, Complex body, Complex inside) : ILaneAction<Complex[]?>
    {
        public Complex[]? Invoke<TLanes>()
            where TLanes : struct, ILanes<TLanes>
        {
            var ellipse = new EllipseLanes(outline, core);
            // The wavelengths of the other lanes differ, as in use.
            if (!ellipse.TrySolve(Top, Neighbors<TLanes>(matrix), Neighbors<TLanes>(body), Neighbors<TLanes>(inside)))
                return null;
            var answers = new Complex[4 * (Top + 1) * (Top + 1)];
            foreach (bool magnetic in new[] { false, true })
            {
                foreach (bool sine in new[] { false, true })
                {
                    for (int outgoing = 0; outgoing <= Top; outgoing++)
                    {
                        for (int incoming = 0; incoming <= Top; incoming++)
                            answers[Place(magnetic, sine, outgoing, incoming)] = First(ellipse.Answer<TLanes>(magnetic, sine, outgoing, incoming));
                    }
                }
            }
            return answers;
        }
    }

    private readonly struct BesselTrial(Complex z) : ILaneAction<(Complex[] J, Complex[] H)>
    {
        public (Complex[] J, Complex[] H) Invoke<TLanes>()
            where TLanes : struct, ILanes<TLanes>
        {
            int stride = ComplexLanes<TLanes>.Stride;
            double[] j = new double[13 * stride], h = new double[13 * stride];
            BesselLanes.Fill(ComplexLanes<TLanes>.Broadcast(z.Real, z.Imaginary), z.Magnitude, 12, ref j[0], ref h[0]);
            return (
                [.. Enumerable.Range(0, 13).Select(m => new Complex(j[m * stride], j[m * stride + TLanes.Count]))],
                [.. Enumerable.Range(0, 13).Select(m => new Complex(h[m * stride], h[m * stride + TLanes.Count]))]);
        }
    }

    private static ComplexLanes<TLanes> Neighbors<TLanes>(Complex value)
        where TLanes : struct, ILanes<TLanes>
    {
        double[] memory = new double[ComplexLanes<TLanes>.Stride];
        for (int i = 0; i < TLanes.Count; i++)
            (memory[i], memory[TLanes.Count + i]) = (value.Real * (1 - 0.002 * i), value.Imaginary * (1 + 0.01 * i));
        return ComplexLanes<TLanes>.Load(ref memory[0]);
    }

    private static Complex First<TLanes>(ComplexLanes<TLanes> value)
        where TLanes : struct, ILanes<TLanes>
    {
        double[] memory = new double[ComplexLanes<TLanes>.Stride];
        ComplexLanes<TLanes>.Store(value, ref memory[0]);
        return new Complex(memory[0], memory[TLanes.Count]);
    }
}
