using System.Numerics;
using BarbuleOptics.Files;
using BarbuleOptics.Grating;
using BarbuleOptics.Grating.Batches;
using BarbuleOptics.Grating.Joining;
using BarbuleOptics.Grating.Multipoles.Lanes;
using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;
using Xunit;

namespace BarbuleOptics.Tests.Grating.Batches;

/// <summary>Packs of wavelengths against the readable solver at one and the same resolution: all that differs is rounding, measured below 3e-12
/// where elimination keeps its digits; 1e-10 leaves room for thin shells and touching rods.</summary>
public class PackAgreementTests
{
    private const double Tolerance = 1e-10;

    /// <summary>Hard ones, beside random ones: light near the surface, touching rods, thin shells, absorbing matrix, films between, a back.</summary>
    private static readonly (string Text, double Degrees)[] Hard =
    [
        ("[[layer]]\nform = \"rod\"\ndiameter = 120\nspacing = 170\nrows = 5\npitch = 150\nstacking = \"staggered\"\n", 89.5),
        ("[[layer]]\nform = \"rod\"\ndiameter = 150\nspacing = 150\nrows = 4\nrow_separation = 0\nstacking = \"staggered\"\n", 30),
        ("[[layer]]\nform = \"rod\"\ndiameter = 150\nlumen = 148\nspacing = 160\nrows = 3\npitch = 170\n", 50),
        ("[barbule]\nmatrix = { n = 1.58, k = 0.02 }\nbacking = { n = 1.6, k = 0.1 }\n[[layer]]\nform = \"rod\"\ndiameter = 130\nlumen = 70\nspacing = 150\nrows = 4\nrow_separation = 20\nstacking = \"staggered\"\ngap = 25\n", 40),
        ("[cortex]\nthickness = 130\n[[layer]]\nform = \"rod\"\ndiameter = 110\nspacing = 140\nrows = 2\npitch = 135\nstacking = \"staggered\"\ngap = 30\n[[layer]]\nform = \"film\"\nthickness = 60\ngap = 40\n[[layer]]\nform = \"rod\"\ndiameter = 90\nspacing = 140\n[back]\nthickness = 160\nbehind = \"air\"\ncoherent = true\n", 20),
        ("[[layer]]\nform = \"rod\"\ndiameter = 240\nspacing = 420\nrows = 3\npitch = 260\n", 15),
        ("[barbule]\nmatrix = { n = 1.55, k = 0 }\n[[layer]]\nform = \"rod\"\ndiameter = 120\nmaterial = { n = 1.55, k = 0 }\nspacing = 170\nrows = 2\npitch = 150\n", 10),
    ];

    [Theory]
    [InlineData(512)]
    [InlineData(256)]
    [InlineData(128)]
    [InlineData(64)]
    public void Packs_and_single_wavelengths_agree_at_equal_resolution(int bits)
    {
        LaneWidth width = LaneWidth.All.Single(one => one.Bits == bits);
        var random = new RandomSections(seed: 911);
        (string Text, double Degrees)[] cases = [.. Hard, .. Enumerable.Range(0, 40).Select(_ => (random.Rods(), random.Incidence()))];
        var counts = new Counts();
        for (int i = 0; i < cases.Length; i++)
            width.Invoke<Comparison, int>(new Comparison(cases[i].Text, cases[i].Degrees, 1 + i % width.Count, counts));
        Assert.True(counts.Compared > 60 * width.Count / 2, FormattableString.Invariant($"{counts.Compared} compared"));
        Assert.True(counts.Left <= 0.03 * counts.Compared, FormattableString.Invariant($"{counts.Left} left to the readable solver"));
    }

    /// <summary>Platelets, solid and walled, touching or apart. What several materials lose apart is integrated over crowded harmonics in packs and over
    /// plane waves alone: at six harmonics these differ by up to a few 1e-3.</summary>
    [Theory]
    [InlineData(512)]
    [InlineData(256)]
    [InlineData(128)]
    [InlineData(64)]
    public void Packs_and_single_wavelengths_agree_for_platelets(int bits)
    {
        LaneWidth width = LaneWidth.All.Single(one => one.Bits == bits);
        var random = new RandomSections(seed: 912);
        var counts = new Counts();
        for (int i = 0; i < 24; i++)
            width.Invoke<Comparison, int>(new Comparison(random.Platelets(), random.Incidence(), 1 + i % width.Count, counts, materialTolerance: 5e-3));
        Assert.True(counts.Compared > 40 * width.Count / 2, FormattableString.Invariant($"{counts.Compared} compared"));
        Assert.True(counts.Left <= 0.03 * counts.Compared, FormattableString.Invariant($"{counts.Left} left to the readable solver"));
    }

    /// <summary>What was compared, and what the pack would not answer.</summary>
    private sealed class Counts
    {
        public int Compared { get; set; }

        public int Left { get; set; }
    }

    /// <summary>One structure at some wavelengths, both fields.</summary>
    private readonly struct Comparison(string text, double degrees, int count, Counts counts, double materialTolerance = Tolerance) : ILaneAction<int>
    {
        public int Invoke<TLanes>()
            where TLanes : struct, ILanes<TLanes>
        {
            Section section = GratingCase.Of(text).Section;
            if (BatchPlan.TryOf(StackPlan.Of(section)) is not BatchPlan plan)
                return 0;
            int lanes = Math.Min(count, TLanes.Count), first = 313 + (text.Length % 97);
            var structure = new SectionPermittivities(section, EmbeddedMaterials.Catalog, [.. Enumerable.Range(0, lanes).Select(i => first + 53.7 * i)]);
            var pack = new PackLanes<TLanes>();
            pack.Set(structure, [.. Enumerable.Range(0, lanes)]);
            var layout = new OutcomeLayout(structure.MaterialCount, -1, 3, 3);
            double sine = Math.Sin(double.DegreesToRadians(degrees)), cosine = Math.Sin(double.DegreesToRadians(90 - degrees));
            var request = new BatchRequest(structure, 0, lanes, sine, cosine, 1e-6, FindsTransmitted: true, FindsLost: true, layout);
            var resolution = new Resolution(4, 5, 6, 1);
            var solver = new PackSolver<TLanes>(plan);
            double[] found = new double[lanes * layout.Length], expected = new double[layout.Length];
            foreach (RodField field in (ReadOnlySpan<RodField>)[RodField.Electric, RodField.Magnetic])
            {
                solver.Solve(pack, request, resolution, field, found);
                for (int lane = 0; lane < lanes; lane++)
                {
                    counts.Compared++;
                    Span<double> answer = found.AsSpan(lane * layout.Length, layout.Length);
                    if (double.IsNaN(answer[OutcomeLayout.Error]))
                    {
                        counts.Left++;
                        continue;
                    }
                    SolveAlone(plan, structure, lane, sine, cosine, resolution, field, layout, expected);
                    for (int i = 0; i < layout.Length; i++)
                    {
                        bool isMaterial = i >= OutcomeLayout.FirstMaterial && i < OutcomeLayout.FirstMaterial + layout.Materials;
                        Assert.True(Math.Abs(answer[i] - expected[i]) <= (isMaterial ? materialTolerance : Tolerance), FormattableString.Invariant(
                            $"number {i}: {answer[i]}, alone {expected[i]} at {structure.WavelengthsNm[lane]} nm, {degrees} deg, {field}, {TLanes.Count} lanes, of {text}"));
                    }
                }
            }
            return 0;
        }

        private static void SolveAlone(
            BatchPlan plan, SectionPermittivities structure, int wavelength, double sine, double cosine, in Resolution resolution, RodField field,
            in OutcomeLayout layout, double[] expected)
        {
            double index = structure.SurroundIndex[wavelength];
            var light = new PointLight(structure.WavelengthsNm[wavelength], index, sine, 0, cosine);
            Complex backing = structure.Backing[wavelength];
            Complex[] media = [.. structure.Inside(wavelength), index * index, backing, structure.Behind.IsEmpty ? backing : structure.Behind[wavelength]];
            var solver = new PointSolver(plan.Stack);
            Assert.True(solver.TrySolve(light, media, resolution, field, plan.PeriodNm, plan.PeriodNm, layout, expected, []));
            Assert.True(solver.TrySplitLosses(layout, expected, [], both: false));
            expected[OutcomeLayout.Error] = 0;
        }
    }
}
