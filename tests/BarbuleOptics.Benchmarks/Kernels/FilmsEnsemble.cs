using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;

namespace BarbuleOptics.Benchmarks.Kernels;

/// <summary>2,000 stacks of the same media at normal incidence, R alone; s and p are one there, and that one is a point.</summary>
internal sealed class FilmsEnsemble : Workload
{
    private const int Stacks = 2000;

    private readonly FilmStack[] _stacks;

    public FilmsEnsemble()
    {
        var random = new PlainRandom();
        FilmStack first = FilmCase.Stack(random);
        _stacks = [first, .. Enumerable.Range(1, Stacks - 1).Select(_ => first.WithThicknesses(random.ThicknessesNm(FilmCase.Films)))];
    }

    public override string Name => "films-ensemble";

    public override long CountOfPass => (long)Stacks * FilmCase.WavelengthsNm.Length * FilmCase.Films;

    public override bool CountsPoints => true;

    // One recursion of 22 and 39.5 for the exponential.
    public override double? OperationsOfPoint => 61.5;

    private static SolverRequest Request => FilmCase.Request(0, Polarizations.S, SolverOutputs.Reflectance);

    public override Action CreatePass(LaneWidth width)
    {
        var solver = new VectorFilmSolver(width);
        VectorFilmWorkspace workspace = solver.CreateWorkspace(_stacks[0]);
        var reflectance = new double[FilmCase.WavelengthsNm.Length];
        return () =>
        {
            foreach (FilmStack stack in _stacks)
                solver.Solve(stack, Request, workspace, new SolverResponse { Reflectance = reflectance });
        };
    }

    public override double LargestError(LaneWidth width)
        => _stacks.Take(100).Max(stack => FilmCase.Difference(new VectorFilmSolver(width), new ReferenceFilmSolver(), stack, Request));
}
