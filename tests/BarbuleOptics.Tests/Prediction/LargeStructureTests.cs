using System.Diagnostics;
using System.Text;
using BarbuleOptics.Anatomy;
using BarbuleOptics.Files;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;
using Xunit;

namespace BarbuleOptics.Tests.Prediction;

/// <summary>As many layers, rows and bodies as a file may hold are solved within seconds; more are refused.</summary>
public sealed class LargeStructureTests
{
    // A loose bound for a busy machine; the slowest of these takes one second on a free one.
    private const double LimitMs = 15_000;

    public static TheoryData<string, string> Large => new()
    {
        { "twenty thousand films", Repeat(20_000, i => $"[[layer]]\nform = 'film'\nthickness = {10 + i % 7}\n") },
        { "a thousand rows of hollow rods", Rods(1000, "lumen = 40\nspacing = 150\npitch = 120") },
        { "a thousand rows that reach into each other", Rods(1000, "spacing = 350\npitch = 51\nstacking = 'staggered'") },
        { "a thousand kinds of rods", Repeat(1000, i => $"[[layer]]\nform = 'rod'\ndiameter = 50.{i:000}\nspacing = 150\ngap = 5\n") },
        { "a hundred bodies in a cell", "[[layer]]\nspacing = 60000\nrows = 20\npitch = 110\n" + Repeat(100, i => $"[[layer.body]]\nform = 'rod'\ndiameter = 100\nx = 0.{i:00}\n") },
    };

    [Theory]
    [MemberData(nameof(Large))]
    public void A_large_structure_is_solved_in_time(string name, string text)
    {
        long start = Stopwatch.GetTimestamp();
        Assert.Null(Problem(text));
        Assert.True(Stopwatch.GetElapsedTime(start).TotalMilliseconds < LimitMs, name);
    }

    // The cell of a hundred bodies is 120 wavelengths wide.
    [Theory]
    [MemberData(nameof(Large))]
    public void A_large_structure_is_solved_or_refused_by_the_grating_solver_in_time(string name, string text)
    {
        long start = Stopwatch.GetTimestamp();
        AnatomyProblem? problem = Problem(text, SolverChoice.Grating);
        Assert.Equal(name == "a hundred bodies in a cell", problem is not null);
        Assert.True(Stopwatch.GetElapsedTime(start).TotalMilliseconds < LimitMs, name);
    }

    [Fact]
    public void More_rows_or_bodies_are_refused()
    {
        Assert.Equal("found 20500 rows in all layers so far; allowed up to 20000", Problem(Repeat(21, i => $"[[layer]]\nform = 'film'\nthickness = {10 + i}\nrows = {(i == 20 ? 500 : 1000)}\npitch = 50\n"))!.Message);
        AnatomyProblem bodies = Problem("[[layer]]\nspacing = 60000\n" + Repeat(101, i => $"[[layer.body]]\nform = 'rod'\ndiameter = 100\nx = 0.00{i:000}\n"))!;
        Assert.Equal(("layer1.body", "found 101 bodies in one cell; allowed up to 100"), (bodies.Key, bodies.Message));
    }

    private static string Repeat(int count, Func<int, string> part) => string.Concat(Enumerable.Range(0, count).Select(part));

    private static string Rods(int rows, string more) => $"[[layer]]\nform = 'rod'\ndiameter = 100\nrows = {rows}\n{more}\n";

    private static AnatomyProblem? Problem(string text, SolverChoice solver = SolverChoice.Multilayer)
    {
        FileResult<LoadedStructure> read = StructureFile.Parse(Encoding.UTF8.GetBytes("format = 1\n" + text), "large.toml", null, EmbeddedMaterials.Catalog);
        Assert.True(read.Succeeded, string.Join('\n', read.Problems));
        var conditions = new PredictionConditions { Solver = solver, ComparesSolvers = false, Wavelengths = WavelengthGrid.FromRange(Length.FromNanometres(500), Length.FromNanometres(500), Length.FromNanometres(1)) };
        return Predictor.TryPredict(read.Value.Barbule, conditions, read.Value.Catalog, out _, out IReadOnlyList<AnatomyProblem> problems) ? null : Assert.Single(problems);
    }
}
