using BarbuleOptics.Files;
using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;
using BarbuleOptics.Layering.Mixing;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Benchmarks.Kernels;

/// <summary>The slices of the sample of hollow rods, each with constants and a thickness of its own, ex, ey and ez different, at four angles; all
/// constants are computed anew in each call; R, T and A. s and p together are a point.</summary>
internal sealed class FilmsGraded : Workload
{
    /// <summary>Change of R on halving the slices that chooses their number, as the layer model does.</summary>
    private const double Change = 1e-5;

    private static readonly double[] Degrees = [0, 20, 40, 60];

    private readonly FilmStack _stack = Stack();

    public override string Name => "films-graded";

    public override long CountOfPass => (long)FilmCase.WavelengthsNm.Length * Degrees.Length * _stack.FilmCount;

    public override bool CountsPoints => true;

    /// <summary>Number of films.</summary>
    public int Films => _stack.FilmCount;

    public override Action CreatePass(LaneWidth width)
    {
        var solver = new VectorFilmSolver(width);
        FilmStack stack = Stack();
        VectorFilmWorkspace workspace = solver.CreateWorkspace(stack);
        int count = FilmCase.WavelengthsNm.Length;
        double[] reflectance = new double[count], transmittance = new double[count], absorptance = new double[count];
        return () =>
        {
            foreach (double degrees in Degrees)
            {
                solver.Solve(
                    stack, Request(degrees), workspace,
                    new SolverResponse { Reflectance = reflectance, Transmittance = transmittance, Absorptance = absorptance });
            }
        };
    }

    public override double LargestError(LaneWidth width)
        => Degrees.Max(degrees => FilmCase.Difference(new VectorFilmSolver(width), new ReferenceFilmSolver(), _stack, Request(degrees)));

    private static SolverRequest Request(double degrees)
        => FilmCase.Request(degrees, Polarizations.Unpolarized, SolverOutputs.Transmittance | SolverOutputs.Absorptance);

    private static FilmStack Stack()
    {
        using Stream stream = typeof(FilmsGraded).Assembly.GetManifestResourceStream("samples/hollow-rods.toml")!;
        using var bytes = new MemoryStream();
        stream.CopyTo(bytes);
        FileResult<LoadedStructure> file = StructureFile.Parse(bytes.ToArray(), "hollow-rods.toml", null, EmbeddedMaterials.Catalog, []);
        if (!SectionBuilder.TryBuild(file.Value!.Barbule, out Section? section, out _))
            throw new InvalidOperationException("The sample cannot be built.");
        var rule = new SecondOrderFormBirefringence();
        WavelengthGrid grid = WavelengthGrid.FromRange(Length.FromNanometres(300), Length.FromNanometres(780), Length.FromNanometres(1));
        Angle[] incidences = [.. Degrees.Select(Angle.FromDegrees)];
        LayerModel model = LayerModel.Of(section, file.Value.Catalog, rule, grid, incidences, Change, Change, new VectorFilmSolver());
        return Apart(model.FilmsAt(FilmCase.WavelengthsNm));
    }

    // A medium of its own for each film, and thicknesses that are not those of another row.
    private static FilmStack Apart(FilmStack stack)
    {
        int wavelengths = stack.WavelengthsNm.Length;
        var media = new OpticalComponents(stack.FilmCount, wavelengths);
        for (int film = 0; film < stack.FilmCount; film++)
        {
            for (int w = 0; w < wavelengths; w++)
                media.Set(film, w, stack.Media.Get(stack.MediumOfFilm[film], w));
        }
        return new FilmStack(
            stack.WavelengthsNm, media, [.. Enumerable.Range(0, stack.FilmCount)],
            [.. stack.ThicknessesNm.ToArray().Select((thicknessNm, film) => thicknessNm * (1 + 1e-6 * film))], stack.SurroundIndex, stack.Backing);
    }
}
