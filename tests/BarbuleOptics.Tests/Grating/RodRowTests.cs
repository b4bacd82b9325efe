using System.Numerics;
using BarbuleOptics.Grating;
using BarbuleOptics.Grating.Multipoles;
using Xunit;

namespace BarbuleOptics.Tests.Grating;

/// <summary>Rows of round rods: conservation laws, symmetries and limits that hold whatever the numbers.</summary>
public class RodRowTests
{
    private static readonly Complex Keratin = TestRow.Index(1.55);
    private static readonly Complex Melanin = TestRow.Index(1.75, 0.1);

    public static TheoryData<int> Seeds => [.. Enumerable.Range(1, 40)];

    // Waves of all orders from both sides, propagating and evanescent. Largest defect in 400 such rows: 2.3e-15 of the power at stake.
    [Theory]
    [MemberData(nameof(Seeds))]
    public void Power_entering_is_power_lost(int seed)
    {
        var random = new Random(seed);
        TestRow row = RandomRow(random, absorbing: seed % 3 != 0, absorbingMatrix: seed % 3 == 2);
        GratingWaves waves = row.Waves();
        var block = new ScatteringBlock(waves.ChannelCount);
        RodRow element = row.Element();
        Assert.True(element.TryScatter(waves, row.Resolution, block));
        Complex[] down = PlanePower.Random(waves.ChannelCount, random), up = PlanePower.Random(waves.ChannelCount, random);
        var lost = new double[3];
        element.AddLoss(waves, row.Resolution, down, up, lost);
        double entering = PlanePower.Entering(waves, block, down, up);
        double size = waves.K0 * waves.ChannelCount;
        Assert.True(Math.Abs(entering - lost.Sum()) < 3e-14 * size, $"{row}: enters {entering}, lost {lost.Sum()}, defect {(entering - lost.Sum()) / size:e1}");
        Assert.All(lost, share => Assert.True(share > -1e-14 * size || row.Matrix.Imaginary > 0, $"{row}: a material gives power, {share}"));
    }

    // Exchange of source and receiver: weighted by the admittances of the channels, all wave vectors reversed.
    // Largest defect in 400 such rows: 6e-16.
    [Theory]
    [MemberData(nameof(Seeds))]
    public void Source_and_receiver_can_be_exchanged(int seed)
    {
        var random = new Random(seed);
        TestRow row = RandomRow(random, absorbing: true, absorbingMatrix: seed % 2 == 0);
        TestRow reverse = row with { Across = -row.Across, Along = -row.Along };
        double defect = Reversal.Defect(row.Waves(), row.Scatter(), reverse.Scatter());
        Assert.True(defect < 1e-14, $"{row}: {defect:e1}");
    }

    // ky so small that it changes nothing but the road taken: the coupled equations against the planar ones. The difference is of
    // order ky/k0 in the coupling, its square elsewhere.
    [Theory]
    [InlineData(0)]
    [InlineData(35)]
    public void Oblique_light_becomes_planar(double coreRadiusNm)
    {
        var row = new TestRow(60, 170, Keratin, Melanin) { CoreRadiusNm = coreRadiusNm, WavelengthNm = 430, Across = 0.7 };
        ScatteringBlock both = (row with { Field = RodField.Both, Along = 1e-8 }).Scatter();
        ScatteringBlock electric = (row with { Field = RodField.Electric }).Scatter(), magnetic = (row with { Field = RodField.Magnetic }).Scatter();
        int orders = 2 * row.Orders + 1;
        for (int i = 0; i < orders; i++)
        {
            for (int j = 0; j < orders; j++)
            {
                Near(electric.ReflectTop[i, j], both.ReflectTop[i, j], 1e-13);
                Near(electric.TransmitDown[i, j], both.TransmitDown[i, j], 1e-13);
                Near(magnetic.ReflectTop[i, j], both.ReflectTop[i + orders, j + orders], 1e-13);
                Near(magnetic.TransmitUp[i, j], both.TransmitUp[i + orders, j + orders], 1e-13);
                Near(0, both.ReflectTop[i, j + orders], 1e-6);
            }
        }
    }

    // A rod of the matrix's own material, hollow with the same again, is not there. Largest difference measured: 1e-15.
    [Theory]
    [InlineData(nameof(RodField.Electric))]
    [InlineData(nameof(RodField.Magnetic))]
    [InlineData(nameof(RodField.Both))]
    public void Rods_of_the_matrix_material_are_not_there(string fieldName)
    {
        RodField field = Enum.Parse<RodField>(fieldName);
        var row = new TestRow(60, 130, Melanin, Melanin)
        {
            Core = Melanin, CoreRadiusNm = 30, WavelengthNm = 400, Across = 0.5, Along = field == RodField.Both ? 0.4 : 0, Field = field, TopNm = 80,
        };
        GratingWaves waves = row.Waves();
        ScatteringBlock block = row.Scatter();
        for (int i = 0; i < waves.ChannelCount; i++)
        {
            for (int j = 0; j < waves.ChannelCount; j++)
            {
                Complex through = i == j ? Complex.Exp(Complex.ImaginaryOne * waves.Kz[i % waves.OrderCount] * 140) : 0;
                Near(through, block.TransmitDown[i, j], 1e-13);
                Near(through, block.TransmitUp[i, j], 1e-13);
                Near(0, block.ReflectTop[i, j], 1e-13);
            }
        }
    }

    // A core as wide as the rod but for a trillionth is a rod of the core's material; one of nearly no width is a solid rod.
    [Theory]
    [InlineData(nameof(RodField.Electric))]
    [InlineData(nameof(RodField.Magnetic))]
    [InlineData(nameof(RodField.Both))]
    public void Core_of_full_or_no_width_is_a_solid_rod(string fieldName)
    {
        RodField field = Enum.Parse<RodField>(fieldName);
        var row = new TestRow(60, 130, Keratin, Melanin)
        {
            CoreRadiusNm = 60 * (1 - 1e-12), WavelengthNm = 400, Across = 0.5, Along = field == RodField.Both ? 0.4 : 0, Field = field, Orders = 1,
        };
        Same((row with { CoreRadiusNm = 0, Rod = Complex.One }).Scatter(), row.Scatter(), 1e-11);
        Same((row with { CoreRadiusNm = 0 }).Scatter(), (row with { CoreRadiusNm = 1e-5 }).Scatter(), 1e-11);
    }

    // Power falls as the square of what the row sends: with rods far thinner than the light, one plane of dipoles. E along the rods:
    // amplitude i (e - em) k0^2 pi a^2/(2 P kz); H along the rods, normal incidence: i k pi a^2 d/(P (1 - d pi^2 a^2/(3 P^2))), d = (e - em)/(e + em),
    // with the field of the other dipoles (Rayleigh, Phil. Mag. 34 (1892) 481, for one row; derived anew). Corrections are of
    // order (k P)^2 and (a/P)^8. Largest difference measured: 3e-6.
    [Theory]
    [InlineData(0.1)]
    [InlineData(0.2)]
    public void Thin_rods_are_dipoles(double fill)
    {
        const double period = 0.5, wavelength = 500;
        Complex rod = TestRow.Index(2, 0.3);
        var row = new TestRow(fill * period, period, Keratin, rod) { WavelengthNm = wavelength, TopNm = 0.5, BottomNm = 0.5 };
        double k0 = 2 * Math.PI / wavelength, area = Math.PI * fill * fill * period;
        Complex electric = (row with { Field = RodField.Electric, Orders = 0 }).Scatter().ReflectTop[0, 0];
        Complex magnetic = (row with { Field = RodField.Magnetic, Orders = 0 }).Scatter().ReflectTop[0, 0];
        Complex phase = Complex.Exp(new Complex(0, 2 * 0.5 * 1.55 * k0)), d = (rod - Keratin) / (rod + Keratin);
        Complex expectedE = Complex.ImaginaryOne * (rod - Keratin) * k0 * area / (2 * 1.55);
        // One order of (k P) further: the sheet's own radiation, r = x/(1 - x).
        Complex dipoles = Complex.ImaginaryOne * 1.55 * k0 * area * d / (1 - d * Math.PI * Math.PI / 3 * fill * fill);
        Assert.True((electric / phase / (expectedE / (1 - expectedE)) - 1).Magnitude < 5e-6, $"{electric / phase / expectedE - 1}");
        Assert.True((magnetic / phase / (-dipoles / (1 - dipoles)) - 1).Magnitude < 5e-6, $"{magnetic / phase / -dipoles - 1}");
    }

    // The row moved along x and its planes moved: only phases change.
    [Fact]
    public void Moving_the_row_or_its_planes_turns_phases()
    {
        var row = new TestRow(60, 170, Keratin, Melanin) { WavelengthNm = 430, Across = 0.7, Along = 0.3, Field = RodField.Both };
        TestRow moved = row with { XNm = 31, TopNm = 50, BottomNm = 75 };
        ScatteringBlock here = row.Scatter(), there = moved.Scatter();
        GratingWaves waves = row.Waves();
        for (int i = 0; i < waves.ChannelCount; i++)
        {
            for (int j = 0; j < waves.ChannelCount; j++)
            {
                int n = i % waves.OrderCount, m = j % waves.OrderCount;
                Complex side = Complex.Exp(new Complex(0, 31 * (waves.Kx[m] - waves.Kx[n])));
                Complex upper = Complex.Exp(Complex.ImaginaryOne * -10 * (waves.Kz[n] + waves.Kz[m])), lower = Complex.Exp(Complex.ImaginaryOne * 15 * (waves.Kz[n] + waves.Kz[m]));
                Complex across = Complex.Exp(Complex.ImaginaryOne * (15 * waves.Kz[n] - 10 * waves.Kz[m]));
                Near(here.ReflectTop[i, j] * side * upper, there.ReflectTop[i, j], 1e-12);
                Near(here.ReflectBottom[i, j] * side * lower, there.ReflectBottom[i, j], 1e-12);
                Near(here.TransmitDown[i, j] * side * across, there.TransmitDown[i, j], 1e-12);
            }
        }
    }

    // Nothing is left over from a call with other waves, resolution or field.
    [Fact]
    public void Element_and_sums_can_be_used_again()
    {
        var sums = new LatticeSums();
        var row = new TestRow(60, 170, Keratin, Melanin) { CoreRadiusNm = 30, WavelengthNm = 430, Across = 0.7, Multipoles = 6 };
        RodRow element = row.Element(sums);
        TestRow[] calls =
        [
            row, row with { Across = 0.2 }, row with { Multipoles = 9 }, row with { Multipoles = 6, WavelengthNm = 600 }, row with { Field = RodField.Magnetic },
            row with { Field = RodField.Both, Along = 0.3 }, row with { Orders = 4 }, row with { Rod = Keratin }, row with { WavelengthNm = 170 * 1.55, Across = 0 }, row,
        ];
        foreach (TestRow call in calls)
        {
            GratingWaves waves = call.Waves();
            var block = new ScatteringBlock(waves.ChannelCount);
            Assert.True(element.TryScatter(waves, call.Resolution, block));
            Same(call.Scatter(), block, 1e-13);
        }
    }

    public static TheoryData<string, string> Extremes()
    {
        var cases = new TheoryData<string, string>();
        foreach (string name in ExtremeRows.Keys)
        {
            foreach (string field in Enum.GetNames<RodField>())
                cases.Add(name, field);
        }
        return cases;
    }

    private static readonly Dictionary<string, TestRow> ExtremeRows = new()
    {
        ["touching"] = new(85, 170, Keratin, Melanin) { WavelengthNm = 430, Across = 0.7, Multipoles = 30 },
        ["touching, planes through the centers' neighborhood"] = new(85, 170, Keratin, Melanin) { WavelengthNm = 430, Across = 0.7, Multipoles = 20, Orders = 15, TopNm = 20, BottomNm = 20 },
        ["core almost as wide"] = new(80, 170, Keratin, TestRow.Index(1.8, 4)) { CoreRadiusNm = 80 * 0.999, WavelengthNm = 430, Multipoles = 20 },
        ["high contrast"] = new(60, 170, Complex.One, TestRow.Index(12)) { WavelengthNm = 430, Across = 0.3, Multipoles = 30 },
        ["metal"] = new(60, 170, Complex.One, TestRow.Index(0.05, 4)) { WavelengthNm = 430, Across = 0.3, Multipoles = 30 },
        ["opening order"] = new(60, 170, Keratin, Melanin) { WavelengthNm = 170 * 1.55, Multipoles = 12 },
        ["opening order on one side"] = new(60, 170, Keratin, Melanin) { WavelengthNm = 170 * (1.55 + 0.5), Across = 0.5, Multipoles = 12 },
        ["grazing light"] = new(60, 170, Keratin, Melanin) { WavelengthNm = 430, Across = 1.55 * (1 - 1e-15), Multipoles = 12 },
        ["period far below the wavelength"] = new(0.05, 0.15, Keratin, Melanin) { CoreRadiusNm = 0.03, WavelengthNm = 5000, Across = 0.3, Multipoles = 30, Orders = 15 },
        ["many orders"] = new(600, 1290, Keratin, Melanin) { CoreRadiusNm = 400, WavelengthNm = 430, Across = 0.3, Multipoles = 30, Orders = 15 },
        ["absorbing matrix"] = new(60, 170, TestRow.Index(1.5, 3), TestRow.Index(1.8, 4)) { CoreRadiusNm = 20, WavelengthNm = 300, Across = 0.3, Multipoles = 15 },
    };

    // All of them are solved. Largest defect measured: 5e-14,
    // and what rounding adds where planes close to the centers of wide rods make evanescent amplitudes large.
    [Theory]
    [MemberData(nameof(Extremes))]
    public void Extreme_rows_are_finite_and_closed_in_energy(string name, string fieldName)
    {
        RodField field = Enum.Parse<RodField>(fieldName);
        TestRow row = ExtremeRows[name] with { Field = field, Along = field == RodField.Both ? 0.2 : 0 };
        GratingWaves waves = row.Waves();
        var block = new ScatteringBlock(waves.ChannelCount);
        RodRow element = row.Element();
        Assert.True(element.TryScatter(waves, row.Resolution, block));
        var down = new Complex[waves.ChannelCount];
        var up = new Complex[waves.ChannelCount];
        down[row.Orders] = 1;
        var lost = new double[3];
        element.AddLoss(waves, row.Resolution, down, up, lost);
        double entering = PlanePower.Entering(waves, block, down, up);
        double tolerance = 1e-12 * waves.K0 + PlanePower.Rounding(waves, block, down, up);
        Assert.True(Math.Abs(entering - lost.Sum()) < tolerance, $"enters {entering}, lost {lost.Sum()}, defect {(entering - lost.Sum()) / waves.K0:e1}");
    }

    private static TestRow RandomRow(Random random, bool absorbing, bool absorbingMatrix)
    {
        double period = 100 + 300 * random.NextDouble(), radius = period * (0.15 + 0.3 * random.NextDouble());
        var field = (RodField)random.Next(3);
        double angle = random.NextDouble() * 2 * Math.PI, transverse = 0.95 * random.NextDouble();
        return new TestRow(radius, period, TestRow.Index(1.3 + 0.4 * random.NextDouble(), absorbingMatrix ? 0.2 : 0), TestRow.Index(1.2 + random.NextDouble(), absorbing ? 0.3 : 0))
        {
            CoreRadiusNm = random.Next(2) == 0 ? 0 : radius * random.NextDouble(),
            Core = random.Next(2) == 0 ? Complex.One : TestRow.Index(1.4, absorbing ? 0.1 : 0),
            WavelengthNm = 350 + 400 * random.NextDouble(),
            Across = field == RodField.Both ? transverse * Math.Cos(angle) : transverse,
            Along = field == RodField.Both ? transverse * Math.Sin(angle) : 0,
            XNm = period * random.NextDouble(),
            TopNm = radius * (0.7 + random.NextDouble()),
            BottomNm = radius * (0.7 + random.NextDouble()),
            Multipoles = 3 + random.Next(8),
            Orders = 3,
            Field = field,
        };
    }

    private static void Near(Complex expected, Complex found, double tolerance)
        => Assert.True((expected - found).Magnitude < tolerance, $"{expected} against {found}");

    private static void Same(ScatteringBlock expected, ScatteringBlock found, double tolerance)
    {
        for (int i = 0; i < expected.Channels * expected.Channels; i++)
        {
            Near(expected.ReflectTop.Elements[i], found.ReflectTop.Elements[i], tolerance);
            Near(expected.ReflectBottom.Elements[i], found.ReflectBottom.Elements[i], tolerance);
            Near(expected.TransmitDown.Elements[i], found.TransmitDown.Elements[i], tolerance);
            Near(expected.TransmitUp.Elements[i], found.TransmitUp.Elements[i], tolerance);
        }
    }
}
