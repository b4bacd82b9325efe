using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;
using Xunit;

namespace BarbuleOptics.Tests.Multilayer;

/// <summary>Many stacks at once against the reference, one at a time.</summary>
public sealed class FilmEnsembleTests
{
    // Found: 2e-15 for the films of barbules, 2e-13 over the random media.
    private const double Tolerance = 1e-12;

    private static readonly ReferenceFilmSolver Reference = new();

    public static TheoryData<int> Widths => [512, 256, 128, 64];

    // Even and odd numbers of stacks, tables or none (below 16 stacks), tails of every length, media of every kind, zero thickness.
    [Theory]
    [MemberData(nameof(Widths))]
    public void Stacks_agree_with_the_reference(int bits)
    {
        var stacks = new RandomSpectralStacks(77);
        var random = new Random(5);
        int[] counts = [1, 15, 16, 17, 40];
        for (int i = 0; i < 60; i++)
        {
            (FilmStack template, double degrees) = stacks.Next(1 + i % 19);
            AssertAgree(new FilmEnsemble(template, 40, LaneWidth.Parse($"{bits}")!.Value), template, degrees, counts[i % 5], 150 * random.NextDouble(), random);
        }
    }

    // A film so thick that nodes would fill memory, and a mirror that the error bound gives up: both are solved one by one.
    [Theory]
    [InlineData(1, 1e6)]
    [InlineData(30, 100)]
    public void What_nodes_do_not_cover_agrees(int pairs, double thickestNm)
    {
        Film high = Film.OfIndex(2.3, 54), low = Film.OfIndex(1.35, 92);
        FilmStack template = TestStack.OnIndex(1, 1.52, [.. Enumerable.Range(0, 2 * pairs).Select(i => i % 2 == 0 ? high : low)]).Build();
        AssertAgree(new FilmEnsemble(template, 20), template, 35, 20, thickestNm, new Random(8));
    }

    [Fact]
    public void A_call_allocates_nothing()
    {
        var ensemble = new FilmEnsemble(TestStackOfTwo(), 32);
        double[] thicknessesNm = [.. Enumerable.Range(0, 64).Select(i => 20.0 + i)], reflectance = new double[32];
        long least = long.MaxValue;
        for (int i = 0; i < 5; i++)
        {
            long before = GC.GetAllocatedBytesForCurrentThread();
            ensemble.Solve(Angle.FromDegrees(30), Polarizations.Unpolarized, thicknessesNm, reflectance);
            least = Math.Min(least, GC.GetAllocatedBytesForCurrentThread() - before);
        }
        Assert.Equal(0, least);
    }

    [Fact]
    public void Wrong_lengths_are_refused()
    {
        var ensemble = new FilmEnsemble(TestStackOfTwo(), 3);
        Assert.Throws<ArgumentException>(() => ensemble.Solve(Angle.FromDegrees(0), Polarizations.S, new double[5], new double[3]));
        Assert.Throws<ArgumentException>(() => ensemble.Solve(Angle.FromDegrees(0), Polarizations.S, new double[4], new double[3]));
        Assert.Throws<ArgumentOutOfRangeException>(() => ensemble.Solve(Angle.FromDegrees(0), Polarizations.S, new double[8], new double[4]));
        Assert.Throws<ArgumentOutOfRangeException>(() => ensemble.Solve(Angle.FromDegrees(0), Polarizations.S, [1, -1], new double[1]));
        Assert.Throws<ArgumentOutOfRangeException>(() => ensemble.Solve(Angle.FromDegrees(90), Polarizations.S, [1, 1], new double[1]));
    }

    private static FilmStack TestStackOfTwo() => TestStack.OnIndex(1, 1.55, Film.OfIndex(1.55, 100), Film.OfIndex(new(1.7, .1), 100)).Build();

    private static void AssertAgree(FilmEnsemble ensemble, FilmStack template, double degrees, int stacks, double thickestNm, Random random)
    {
        int films = template.FilmCount, wavelengths = template.WavelengthsNm.Length;
        double[] thicknessesNm = [.. Enumerable.Range(0, stacks * films).Select(_ => random.Next(6) == 0 ? 0 : thickestNm * random.NextDouble())];
        double[] reflectance = new double[stacks * wavelengths], expected = new double[wavelengths];
        foreach (Polarizations polarization in (Polarizations[])[Polarizations.S, Polarizations.P, Polarizations.Unpolarized])
        {
            Assert.InRange(ensemble.Solve(Angle.FromDegrees(degrees), polarization, thicknessesNm, reflectance), 1e-16, 1e-10);
            for (int stack = 0; stack < stacks; stack++)
            {
                FilmStack one = template.WithThicknesses(thicknessesNm.AsSpan(stack * films, films));
                var request = new SolverRequest(0, wavelengths, Angle.FromDegrees(degrees), polarization, SolverOutputs.Reflectance);
                Reference.Solve(one, request, Reference.CreateWorkspace(one), new SolverResponse { Reflectance = expected });
                for (int w = 0; w < wavelengths; w++)
                    Assert.Equal(expected[w], reflectance[stack * wavelengths + w], Tolerance);
            }
        }
    }
}
