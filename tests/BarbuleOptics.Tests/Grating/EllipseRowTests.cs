using System.Numerics;
using BarbuleOptics.Grating;
using BarbuleOptics.Grating.Multipoles;
using Xunit;

namespace BarbuleOptics.Tests.Grating;

/// <summary>Rows of flattened rods by the multipole expansion: conservation laws, the round limit, second methods, refusals.</summary>
public class EllipseRowTests
{
    private static readonly Complex Keratin = TestRow.Index(1.55);
    private static readonly Complex Melanin = TestRow.Index(1.75, 0.1);

    // Half axes 80 and 30, matrix absorbing for the sake of the second method. Largest difference
    // measured: 2e-8.
    [Theory]
    [InlineData(nameof(RodField.Electric), 0, 0)]
    [InlineData(nameof(RodField.Magnetic), 0, 0)]
    [InlineData(nameof(RodField.Magnetic), 50, 15)]
    [InlineData(nameof(RodField.Both), 50, 15)]
    public void One_row_matches_fundamental_solutions(string fieldName, double coreHalfWidthNm, double coreHalfHeightNm)
    {
        TestRow row = Flat(Enum.Parse<RodField>(fieldName), coreHalfWidthNm, coreHalfHeightNm) with { Orders = 1, XNm = 13, TopNm = 40, BottomNm = 35 };
        GratingWaves waves = row.Waves();
        ScatteringBlock block = row.Scatter();
        var second = new FundamentalSolutions(waves, [new(13, 0, 80, 30, coreHalfWidthNm, coreHalfHeightNm, 1, 2)], 44, 0.3);
        foreach (int channel in row.Field == RodField.Both ? [1, 4] : new[] { 1, 2 })
        {
            (Complex[] above, Complex[] below) = second.Solve(channel);
            Complex entrance = Phase(waves, channel, 40);
            for (int c = 0; c < waves.ChannelCount; c++)
            {
                Complex direct = c == channel ? 1 : 0;
                Near(above[c] * Phase(waves, c, 40) * entrance, block.ReflectTop[c, channel], 1e-7);
                Near((below[c] + direct) * Phase(waves, c, 35) * entrance, block.TransmitDown[c, channel], 1e-7);
            }
        }
    }

    // Two hollow rows, staggered, 62 nm apart: nearer than the circles round the bodies by far. One recursion over plane waves joins them.
    // Measured differences: 1.3e-5 with orders to 2, 4.5e-7 with 3, 6e-8 with 4, where the multipoles follow the orders.
    [Theory]
    [InlineData(2, 3e-5)]
    [InlineData(4, 3e-7)]
    public void Nested_rows_match_fundamental_solutions(int orders, double tolerance)
    {
        const double pitch = 62, half = pitch / 2;
        TestRow upper = Flat(RodField.Magnetic, 50, 15) with { Orders = orders, Multipoles = 12, TopNm = half, BottomNm = half };
        ScatteringBlock first = upper.Scatter(), second = (upper with { XNm = upper.PeriodNm / 2 }).Scatter();
        (Complex[] reflected, Complex[] transmitted) = Join(first, second, orders);

        GratingWaves waves = (upper with { Orders = 1 }).Waves();
        FundamentalSolutions.Body body = new(0, 0, 80, 30, 50, 15, 1, 2);
        var other = new FundamentalSolutions(waves, [body, body with { XNm = upper.PeriodNm / 2, ZNm = pitch }], 44, 0.3);
        (Complex[] above, Complex[] below) = other.Solve(1);
        Complex entrance = Phase(waves, 1, half);
        for (int c = 0; c < 3; c++)
        {
            Complex direct = c == 1 ? 1 : 0;
            Near(above[c] * Phase(waves, c, half) * entrance, reflected[c + orders - 1], tolerance);
            Near((below[c] + direct) * Phase(waves, c, pitch + half) * entrance, transmitted[c + orders - 1], tolerance);
        }
    }

    // Spectral elements of degree 12, Reference/hollow-ellipses.csv, row of 140 x 80 with lumen 90 x 40 at 170 in 1.55 throughout; own change 1e-11.
    // Largest difference measured: 5e-10, and 5e-12 with 28 multipoles.
    [Theory]
    [InlineData(nameof(RodField.Magnetic), 450, 0, 0.00332826516, 0.89868259172)]
    [InlineData(nameof(RodField.Electric), 450, 0, 0.00169356412, 0.89376669019)]
    [InlineData(nameof(RodField.Magnetic), 450, 30, 0.00051680681, 0.89069688209)]
    [InlineData(nameof(RodField.Electric), 450, 30, 0.00201451388, 0.88071997413)]
    [InlineData(nameof(RodField.Magnetic), 620, 0, 0.00153678313, 0.92786121155)]
    [InlineData(nameof(RodField.Electric), 620, 0, 0.00100336071, 0.92326141704)]
    public void One_hollow_row_matches_spectral_elements(string fieldName, double wavelengthNm, double degrees, double reflected, double transmitted)
    {
        var row = new TestRow(70, 170, Keratin, Melanin)
        {
            CoreRadiusNm = 45, HalfHeightsNm = (40, 20), WavelengthNm = wavelengthNm, Across = 1.55 * Math.Sin(degrees * Math.PI / 180),
            Multipoles = 20, Field = Enum.Parse<RodField>(fieldName),
        };
        (double foundReflected, double foundTransmitted, double foundLost) = row.Shares();
        Assert.Equal(reflected, foundReflected, 2e-11);
        Assert.Equal(transmitted, foundTransmitted, 1e-9);
        Assert.Equal(1, foundReflected + foundTransmitted + foundLost, 1e-14);
    }

    // An ellipse of equal axes is a round rod, losses of matrix, rod and core one by one. Largest difference measured: 4e-14, of losses 2e-13.
    [Theory]
    [InlineData(nameof(RodField.Electric))]
    [InlineData(nameof(RodField.Magnetic))]
    [InlineData(nameof(RodField.Both))]
    public void Ellipse_of_equal_axes_is_a_round_rod(string fieldName)
    {
        RodField field = Enum.Parse<RodField>(fieldName);
        var round = new TestRow(60, 180, new(2.4, 0.1), new(3.1, 0.35))
        {
            CoreRadiusNm = 35, Core = new(1.5, 0.2), WavelengthNm = 450, Across = 0.24, Along = field == RodField.Both ? 0.5 : 0, Field = field, Multipoles = 15,
        };
        TestRow ellipse = round with { HalfHeightsNm = (60, 35) };
        GratingWaves waves = round.Waves();
        ScatteringBlock expected = new(waves.ChannelCount), found = new(waves.ChannelCount);
        RodRow one = round.Element(), other = ellipse.Element();
        Assert.True(one.TryScatter(waves, round.Resolution, expected));
        Assert.True(other.TryScatter(waves, round.Resolution, found));
        for (int i = 0; i < waves.ChannelCount * waves.ChannelCount; i++)
        {
            Near(expected.ReflectTop.Elements[i], found.ReflectTop.Elements[i], 1e-12);
            Near(expected.TransmitDown.Elements[i], found.TransmitDown.Elements[i], 1e-12);
        }
        var random = new Random(5);
        Complex[] down = PlanePower.Random(waves.ChannelCount, random), up = PlanePower.Random(waves.ChannelCount, random);
        double[] expectedLost = new double[3], foundLost = new double[3];
        one.AddLoss(waves, round.Resolution, down, up, expectedLost);
        other.AddLoss(waves, round.Resolution, down, up, foundLost);
        for (int m = 0; m < 3; m++)
            Assert.True(Math.Abs(expectedLost[m] - foundLost[m]) < 1e-11 * expectedLost.Sum(), $"material {m}: {expectedLost[m]} against {foundLost[m]}");
    }

    // Random flat and tall bodies: what enters is lost, and source and receiver can be exchanged. Largest defect of power in 60
    // such rows: 2e-11 of what is at stake; of reversal: 2e-10.
    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    [InlineData(5)]
    [InlineData(6)]
    [InlineData(7)]
    [InlineData(8)]
    public void Power_is_conserved_and_light_reversible(int seed)
    {
        var random = new Random(seed);
        double halfWidth = 40 + 60 * random.NextDouble(), halfHeight = halfWidth * (0.3 + random.NextDouble()), core = random.Next(2) * (0.3 + 0.5 * random.NextDouble());
        var field = (RodField)(seed % 3);
        var row = new TestRow(halfWidth, 210, Keratin, seed % 2 == 0 ? Melanin : Melanin.Real)
        {
            HalfHeightsNm = (halfHeight, core * halfHeight), CoreRadiusNm = core * halfWidth, WavelengthNm = 400 + 300 * random.NextDouble(),
            Across = 0.6, Along = field == RodField.Both ? 0.4 : 0, Field = field, Orders = 2,
        };
        GratingWaves waves = row.Waves();
        var block = new ScatteringBlock(waves.ChannelCount);
        RodRow element = row.Element();
        Assert.True(element.TryScatter(waves, row.Resolution, block));
        Complex[] down = PlanePower.Random(waves.ChannelCount, random), up = PlanePower.Random(waves.ChannelCount, random);
        var lost = new double[3];
        element.AddLoss(waves, row.Resolution, down, up, lost);
        double defect = (PlanePower.Entering(waves, block, down, up) - lost.Sum()) / (waves.K0 * waves.ChannelCount);
        Assert.True(Math.Abs(defect) < 1e-9, $"defect {defect:e1}");

        double reversal = Reversal.Defect(waves, block, (row with { Across = -row.Across, Along = -row.Along }).Scatter());
        Assert.True(reversal < 1e-9, $"source and receiver {reversal:e1}");
    }

    // A tall body's own field ends at its foci; planes between them cannot part rows.
    [Fact]
    public void Planes_between_the_foci_of_tall_bodies_are_refused()
    {
        TestRow tall = new(30, 100, Keratin, Melanin) { HalfHeightsNm = (80, 0), WavelengthNm = 500, Multipoles = 14, TopNm = 70, BottomNm = 90 };
        Assert.False(tall.Element().TryScatter(tall.Waves(), tall.Resolution, new ScatteringBlock(5)));
        TestRow apart = tall with { TopNm = 90 };
        Assert.True(apart.Element().TryScatter(apart.Waves(), apart.Resolution, new ScatteringBlock(5)));
    }

    // All of them are solved, with closed energy. Largest defect measured: 1e-15.
    [Theory]
    [InlineData(85, 8, 0, 1.75, 0.1)]
    [InlineData(85, 30, 0.97, 1.75, 0.1)]
    [InlineData(85, 30, 0.7, 1.8, 4)]
    [InlineData(85, 84.9999, 0.5, 1.75, 0)]
    public void Extreme_bodies_are_solved_and_closed_in_energy(double halfWidthNm, double halfHeightNm, double core, double n, double k)
    {
        var row = new TestRow(halfWidthNm, 170, Keratin, TestRow.Index(n, k))
        {
            HalfHeightsNm = (halfHeightNm, core * halfHeightNm), CoreRadiusNm = core * halfWidthNm, WavelengthNm = 430, Across = 0.5, Field = RodField.Magnetic,
        };
        (double reflected, double transmitted, double lost) = row.Shares();
        Assert.InRange(reflected, 0, 1);
        Assert.Equal(1, reflected + transmitted + lost, 1e-13);
    }

    // An outline so flat that its sources would crowd beyond what is allowed.
    [Fact]
    public void Needles_are_refused()
    {
        TestRow needle = new(80, 180, Keratin, Melanin) { HalfHeightsNm = (1, 0), WavelengthNm = 500, TopNm = 50, BottomNm = 50 };
        Assert.False(needle.Element().TryScatter(needle.Waves(), needle.Resolution, new ScatteringBlock(5)));
    }

    private static TestRow Flat(RodField field, double coreHalfWidthNm, double coreHalfHeightNm) => new(80, 180, new(2.4, 0.9), new(3.1, 0.35))
    {
        HalfHeightsNm = (30, coreHalfHeightNm), CoreRadiusNm = coreHalfWidthNm, WavelengthNm = 500, Across = 0.24,
        Along = field == RodField.Both ? 0.5 : 0, Field = field, Multipoles = 24,
    };

    // Waves between the rows: d = (1 - bottom top')^-1 through, the incident order in the middle.
    private static (Complex[] Reflected, Complex[] Transmitted) Join(ScatteringBlock upper, ScatteringBlock lower, int incident)
    {
        int n = upper.Channels;
        ComplexMatrix round = new(n, n), equations = new(n, n);
        round.SetProduct(upper.ReflectBottom, lower.ReflectTop);
        equations.SetIdentity();
        equations.Subtract(round);
        var solver = new LinearSolver(n);
        Assert.True(solver.TryFactor(equations));
        Complex[] down = new Complex[n], up = new Complex[n], reflected = new Complex[n], transmitted = new Complex[n];
        for (int i = 0; i < n; i++)
            down[i] = upper.TransmitDown[i, incident];
        solver.Solve(down);
        lower.ReflectTop.Apply(down, up);
        upper.TransmitUp.Apply(up, reflected);
        for (int i = 0; i < n; i++)
            reflected[i] += upper.ReflectTop[i, incident];
        lower.TransmitDown.Apply(down, transmitted);
        return (reflected, transmitted);
    }

    private static Complex Phase(GratingWaves waves, int channel, double distanceNm)
        => Complex.Exp(Complex.ImaginaryOne * waves.Kz[channel % waves.OrderCount] * distanceNm);

    private static void Near(Complex expected, Complex found, double tolerance)
        => Assert.True((expected - found).Magnitude < tolerance, $"{expected} against {found}, {(expected - found).Magnitude:e1}");
}
