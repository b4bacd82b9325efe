using System.Text;
using BarbuleOptics.Color;
using BarbuleOptics.Files;
using BarbuleOptics.Grating;
using BarbuleOptics.Layering;
using BarbuleOptics.Layering.Mixing;
using BarbuleOptics.Materials;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Benchmarks.MixingRules;

/// <summary>Solves one structure rigorously and by every rule, and compares the spectra.</summary>
internal sealed class Comparison
{
    /// <summary>Accuracy of both solutions, in R: far below what tells the rules apart.</summary>
    public const double Accuracy = 1e-3;

    private const int Block = 32;

    private static readonly ReferenceFilmSolver Films = new();
    private static readonly GratingSolver Rigorous = new(Accuracy);
    private static readonly Polarizations[] Beams = [Polarizations.S, Polarizations.P];

    private readonly WavelengthGrid _grid;
    private readonly Angle[] _incidences;
    private readonly Colorimeter _colorimeter;

    public Comparison(WavelengthGrid grid, Angle[] incidences)
    {
        _grid = grid;
        _incidences = incidences;
        _colorimeter = new Colorimeter(grid, Illuminant.D65, StandardObserver.Cie1931TwoDegree);
    }

    /// <summary>All cases of one structure, and the error estimate of its rigorous solution.</summary>
    public (List<Case> Cases, double Estimate) Of(string name, string form, string text)
    {
        FileResult<LoadedStructure> read = StructureFile.Parse(Encoding.UTF8.GetBytes(text), name, null, EmbeddedMaterials.Catalog);
        if (!read.Succeeded || !SectionBuilder.TryBuild(read.Value.Barbule, out Section? section, out _))
            throw new ArgumentException($"Structure {name} cannot exist:\n{text}");
        IMaterialCatalog catalog = read.Value.Catalog;
        (Spectrum[] truth, double estimate) = SolveRigorously(section, catalog);
        var cases = new List<Case>();
        foreach (IMixingRule rule in Layering.Mixing.MixingRules.All)
        {
            Spectrum[] films = SolveFilms(section, catalog, rule);
            for (int angle = 0; angle < _incidences.Length; angle++)
            {
                bool orders = HasOrders(section, catalog, _incidences[angle]);
                Add(Polarizations.S, films[2 * angle], truth[2 * angle]);
                Add(Polarizations.P, films[2 * angle + 1], truth[2 * angle + 1]);
                Add(Polarizations.Unpolarized, Mean(films, angle), Mean(truth, angle));

                void Add(Polarizations polarization, Spectrum model, Spectrum exact) => cases.Add(new Case(
                    name, form, _incidences[angle].Degrees, polarization, rule, orders, Distance.Between(model, exact, _colorimeter)));
            }
        }
        return (cases, estimate);
    }

    private (Spectrum[], double) SolveRigorously(Section section, IMaterialCatalog catalog)
    {
        double[][] values = Rows();
        double estimate = 0;
        for (int first = 0; first < _grid.Count; first += Block)
        {
            int count = Math.Min(Block, _grid.Count - first);
            var permittivities = new SectionPermittivities(section, catalog, _grid.Nanometres.Slice(first, count));
            GratingWorkspace workspace = Rigorous.CreateWorkspace(permittivities);
            for (int beam = 0; beam < values.Length; beam++)
                estimate = Math.Max(estimate, Rigorous.Solve(permittivities, Request(beam, 0, count), workspace, Into(values[beam].AsSpan(first, count))));
        }
        return (Spectra(values), estimate);
    }

    private Spectrum[] SolveFilms(Section section, IMaterialCatalog catalog, IMixingRule rule)
    {
        double[][] values = Rows();
        LayerModel model = LayerModel.Of(section, catalog, rule, _grid, _incidences, Accuracy / 5, 1, Films);
        FilmStack films = model.FilmsAt(_grid.Nanometres);
        FilmWorkspace workspace = Films.CreateWorkspace(films);
        for (int beam = 0; beam < values.Length; beam++)
            Films.Solve(films, Request(beam, 0, _grid.Count), workspace, Into(values[beam]));
        return Spectra(values);
    }

    /// <summary>Whether an order other than the zeroth propagates in the matrix somewhere in 400-700 nm: P (n_m + n_s sin a) above the wavelength.</summary>
    private static bool HasOrders(Section section, IMaterialCatalog catalog, Angle incidence)
    {
        if (section.Runs.Count == 0 || !catalog.TryFind(section.Materials[Section.Matrix].Main, out Material? matrix))
            return false;
        double periodNm = section.PeriodNm ?? section.Runs.Max(run => run.SpacingNm);
        return periodNm * (matrix.N.At(Colorimeter.VisibleStartNm) + Math.Sin(incidence.Radians)) > Colorimeter.VisibleStartNm;
    }

    private SolverRequest Request(int beam, int first, int count)
        => new(first, count, _incidences[beam / 2], Beams[beam % 2], SolverOutputs.Reflectance);

    private static SolverResponse Into(Span<double> reflectance) => new() { Reflectance = reflectance };

    private double[][] Rows() => [.. Enumerable.Range(0, 2 * _incidences.Length).Select(_ => new double[_grid.Count])];

    private Spectrum[] Spectra(double[][] values) => [.. values.Select(row => new Spectrum(_grid, row))];

    private Spectrum Mean(Spectrum[] beams, int angle)
        => new(_grid, [.. Enumerable.Range(0, _grid.Count).Select(i => (beams[2 * angle][i] + beams[2 * angle + 1][i]) / 2)]);
}
