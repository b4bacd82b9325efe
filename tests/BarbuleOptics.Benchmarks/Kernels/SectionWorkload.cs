using System.Text;
using BarbuleOptics.Files;
using BarbuleOptics.Grating;
using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Benchmarks.Kernels;

/// <summary>R of a section at 0 and 30 degrees and 61 wavelengths from 300 to 780 nm. A solve is one wavelength in one polarization.</summary>
/// <param name="name">Name in the output.</param>
/// <param name="text">The structure file without its first line.</param>
/// <param name="polarization">s, p or both.</param>
/// <param name="accuracy">Largest absolute error asked for.</param>
/// <param name="finest">That of the answers which errors are told by, far below.</param>
/// <param name="isFinestReadable">Whether those come from the readable solver; otherwise from blocks of wavelengths at far higher resolution, which
/// tests hold to it.</param>
internal abstract class SectionWorkload(string name, string text, Polarizations polarization, double accuracy, double finest, bool isFinestReadable) : Workload
{
    private static readonly double[] WavelengthsNm = [.. Enumerable.Range(0, 61).Select(i => 300.0 + 8 * i)];
    private static readonly double[] IncidencesDeg = [0, 30];

    public override string Name => name;

    public override long CountOfPass => (polarization == Polarizations.Unpolarized ? 2L : 1L) * WavelengthsNm.Length * IncidencesDeg.Length;

    public override bool CountsPoints => false;

    public override Action CreatePass(LaneWidth width)
    {
        // In turn, so that nothing is known from the pass before.
        SectionPermittivities one = Structure(), other = Structure();
        var workspace = new GratingWorkspace(one.Section, slabsOnly: false, width);
        var solver = new GratingSolver(accuracy);
        var reflectance = new double[WavelengthsNm.Length];
        return () =>
        {
            (one, other) = (other, one);
            foreach (double incidenceDeg in IncidencesDeg)
                Solve(solver, one, workspace, incidenceDeg, polarization, reflectance);
        };
    }

    public override double LargestError(LaneWidth width)
    {
        double largest = 0;
        SectionPermittivities structure = Structure();
        foreach (double incidenceDeg in IncidencesDeg)
        {
            foreach (Polarizations one in (ReadOnlySpan<Polarizations>)[Polarizations.S, Polarizations.P])
            {
                if ((polarization & one) == 0)
                    continue;
                double[] found = new double[WavelengthsNm.Length], better = new double[WavelengthsNm.Length];
                Solve(new GratingSolver(accuracy), structure, new GratingWorkspace(structure.Section, false, width), incidenceDeg, one, found);
                Solve(
                    new GratingSolver(finest), structure, new GratingWorkspace(structure.Section, false, isFinestReadable ? null : width), incidenceDeg, one, better);
                largest = Math.Max(largest, found.Zip(better, (a, b) => Math.Abs(a - b)).Max());
            }
        }
        return largest;
    }

    private static void Solve(
        GratingSolver solver, SectionPermittivities structure, GratingWorkspace workspace, double incidenceDeg, Polarizations polarization, double[] reflectance)
        => solver.Solve(
            structure, new SolverRequest(0, WavelengthsNm.Length, Angle.FromDegrees(incidenceDeg), polarization, SolverOutputs.Reflectance), workspace,
            new SolverResponse { Reflectance = reflectance });

    private SectionPermittivities Structure()
    {
        FileResult<LoadedStructure> file = StructureFile.Parse(Encoding.UTF8.GetBytes("format = 1\n" + text), "section.toml", null, EmbeddedMaterials.Catalog, []);
        if (!file.Succeeded)
            throw new InvalidOperationException(string.Join('\n', file.Problems));
        return SectionBuilder.TryBuild(file.Value.Barbule, out Section? section, out _)
            ? new SectionPermittivities(section, file.Value.Catalog, WavelengthsNm)
            : throw new InvalidOperationException("The section cannot exist.");
    }
}
