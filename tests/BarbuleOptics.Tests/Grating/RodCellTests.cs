using System.Numerics;
using BarbuleOptics.Grating;
using BarbuleOptics.Grating.Joining;
using BarbuleOptics.Multilayer;
using Xunit;

namespace BarbuleOptics.Tests.Grating;

/// <summary>Rows with several round rods side by side in each cell.</summary>
public class RodCellTests
{
    private static readonly Complex Keratin = TestRow.Index(1.55);
    private static readonly Complex Melanin = TestRow.Index(1.75, 0.1);

    public static TheoryData<int> Seeds => [.. Enumerable.Range(1, 40)];

    public static TheoryData<int, string, string> EqualRods()
    {
        var cases = new TheoryData<int, string, string>();
        foreach (int parts in (int[])[2, 3, 4])
        {
            foreach (string field in Enum.GetNames<RodField>())
            {
                foreach (string light in Lights.Keys)
                    cases.Add(parts, field, light);
            }
        }
        return cases;
    }

    // kx0/k0 and wavelength in periods of the single rods.
    private static readonly Dictionary<string, (double Across, double Wavelengths)> Lights = new()
    {
        ["usual"] = (0.24, 2.9),
        ["straight"] = (0, 2.5),
        ["grazing order of the cell of two"] = (0, 2 * 1.55),
        ["grazing orders of the cell of two and of the rods"] = (0, 1.55 * (1 - 1e-9)),
        ["nearly grazing light"] = (1.55 * 0.9995, 2.7),
        ["grazing light"] = (1.55 * (1 - 1e-13), 2.7),
    };

    // Equal rods at equal distances are a row of a shorter period: orders n = q + b n' answer each other as orders n' of that row in waves
    // kx0 + 2 pi q/P, and no others. Largest difference measured: 1.1e-15.
    [Theory]
    [MemberData(nameof(EqualRods))]
    public void Equal_rods_are_a_row_of_shorter_period(int parts, string fieldName, string lightName)
    {
        RodField field = Enum.Parse<RodField>(fieldName);
        (double across, double wavelengths) = Lights[lightName];
        double along = field == RodField.Both ? 0.4 : 0, index = Math.Sqrt(1.55 * 1.55 - along * along) / 1.55;
        const double period = 170;
        var light = new TestRow(70, parts * period, Keratin, Melanin)
        {
            Across = across * index, Along = along, WavelengthNm = wavelengths * index * period, Field = field, Multipoles = 12, Orders = 6, XNm = 11, TopNm = 66, BottomNm = 71,
        };
        GratingWaves waves = light.Waves();
        ScatteringBlock whole = new TestCell(light, parts, [.. Enumerable.Range(0, parts).Select(place => new TestCell.Rod(place, 70, 30))]).Scatter();
        var seen = new bool[waves.ChannelCount, waves.ChannelCount];
        double worst = 0;
        for (int q = 0; q < parts; q++)
        {
            TestRow row = light with { PeriodNm = period, CoreRadiusNm = 30, Across = waves.KxOf(q) / waves.K0, Orders = 9 / parts };
            ScatteringBlock single = row.Scatter();
            int orders = row.Orders;
            for (int i = 0; i < single.Channels; i++)
            {
                for (int j = 0; j < single.Channels; j++)
                {
                    if (Whole(i) is int to && Whole(j) is int from)
                    {
                        seen[to, from] = true;
                        worst = Math.Max(worst, Difference(single, i, j, whole, to, from));
                    }
                }
            }

            int? Whole(int channel)
            {
                int order = q + parts * (channel % (2 * orders + 1) - orders);
                return Math.Abs(order) > light.Orders ? null : order + light.Orders + channel / (2 * orders + 1) * waves.OrderCount;
            }
        }
        for (int i = 0; i < waves.ChannelCount; i++)
        {
            for (int j = 0; j < waves.ChannelCount; j++)
            {
                bool related = (i % waves.OrderCount - j % waves.OrderCount) % parts == 0;
                Assert.True(seen[i, j] == related);
                if (!related)
                    worst = Math.Max(worst, whole.ReflectTop[i, j].Magnitude + whole.TransmitDown[i, j].Magnitude);
            }
        }
        Assert.True(worst < 1e-13, $"{worst:e1}");
    }

    // A rod of the matrix's own material is not there, however little room it has or leaves. Largest difference measured: 1e-15.
    [Theory]
    [InlineData(nameof(RodField.Electric), 60, 50)]
    [InlineData(nameof(RodField.Magnetic), 60, 50)]
    [InlineData(nameof(RodField.Both), 60, 50)]
    [InlineData(nameof(RodField.Both), 109, 1)]
    public void Rods_of_the_matrix_material_leave_the_others_alone(string fieldName, double radiusNm, double otherNm)
    {
        RodField field = Enum.Parse<RodField>(fieldName);
        foreach ((int parts, int place) in ((int, int)[])[(2, 1), (3, 2), (4, 3)])
        {
            var light = new TestRow(radiusNm * 2 / parts, 220, Keratin, Melanin)
            {
                CoreRadiusNm = 20 / parts, WavelengthNm = 410, Across = 0.3, Along = field == RodField.Both ? 0.5 : 0, Field = field, Multipoles = 26, Orders = 3,
                TopNm = radiusNm, BottomNm = radiusNm,
            };
            var cell = new TestCell(light, parts, [new(0, light.RadiusNm, light.CoreRadiusNm), new(place, otherNm * 2 / parts, 0, 0)]);
            Assert.True(Largest(light.Scatter(), cell.Scatter()) < 1e-13, $"{Largest(light.Scatter(), cell.Scatter()):e1}");
        }
    }

    // Waves of all orders from both sides, propagating and evanescent. Largest defect measured: 8e-16 of the power at stake.
    [Theory]
    [MemberData(nameof(Seeds))]
    public void Power_entering_is_power_lost(int seed)
    {
        var random = new Random(seed);
        TestCell cell = RandomCell(random, absorbing: seed % 3 != 0, absorbingMatrix: seed % 3 == 2);
        GratingWaves waves = cell.Light.Waves();
        var block = new ScatteringBlock(waves.ChannelCount);
        IGratingElement element = cell.Element();
        Assert.True(element.TryScatter(waves, cell.Light.Resolution, block));
        Complex[] down = PlanePower.Random(waves.ChannelCount, random), up = PlanePower.Random(waves.ChannelCount, random);
        var lost = new double[3];
        element.AddLoss(waves, cell.Light.Resolution, down, up, lost);
        double entering = PlanePower.Entering(waves, block, down, up);
        double size = waves.K0 * waves.ChannelCount;
        Assert.True(Math.Abs(entering - lost.Sum()) < 3e-14 * size, $"{cell}: enters {entering}, lost {lost.Sum()}, defect {(entering - lost.Sum()) / size:e1}");
        Assert.All(lost, share => Assert.True(share > -1e-14 * size || cell.Light.Matrix.Imaginary > 0, $"{cell}: a material gives power, {share}"));
    }

    // Largest defect measured: 2.3e-16.
    [Theory]
    [MemberData(nameof(Seeds))]
    public void Source_and_receiver_can_be_exchanged(int seed)
    {
        var random = new Random(seed);
        TestCell cell = RandomCell(random, absorbing: true, absorbingMatrix: seed % 2 == 0);
        TestCell reverse = cell with { Light = cell.Light with { Across = -cell.Light.Across, Along = -cell.Light.Along } };
        double defect = Reversal.Defect(cell.Light.Waves(), cell.Scatter(), reverse.Scatter());
        Assert.True(defect < 1e-14, $"{cell}: {defect:e1}");
    }

    // Computed twice by independent methods: fundamental solutions know no multipoles and no lattice sums.
    // Largest difference measured: 2e-10, from an evanescent incident wave.
    [Theory]
    [InlineData(nameof(RodField.Electric))]
    [InlineData(nameof(RodField.Magnetic))]
    [InlineData(nameof(RodField.Both))]
    public void Different_rods_match_fundamental_solutions(string fieldName)
    {
        RodField field = Enum.Parse<RodField>(fieldName);
        var light = new TestRow(60, 340, new Complex(2.4, 0.9), new Complex(3.1, 0.35))
        {
            WavelengthNm = 500, Across = 0.24, Along = field == RodField.Both ? 0.5 : 0, XNm = 13, TopNm = 55, BottomNm = 50, Multipoles = 14, Orders = 3, Field = field,
        };
        foreach ((int parts, TestCell.Rod[] rods) in ((int, TestCell.Rod[])[])
            [(2, [new(0, 60, 25), new(1, 50)]), (4, [new(0, 40), new(1, 30, 10), new(2, 35)])])
        {
            var cell = new TestCell(light, parts, rods);
            GratingWaves waves = light.Waves();
            ScatteringBlock block = cell.Scatter();
            var second = new FundamentalSolutions(
                waves, [.. rods.Select(rod => new FundamentalSolutions.Body(cell.PlaceNm(rod), 0, rod.RadiusNm, rod.RadiusNm, rod.CoreRadiusNm, rod.CoreRadiusNm, 1, 2))], 30, 0.7);
            foreach (int channel in field == RodField.Both ? [3, 9] : new[] { 3, 4 })
            {
                (Complex[] above, Complex[] below) = second.Solve(channel);
                Complex entrance = Phase(waves, channel, 55);
                for (int c = 0; c < waves.ChannelCount; c++)
                {
                    Complex direct = c == channel ? 1 : 0;
                    Near(above[c] * Phase(waves, c, 55) * entrance, block.ReflectTop[c, channel], 1e-9);
                    Near((below[c] + direct) * Phase(waves, c, 50) * entrance, block.TransmitDown[c, channel], 1e-9);
                }
            }
        }
    }

    // Computed twice by independent methods. Slabs of 20 harmonics; differences measured: 3.7e-6, 3.4e-5, 2.8e-5.
    [Theory]
    [InlineData(nameof(RodField.Electric), 1e-5)]
    [InlineData(nameof(RodField.Magnetic), 1e-4)]
    [InlineData(nameof(RodField.Both), 1e-4)]
    public void Different_rods_match_modal_slabs(string fieldName, double tolerance)
    {
        RodField field = Enum.Parse<RodField>(fieldName);
        var light = new TestRow(70, 280, Keratin, Melanin)
        {
            WavelengthNm = 450, Across = field == RodField.Both ? 0 : 0.3, Along = field == RodField.Both ? 0.5 : 0, Multipoles = 14, Orders = 1, Field = field,
        };
        var cell = new TestCell(light, 2, [new(0, 70, 35), new(1, 55, 25)]);
        double difference = Largest(cell.ScatterModal(20, 2), cell.Scatter());
        Assert.True(difference < tolerance, $"{difference:e1}");
    }

    private const string TwoSizes = """
        [cortex]
        thickness = 120
        [[layer]]
        spacing = 280
        rows = 2
        pitch = 150
        stacking = "staggered"
        [[layer.body]]
        form = "rod"
        diameter = 140
        lumen = 70
        [[layer.body]]
        form = "rod"
        diameter = 110
        """;

    // Whole sections, with light across, along and between; slabs share only the joining of pieces.
    [Theory]
    [InlineData(0)]
    [InlineData(90)]
    [InlineData(35)]
    public void Sections_match_those_of_slabs_within_the_estimates(double axisDegrees)
    {
        GratingCase section = GratingCase.Of(TwoSizes + "\nx = 0.5").At(axisDegrees);
        Assert.All(StackPlan.Of(section.Section).Kinds, kind => Assert.IsType<RodKind>(kind));
        GratingAnswer rods = section.Solve(470, 30, Polarizations.P, 1e-6), slabs = section.Solve(470, 30, Polarizations.P, 3e-3, slabsOnly: true);
        Assert.True(rods.Error <= 1e-6, $"{rods}");
        Assert.True(rods.Difference(slabs) <= rods.Error + slabs.Error, $"{rods} not {slabs}");
    }

    [Theory]
    [InlineData("x = 0.46", typeof(SlabKind), 1)]
    [InlineData("x = 0.5\nz = 3", typeof(SlabKind), 1)]
    [InlineData("x = 0.5\nz = 75", typeof(RodKind), 2)]
    [InlineData("x = 0.5", typeof(RodKind), 1)]
    [InlineData("x = -0.5", typeof(RodKind), 1)]
    public void Rods_of_a_cell_are_one_row_at_one_depth_and_parts_of_the_spacing(string place, Type kind, int kinds)
    {
        StackPlan plan = StackPlan.Of(GratingCase.Of(TwoSizes.Replace("staggered", "aligned", StringComparison.Ordinal).Replace("pitch = 150", "pitch = 310", StringComparison.Ordinal) + "\n" + place).Section);
        Assert.Equal(kinds, plan.Kinds.Length);
        Assert.All(plan.Kinds, one => Assert.IsType(kind, one));
    }

    private static TestCell RandomCell(Random random, bool absorbing, bool absorbingMatrix)
    {
        int parts = 2 + random.Next(3);
        double period = 150 + 400 * random.NextDouble(), most = period / parts, share = 0.2 + 0.6 * random.NextDouble();
        var field = (RodField)random.Next(3);
        double angle = random.NextDouble() * 2 * Math.PI, transverse = 0.95 * random.NextDouble();
        double largest = 0.95 * most * Math.Max(share, 1 - share);
        var light = new TestRow(largest, period, TestRow.Index(1.3 + 0.4 * random.NextDouble(), absorbingMatrix ? 0.2 : 0), TestRow.Index(1.2 + random.NextDouble(), absorbing ? 0.3 : 0))
        {
            Core = random.Next(2) == 0 ? Complex.One : TestRow.Index(1.4, absorbing ? 0.1 : 0),
            WavelengthNm = 350 + 400 * random.NextDouble(),
            Across = field == RodField.Both ? transverse * Math.Cos(angle) : transverse,
            Along = field == RodField.Both ? transverse * Math.Sin(angle) : 0,
            XNm = period * random.NextDouble(),
            TopNm = largest * (0.8 + random.NextDouble()),
            BottomNm = largest * (0.8 + random.NextDouble()),
            Multipoles = 3 + random.Next(8),
            Orders = 3,
            Field = field,
        };
        // Places 0, 1 and, where there are four, 2: neighbors share their distance.
        double first = 0.95 * share * most, second = 0.95 * (1 - share) * most;
        var rods = new List<TestCell.Rod> { new(0, first, random.Next(2) == 0 ? 0 : 0.6 * first), new(1, second, random.Next(2) == 0 ? 0 : 0.5 * second, 2, 1) };
        if (parts == 4)
            rods.Add(new(2, first));
        return new TestCell(light, parts, [.. rods]);
    }

    private static double Largest(ScatteringBlock expected, ScatteringBlock found)
    {
        double worst = 0;
        for (int i = 0; i < expected.Channels; i++)
        {
            for (int j = 0; j < expected.Channels; j++)
                worst = Math.Max(worst, Difference(expected, i, j, found, i, j));
        }
        return worst;
    }

    private static double Difference(ScatteringBlock expected, int i, int j, ScatteringBlock found, int to, int from)
    {
        double worst = (expected.ReflectTop[i, j] - found.ReflectTop[to, from]).Magnitude;
        worst = Math.Max(worst, (expected.ReflectBottom[i, j] - found.ReflectBottom[to, from]).Magnitude);
        worst = Math.Max(worst, (expected.TransmitDown[i, j] - found.TransmitDown[to, from]).Magnitude);
        return Math.Max(worst, (expected.TransmitUp[i, j] - found.TransmitUp[to, from]).Magnitude);
    }

    private static Complex Phase(GratingWaves waves, int channel, double distanceNm)
        => Complex.Exp(Complex.ImaginaryOne * waves.Kz[channel % waves.OrderCount] * distanceNm);

    private static void Near(Complex expected, Complex found, double tolerance)
        => Assert.True((expected - found).Magnitude < tolerance, $"{expected} against {found}, {(expected - found).Magnitude:e1}");
}
