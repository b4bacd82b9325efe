using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;

namespace BarbuleOptics.Benchmarks.Kernels;

/// <summary>One stack at 19 angles, 0 to 81 degrees, R alone; s and p together are a point. Tables are known from the pass before.</summary>
internal sealed class FilmsAngles : Workload
{
    private static readonly double[] Degrees = [.. Enumerable.Range(0, 19).Select(i => 4.5 * i)];

    private readonly FilmStack _stack = FilmCase.Stack(new PlainRandom());

    public override string Name => "films-angles";

    public override long CountOfPass => (long)FilmCase.WavelengthsNm.Length * Degrees.Length * FilmCase.Films;

    public override bool CountsPoints => true;

    // Two recursions of 22 and, in the mean of films that absorb and films that do not, 39.5 for the exponential.
    public override double? OperationsOfPoint => 83.5;

    public override Action CreatePass(LaneWidth width)
    {
        var solver = new VectorFilmSolver(width);
        VectorFilmWorkspace workspace = solver.CreateWorkspace(_stack);
        var reflectance = new double[FilmCase.WavelengthsNm.Length];
        return () =>
        {
            foreach (double degrees in Degrees)
                solver.Solve(_stack, Request(degrees), workspace, new SolverResponse { Reflectance = reflectance });
        };
    }

    public override double LargestError(LaneWidth width)
        => Degrees.Max(degrees => FilmCase.Difference(new VectorFilmSolver(width), new ReferenceFilmSolver(), _stack, Request(degrees)));

    private static SolverRequest Request(double degrees) => FilmCase.Request(degrees, Polarizations.Unpolarized, SolverOutputs.Reflectance);
}
