using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Benchmarks.Kernels;

/// <summary>2,000 stacks of the same media at normal incidence, R alone; s and p are one there, and that one is a point.</summary>
internal sealed class FilmsEnsemble : Workload
{
    private const int Stacks = 2000;

    private readonly FilmStack _template = FilmCase.Stack(new PlainRandom());
    private readonly double[] _thicknessesNm = new PlainRandom().ThicknessesNm(Stacks * FilmCase.Films);

    public override string Name => "films-ensemble";

    public override long CountOfPass => (long)Stacks * FilmCase.WavelengthsNm.Length * FilmCase.Films;

    public override bool CountsPoints => true;

    // One recursion of 22 and 39.5 for the exponential, computed anew for each film; that nodes take fewer shows as a larger share.
    public override double? OperationsOfPoint => 61.5;

    public override Action CreatePass(LaneWidth width)
    {
        var ensemble = new FilmEnsemble(_template, Stacks, width);
        var reflectance = new double[Stacks * FilmCase.WavelengthsNm.Length];
        return () => ensemble.Solve(Angle.FromDegrees(0), Polarizations.S, _thicknessesNm, reflectance);
    }

    public override double LargestError(LaneWidth width)
    {
        int count = FilmCase.WavelengthsNm.Length;
        var reflectance = new double[Stacks * count];
        new FilmEnsemble(_template, Stacks, width).Solve(Angle.FromDegrees(0), Polarizations.S, _thicknessesNm, reflectance);
        var expected = new double[count];
        var reference = new ReferenceFilmSolver();
        double largest = 0;
        for (int stack = 0; stack < Stacks; stack += 20)
        {
            FilmStack one = _template.WithThicknesses(_thicknessesNm.AsSpan(stack * FilmCase.Films, FilmCase.Films));
            reference.Solve(one, FilmCase.Request(0, Polarizations.S, SolverOutputs.Reflectance), reference.CreateWorkspace(one), new SolverResponse { Reflectance = expected });
            for (int w = 0; w < count; w++)
                largest = Math.Max(largest, Math.Abs(reflectance[stack * count + w] - expected[w]));
        }
        return largest;
    }
}
