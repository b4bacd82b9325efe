using System.Numerics;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;
using Xunit;

namespace BarbuleOptics.Tests.Multilayer;

/// <summary>How a call is made: blocks, spans, memory, refusals.</summary>
public class FilmWorkspaceTests
{
    private const int Wavelengths = 7;
    private static readonly ReferenceFilmSolver Solver = new();

    [Fact]
    public void A_block_answers_as_single_wavelengths_do()
    {
        FilmStack stack = Stack(films: 5);
        double[] whole = new double[Wavelengths];
        double[] films = new double[5 * 3];
        var outputs = SolverOutputs.Transmittance | SolverOutputs.Absorptance;
        Solver.Solve(stack, Request(0, Wavelengths), Solver.CreateWorkspace(stack), new SolverResponse { Reflectance = whole });
        double[] r = new double[3], t = new double[3], a = new double[3], d = [9, 9, 9];
        Solver.Solve(stack, Request(2, 3) with { Outputs = outputs }, Solver.CreateWorkspace(stack), new SolverResponse
        {
            Reflectance = r, Transmittance = t, Absorptance = a, DiffractedReflectance = d, FilmAbsorptance = films,
        });
        Assert.Equal(whole[2..5], r);
        Assert.Equal([0, 0, 0], d);
        for (int w = 0; w < 3; w++)
        {
            Assert.Equal(1, r[w] + t[w] + a[w], 1e-14);
            Assert.Equal(a[w], Enumerable.Range(0, 5).Sum(film => films[film * 3 + w]), 1e-15);
        }
        Assert.NotEqual(r[0], r[1]);
    }

    [Fact]
    public void Spans_that_are_not_asked_for_are_left_alone()
    {
        FilmStack stack = Stack(films: 2);
        double[] r = new double[Wavelengths], t = [.. Enumerable.Repeat(7.0, Wavelengths)];
        Solver.Solve(stack, Request(0, Wavelengths), Solver.CreateWorkspace(stack), new SolverResponse { Reflectance = r, Transmittance = t });
        Assert.All(t, value => Assert.Equal(7, value));
    }

    [Fact]
    public void A_call_allocates_nothing()
    {
        FilmStack stack = Stack(films: 30);
        FilmWorkspace workspace = Solver.CreateWorkspace(stack);
        double[] r = new double[Wavelengths], t = new double[Wavelengths], a = new double[Wavelengths], films = new double[30 * Wavelengths];
        long least = long.MaxValue;
        for (int i = 0; i < 5; i++)
        {
            long before = GC.GetAllocatedBytesForCurrentThread();
            Solver.Solve(
                stack, Request(0, Wavelengths) with { Outputs = SolverOutputs.Transmittance | SolverOutputs.Absorptance }, workspace,
                new SolverResponse { Reflectance = r, Transmittance = t, Absorptance = a, FilmAbsorptance = films });
            least = Math.Min(least, GC.GetAllocatedBytesForCurrentThread() - before);
        }
        Assert.Equal(0, least);
    }

    [Fact]
    public void A_workspace_serves_smaller_stacks_and_leaves_no_trace()
    {
        FilmStack large = Stack(films: 9), small = Stack(films: 3);
        FilmWorkspace workspace = Solver.CreateWorkspace(large);
        double[] fresh = new double[Wavelengths], used = new double[Wavelengths];
        Solver.Solve(small, Request(0, Wavelengths), Solver.CreateWorkspace(small), new SolverResponse { Reflectance = fresh });
        Solver.Solve(large, Request(0, Wavelengths), workspace, new SolverResponse { Reflectance = used });
        Solver.Solve(small, Request(0, Wavelengths), workspace, new SolverResponse { Reflectance = used });
        Assert.Equal(fresh, used);
        FilmWorkspace tight = Solver.CreateWorkspace(small);
        Assert.Throws<ArgumentException>(
            () => Solver.Solve(large, Request(0, Wavelengths), tight, new SolverResponse { Reflectance = used }));
    }

    [Theory]
    [InlineData(-1, 2)]
    [InlineData(6, 2)]
    [InlineData(0, -1)]
    [InlineData(int.MaxValue, 1)]
    public void A_block_outside_the_stack_is_refused(int first, int count)
        => Assert.Throws<ArgumentOutOfRangeException>(() => Call(Request(first, count), Math.Max(count, 0)));

    [Theory]
    [InlineData(-1)]
    [InlineData(90)]
    [InlineData(180)]
    public void An_angle_outside_0_to_90_is_refused(double degrees)
        => Assert.Throws<ArgumentOutOfRangeException>(() => Call(Request(0, 1) with { Incidence = Angle.FromDegrees(degrees) }, 1));

    [Theory]
    [InlineData(Polarizations.None)]
    [InlineData((Polarizations)4)]
    public void A_polarization_that_is_none_is_refused(Polarizations polarization)
        => Assert.Throws<ArgumentException>(() => Call(Request(0, 1) with { Polarization = polarization }, 1));

    [Fact]
    public void Spans_of_the_wrong_length_are_refused()
    {
        Assert.Throws<ArgumentException>(() => Call(Request(0, 3), 2));
        Assert.Throws<ArgumentException>(() => Call(Request(0, 3) with { Outputs = SolverOutputs.Transmittance }, 3));
        Assert.Throws<ArgumentException>(() => Call(Request(0, 3) with { Outputs = SolverOutputs.Absorptance }, 3));
    }

    [Fact]
    public void A_medium_that_was_never_filled_is_refused()
    {
        var stack = new FilmStack([500], new OpticalComponents(2, 1), [1], [100], [1], [2.25]);
        var error = Assert.Throws<ArgumentException>(
            () => Solver.Solve(stack, Request(0, 1), Solver.CreateWorkspace(stack), new SolverResponse { Reflectance = new double[1] }));
        Assert.Contains("medium 1", error.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void A_stack_with_gain_or_of_unequal_lengths_is_refused()
    {
        var media = new OpticalComponents(0, 1);
        Assert.Throws<ArgumentOutOfRangeException>(() => new FilmStack([500], media, [], [], [1], [new Complex(2, -.1)]));
        Assert.Throws<ArgumentOutOfRangeException>(() => new IncoherentBack(Length.FromNanometres(1000), [new Complex(2, -.1)]));
        Assert.Throws<ArgumentException>(
            () => new FilmStack([500], media, [], [], [1], [2], new IncoherentBack(Length.FromNanometres(1000), [1, 1])));
    }

    [Fact]
    public void The_error_estimate_is_small_and_not_zero()
    {
        FilmStack stack = Stack(films: 3);
        double error = Solver.Solve(stack, Request(0, 1), Solver.CreateWorkspace(stack), new SolverResponse { Reflectance = new double[1] });
        Assert.InRange(error, 1e-16, 1e-10);
    }

    private static void Call(SolverRequest request, int length)
    {
        FilmStack stack = Stack(films: 3);
        Solver.Solve(stack, request, Solver.CreateWorkspace(stack), new SolverResponse { Reflectance = new double[length] });
    }

    private static SolverRequest Request(int first, int count)
        => new(first, count, Angle.FromDegrees(25), Polarizations.Unpolarized, SolverOutputs.Reflectance);

    // Films of two media by turns, whose constants change with wavelength.
    private static FilmStack Stack(int films)
    {
        var media = new OpticalComponents(2, Wavelengths);
        for (int w = 0; w < Wavelengths; w++)
        {
            media.Set(0, w, DiagonalPermittivity.Isotropic(new Complex(2.4 - .01 * w, .02 * w)));
            media.Set(1, w, new DiagonalPermittivity(new(3, .1), new(3.2, .2), new(2.9, .3 - .01 * w)));
        }
        double[] wavelengths = [.. Enumerable.Range(0, Wavelengths).Select(w => 400.0 + 20 * w)];
        return new FilmStack(
            wavelengths, media, [.. Enumerable.Range(0, films).Select(f => f % 2)], [.. Enumerable.Range(0, films).Select(f => 60.0 + f)],
            [.. wavelengths.Select(_ => 1.0)], [.. wavelengths.Select(_ => new Complex(2.4, .01))]);
    }
}
