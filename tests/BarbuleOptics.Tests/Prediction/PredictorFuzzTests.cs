using System.Diagnostics;
using System.Text;
using BarbuleOptics.Anatomy;
using BarbuleOptics.Files;
using BarbuleOptics.Layering.Mixing;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;
using BarbuleOptics.Tests.Files;
using BarbuleOptics.Tests.Samples;
using Xunit;

namespace BarbuleOptics.Tests.Prediction;

/// <summary>Whatever a file asks for: powers between 0 and 1 that close, or problems of one line; nothing thrown, no NaN, no hang.</summary>
public sealed class PredictorFuzzTests
{
    private const int Mutations = 5000;
    private const int Extremes = 2000;
    private const double LimitMs = 10_000;

    private static readonly double[] AnglesDeg = [0, 35, 89.9];

    // Of these 20,000, 3,039 are solved, the rest refused.
    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    public void Mutated_samples_are_solved_or_refused(int seed)
    {
        string[] texts = [.. SampleFiles.Names.Select(SampleFiles.Text)];
        var mutator = new StructureMutator(seed);
        int solved = 0;
        for (int i = 0; i < Mutations; i++)
            solved += Try(mutator.Mutate(texts[i % texts.Length]), i, seed);
        // The mutations must neither break all files nor leave all whole, or the test would show nothing.
        Assert.InRange(solved, Mutations / 20, Mutations / 2);
    }

    // Of these 4,000, 2,250 are solved, the rest refused.
    [Theory]
    [InlineData(11)]
    [InlineData(12)]
    public void Extreme_structures_are_solved_or_refused(int seed)
    {
        var structures = new ExtremeStructures(seed);
        int solved = 0;
        for (int i = 0; i < Extremes; i++)
            solved += Try(Encoding.UTF8.GetBytes(structures.Next()), i, seed);
        Assert.InRange(solved, Extremes / 4, Extremes);
    }

    private static int Try(byte[] bytes, int number, int seed)
    {
        string Case() => $"Case {number} of seed {seed}:\n{Encoding.UTF8.GetString(bytes)}";
        long start = Stopwatch.GetTimestamp();
        bool solved = false;
        try
        {
            solved = Predict(bytes, number);
        }
        catch (Exception fault)
        {
            Assert.Fail($"{fault}\n{Case()}");
        }
        double elapsedMs = Stopwatch.GetElapsedTime(start).TotalMilliseconds;
        Assert.True(elapsedMs < LimitMs, $"{elapsedMs} ms. {Case()}");
        return solved ? 1 : 0;
    }

    private static bool Predict(byte[] bytes, int number)
    {
        FileResult<LoadedStructure> read = StructureFile.Parse(bytes, "mutated.toml", null, EmbeddedMaterials.Catalog);
        if (!read.Succeeded)
            return Refused(read.Problems.Select(problem => problem.ToString()));
        var conditions = new PredictionConditions
        {
            Wavelengths = WavelengthGrid.FromRange(Length.FromNanometres(550), Length.FromNanometres(550), Length.FromNanometres(1)),
            Incidences = [Angle.FromDegrees(AnglesDeg[number % AnglesDeg.Length])],
            Mixing = MixingRules.All[number / 7 % MixingRules.All.Count],
            Threads = 1,
            Solver = SolverChoice.Multilayer,
            ComparesSolvers = false,
        };
        if (!Predictor.TryPredict(read.Value.Barbule, conditions, read.Value.Catalog, out StructurePrediction? prediction, out IReadOnlyList<AnatomyProblem> problems))
            return Refused(problems.Select(problem => read.Value.Locate(problem).ToString()));
        Assert.Empty(problems);
        Assert.True(double.IsFinite(prediction.ErrorEstimate));
        Assert.All(prediction.Warnings, warning => Assert.DoesNotContain('\n', warning.Message));
        foreach (SpectralResponse response in prediction.Responses)
        {
            double r = response.Reflectance[0], t = response.Transmittance[0], a = response.Absorptance[0];
            Assert.InRange(r, 0, 1);
            Assert.InRange(t, 0, 1);
            Assert.InRange(a, 0, 1);
            Assert.Equal(1, r + t + a, 1e-12);
        }
        return true;
    }

    private static bool Refused(IEnumerable<string> problems)
    {
        string[] lines = [.. problems];
        Assert.NotEmpty(lines);
        Assert.All(lines, line => Assert.DoesNotContain('\n', line));
        return false;
    }
}
