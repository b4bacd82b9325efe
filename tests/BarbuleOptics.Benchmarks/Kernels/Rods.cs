using System.Text;
using BarbuleOptics.Files;
using BarbuleOptics.Grating;
using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Benchmarks.Kernels;

/// <summary>Five staggered rows of rods, 120 nm, spacing 170 nm, pitch 147.22 nm, below 150 nm of keratin; R of s and p at 0 and 30 degrees, 61
/// wavelengths. A solve is one wavelength in one polarization.</summary>
/// <param name="name">Name in the output.</param>
/// <param name="lumenNm">Diameter of the lumen, in nm; 0 for solid rods.</param>
/// <param name="accuracy">Largest absolute error asked for.</param>
internal sealed class Rods(string name, int lumenNm, double accuracy) : Workload
{
    private const double FinestAccuracy = 1e-10;

    private static readonly double[] WavelengthsNm = [.. Enumerable.Range(0, 61).Select(i => 300.0 + 8 * i)];
    private static readonly double[] IncidencesDeg = [0, 30];

    public override string Name => name;

    public override long CountOfPass => 2L * WavelengthsNm.Length * IncidencesDeg.Length;

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
                Solve(solver, one, workspace, incidenceDeg, Polarizations.Unpolarized, reflectance);
        };
    }

    public override double LargestError(LaneWidth width)
    {
        double largest = 0;
        SectionPermittivities structure = Structure();
        foreach (double incidenceDeg in IncidencesDeg)
        {
            foreach (Polarizations polarization in (ReadOnlySpan<Polarizations>)[Polarizations.S, Polarizations.P])
            {
                double[] found = new double[WavelengthsNm.Length], finest = new double[WavelengthsNm.Length];
                Solve(new GratingSolver(accuracy), structure, new GratingWorkspace(structure.Section, false, width), incidenceDeg, polarization, found);
                Solve(new GratingSolver(FinestAccuracy), structure, new GratingWorkspace(structure.Section, false, null), incidenceDeg, polarization, finest);
                largest = Math.Max(largest, found.Zip(finest, (a, b) => Math.Abs(a - b)).Max());
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
        string text = FormattableString.Invariant($"""
            format = 1
            [cortex]
            thickness = 150
            [[layer]]
            form = "rod"
            diameter = 120
            lumen = {lumenNm}
            spacing = 170
            rows = 5
            pitch = 147.22
            stacking = "staggered"
            gap = 0
            """);
        FileResult<LoadedStructure> file = StructureFile.Parse(Encoding.UTF8.GetBytes(text), "rods.toml", null, EmbeddedMaterials.Catalog, []);
        if (!file.Succeeded)
            throw new InvalidOperationException(string.Join('\n', file.Problems));
        return SectionBuilder.TryBuild(file.Value.Barbule, out Section? section, out _)
            ? new SectionPermittivities(section, file.Value.Catalog, WavelengthsNm)
            : throw new InvalidOperationException("The rods cannot exist.");
    }
}
