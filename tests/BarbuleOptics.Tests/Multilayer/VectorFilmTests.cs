using System.Numerics;
using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;
using Xunit;

namespace BarbuleOptics.Tests.Multilayer;

/// <summary>The vectorised solver against the reference: metals and dielectrics, thicknesses 0 to 100 um, total reflection, angles to 89.9 degrees.</summary>
public sealed class VectorFilmTests
{
    // Found over 20,000 stacks: half within 1e-16, all but one within 1e-13; that one, 1.4e-12, at 89.9 degrees hangs on the last digit of what is given.
    private const double Tolerance = 1e-12;

    private const SolverOutputs All = SolverOutputs.Transmittance | SolverOutputs.Absorptance;

    private static readonly ReferenceFilmSolver Reference = new();

    public static TheoryData<int> Widths => [512, 256, 128, 64];

    [Theory]
    [MemberData(nameof(Widths))]
    public void Random_stacks_agree(int bits)
    {
        var solver = Solver(bits);
        var stacks = new RandomStacks(20250);
        for (int i = 0; i < 1500; i++)
        {
            (TestStack test, double degrees) = stacks.Next();
            AssertAgree(solver, test.Build(), degrees);
        }
    }

    // Every length from nothing to four vectors of the widest kind, so that every tail occurs at every width.
    [Theory]
    [MemberData(nameof(Widths))]
    public void Spectra_of_every_length_agree(int bits)
    {
        var solver = Solver(bits);
        var stacks = new RandomSpectralStacks(4);
        for (int length = 1; length <= 33; length++)
        {
            for (int i = 0; i < 5; i++)
            {
                (FilmStack stack, double degrees) = stacks.Next(length);
                AssertAgree(solver, stack, degrees);
            }
        }
    }

    [Theory]
    [MemberData(nameof(Widths))]
    public void A_block_of_no_wavelengths_is_left_alone(int bits)
    {
        (FilmStack stack, _) = new RandomSpectralStacks(1).Next(3);
        VectorFilmSolver solver = Solver(bits);
        solver.Solve(stack, new SolverRequest(1, 0, Angle.FromDegrees(20), Polarizations.S, All), solver.CreateWorkspace(stack), default);
    }

    [Theory]
    [MemberData(nameof(Widths))]
    public void Blocks_within_a_spectrum_agree(int bits)
    {
        VectorFilmSolver solver = Solver(bits);
        (FilmStack stack, double degrees) = new RandomSpectralStacks(11).Next(29);
        VectorFilmWorkspace workspace = solver.CreateWorkspace(stack);
        foreach ((int first, int count) in ((int, int)[])[(0, 29), (3, 17), (28, 1), (5, 8), (0, 29)])
            AssertAgree(solver, stack, degrees, workspace, first, count);
    }

    // Faces and media of one stack must not be taken for another's; thicknesses of zero change which media meet.
    [Fact]
    public void A_workspace_serves_one_stack_after_another()
    {
        VectorFilmSolver solver = Solver(512);
        var stacks = new RandomSpectralStacks(12);
        FilmStack[] all = [.. Enumerable.Range(0, 30).Select(_ => stacks.Next(9).Stack)];
        VectorFilmWorkspace workspace = solver.CreateWorkspace(all.MaxBy(stack => stack.FilmCount)!);
        var random = new Random(3);
        foreach (FilmStack stack in all)
        {
            for (int i = 0; i < 12; i++)
            {
                double[] thicknessesNm = [.. stack.ThicknessesNm.ToArray().Select(_ => random.Next(3) == 0 ? 0 : 200 * random.NextDouble())];
                AssertAgree(solver, stack.WithThicknesses(thicknessesNm), 7.5 * (i % 5), workspace, 0, 9);
            }
        }
    }

    // More directions than the workspace keeps, each met again.
    [Fact]
    public void Directions_come_and_go()
    {
        VectorFilmSolver solver = Solver(512);
        (FilmStack stack, _) = new RandomSpectralStacks(14).Next(5);
        VectorFilmWorkspace workspace = solver.CreateWorkspace(stack);
        for (int i = 0; i < 150; i++)
            AssertAgree(solver, stack, i * 17 % 60, workspace, 0, 5);
    }

    [Fact]
    public void A_medium_that_is_changed_is_seen()
    {
        VectorFilmSolver solver = Solver(512);
        (FilmStack stack, _) = new RandomSpectralStacks(15).Next(5);
        VectorFilmWorkspace workspace = solver.CreateWorkspace(stack);
        AssertAgree(solver, stack, 10, workspace, 0, 5);
        stack.Media.Set(0, 2, DiagonalPermittivity.Isotropic(new Complex(3, .2)));
        AssertAgree(solver, stack, 10, workspace, 0, 5);
    }

    // The bound of the amplitude kernel grows like the product of all 1 + |rho|; such stacks go to the field recursion, and so does one without films.
    [Theory]
    [InlineData(0)]
    [InlineData(1)]
    [InlineData(40)]
    [InlineData(400)]
    public void Reflectors_of_any_length_agree(int films)
    {
        Film high = Film.OfIndex(new(2.3, 1e-3), 54), low = Film.OfIndex(1.35, 92);
        FilmStack stack = TestStack.OnIndex(1, 1.52, [.. Enumerable.Range(0, films).Select(i => i % 2 == 0 ? high : low)]).Build();
        AssertAgree(Solver(512), stack, 35);
        AssertAgree(Solver(512), stack, 0);
    }

    [Theory]
    [InlineData(SolverOutputs.Reflectance)]
    [InlineData(All)]
    public void A_call_allocates_nothing(SolverOutputs outputs)
    {
        VectorFilmSolver solver = Solver(512);
        (FilmStack stack, _) = new RandomSpectralStacks(21).Next(21);
        VectorFilmWorkspace workspace = solver.CreateWorkspace(stack);
        double[] r = new double[21], t = new double[21], a = new double[21];
        long least = long.MaxValue;
        for (int i = 0; i < 5; i++)
        {
            long before = GC.GetAllocatedBytesForCurrentThread();
            foreach (int degrees in (ReadOnlySpan<int>)[0, 40, 80])
            {
                solver.Solve(
                    stack, new SolverRequest(0, 21, Angle.FromDegrees(degrees), Polarizations.Unpolarized, outputs), workspace,
                    new SolverResponse { Reflectance = r, Transmittance = t, Absorptance = a });
            }
            least = Math.Min(least, GC.GetAllocatedBytesForCurrentThread() - before);
        }
        Assert.Equal(0, least);
    }

    [Fact]
    public void What_the_reference_refuses_is_refused()
    {
        VectorFilmSolver solver = Solver(512);
        (FilmStack stack, _) = new RandomSpectralStacks(31).Next(4);
        VectorFilmWorkspace workspace = solver.CreateWorkspace(stack);
        var request = new SolverRequest(0, 4, Angle.FromDegrees(0), Polarizations.S, SolverOutputs.Reflectance);
        Assert.Throws<ArgumentException>(() => solver.Solve(stack, request, workspace, new SolverResponse { Reflectance = new double[3] }));
        Assert.Throws<ArgumentOutOfRangeException>(() => solver.Solve(stack, request with { First = 1 }, workspace, new SolverResponse { Reflectance = new double[4] }));
        Assert.Throws<ArgumentOutOfRangeException>(
            () => solver.Solve(stack, request with { Incidence = Angle.FromDegrees(90) }, workspace, new SolverResponse { Reflectance = new double[4] }));
        var empty = new FilmStack([500], new OpticalComponents(1, 1), [0], [100], [1], [2]);
        Assert.Throws<ArgumentException>(
            () => solver.Solve(empty, request with { Count = 1 }, solver.CreateWorkspace(empty), new SolverResponse { Reflectance = new double[1] }));
    }

    private static VectorFilmSolver Solver(int bits) => new(LaneWidth.Parse($"{bits}")!.Value);

    private static void AssertAgree(VectorFilmSolver solver, FilmStack stack, double degrees)
        => AssertAgree(solver, stack, degrees, solver.CreateWorkspace(stack), 0, stack.WavelengthsNm.Length);

    private static void AssertAgree(VectorFilmSolver solver, FilmStack stack, double degrees, VectorFilmWorkspace workspace, int first, int count)
    {
        foreach (Polarizations polarization in (Polarizations[])[Polarizations.S, Polarizations.P, Polarizations.Unpolarized])
        {
            var request = new SolverRequest(first, count, Angle.FromDegrees(degrees), polarization, All);
            double[][] expected = Answers(Reference, Reference.CreateWorkspace(stack), stack, request);
            double[][] found = Answers(solver, workspace, stack, request);
            double[] alone = new double[count];
            solver.Solve(stack, request with { Outputs = SolverOutputs.Reflectance }, workspace, new SolverResponse { Reflectance = alone });
            for (int i = 0; i < count; i++)
            {
                for (int part = 0; part < 3; part++)
                    Assert.Equal(expected[part][i], found[part][i], Tolerance);
                Assert.Equal(expected[0][i], alone[i], Tolerance);
            }
        }
    }

    private static double[][] Answers<TWorkspace>(ISpectralSolver<FilmStack, TWorkspace> solver, TWorkspace workspace, FilmStack stack, SolverRequest request)
    {
        double[][] answers = [new double[request.Count], new double[request.Count], new double[request.Count]];
        double error = solver.Solve(
            stack, request, workspace, new SolverResponse { Reflectance = answers[0], Transmittance = answers[1], Absorptance = answers[2] });
        Assert.InRange(error, 1e-16, 1e-10);
        return answers;
    }
}
