using BarbuleOptics.Files;
using BarbuleOptics.Grating;
using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;
using Xunit;

namespace BarbuleOptics.Tests.Grating.Batches;

/// <summary>Blocks of wavelengths as a whole: any length, any width, whatever was solved before.</summary>
public class BatchSolverTests
{
    private const string Hollow =
        "[cortex]\nthickness = 150\n[[layer]]\nform = \"rod\"\ndiameter = 120\nlumen = 70\nspacing = 170\nrows = 5\npitch = 147.22\nstacking = \"staggered\"\n";

    private const string Porous =
        "[cortex]\nthickness = 90\n[[layer]]\nform = \"platelet\"\nthickness = 100\nwidth = 190\nwall = 15\ncore_air = 0.6\nspacing = 210\nrows = 3\npitch = 140\n";

    // Groups, probes and cells are the same at each width: only rounding differs, measured below 1e-12.
    [Fact]
    public void Every_length_gives_the_same_answers_at_every_width_and_within_the_estimates_of_the_readable_solver()
    {
        for (int count = 0; count <= 32; count++)
        {
            SectionPermittivities structure = Structure(count, 9.3);
            double[][] readable = Solve(structure, null, 30, Polarizations.P, 1e-6), first = [];
            foreach (LaneWidth width in LaneWidth.All)
            {
                double[][] found = Solve(structure, width, 30, Polarizations.P, 1e-6);
                if (first.Length == 0)
                    first = found;
                for (int quantity = 0; quantity < 4; quantity++)
                {
                    for (int w = 0; w < count; w++)
                    {
                        Assert.Equal(first[quantity][w], found[quantity][w], 1e-10);
                        Assert.True(Math.Abs(found[quantity][w] - readable[quantity][w]) <= found[4][w] + readable[4][w]);
                    }
                }
            }
        }
    }

    // As above; that packs of platelets agree with the readable solver is held at equal resolution.
    [Fact]
    public void Platelets_come_out_alike_at_each_width_and_length()
    {
        Section section = GratingCase.Of(Porous).Section;
        for (int count = 0; count <= 32; count++)
        {
            SectionPermittivities structure = Structure(section, count, 9.3);
            double[][] first = Solve(structure, LaneWidth.All[0], 30, Polarizations.P, 1e-3);
            foreach (LaneWidth width in LaneWidth.All.Skip(1))
            {
                double[][] found = Solve(structure, width, 30, Polarizations.P, 1e-3);
                for (int quantity = 0; quantity < 4; quantity++)
                {
                    for (int w = 0; w < count; w++)
                        Assert.Equal(first[quantity][w], found[quantity][w], 1e-10);
                }
            }
        }
    }

    [Fact]
    public void Estimates_of_wavelengths_between_probes_hold()
    {
        var random = new RandomSections(seed: 921);
        int beyond = 0, all = 0;
        for (int i = 0; i < 40; i++)
        {
            SectionPermittivities structure = Structure(GratingCase.Of(random.Rods()).Section, 96, 4.9);
            double degrees = random.Incidence();
            Polarizations polarization = random.Polarization();
            double[][] found = Solve(structure, LaneWidth.Default, degrees, polarization, 1e-4), truth = Solve(structure, LaneWidth.Default, degrees, polarization, 1e-8);
            for (int w = 0; w < 96; w++, all++)
            {
                double error = Enumerable.Range(0, 4).Max(quantity => Math.Abs(found[quantity][w] - truth[quantity][w]));
                Assert.True(error <= 3 * found[4][w] + 1e-10, FormattableString.Invariant($"error {error}, estimate {found[4][w]} at {structure.WavelengthsNm[w]} nm of structure {i}"));
                if (error > found[4][w] + 1e-10)
                    beyond++;
            }
        }
        Assert.True(beyond <= 0.05 * all, FormattableString.Invariant($"{beyond} of {all} beyond the estimates"));
    }

    [Fact]
    public void Answers_depend_neither_on_what_was_solved_before_nor_on_what_is_asked_for_beside()
    {
        SectionPermittivities structure = Structure(70, 6.1);
        var solver = new GratingSolver(1e-5);
        GratingWorkspace used = solver.CreateWorkspace(structure);
        foreach ((double degrees, Polarizations polarization) in (ReadOnlySpan<(double, Polarizations)>)[(0, Polarizations.S), (45, Polarizations.Unpolarized), (20, Polarizations.P), (20, Polarizations.S)])
        {
            double[] again = new double[70], fresh = new double[70];
            SolverRequest request = new(0, 70, Angle.FromDegrees(degrees), polarization, SolverOutputs.Reflectance);
            solver.Solve(structure, request, used, new SolverResponse { Reflectance = again });
            solver.Solve(structure, request, solver.CreateWorkspace(structure), new SolverResponse { Reflectance = fresh });
            Assert.Equal(fresh, again);
        }
        double[] s = new double[70], p = new double[70], mean = new double[70];
        solver.Solve(structure, new SolverRequest(0, 70, Angle.FromDegrees(20), Polarizations.Unpolarized, SolverOutputs.Reflectance), solver.CreateWorkspace(structure), new SolverResponse { Reflectance = mean });
        solver.Solve(structure, new SolverRequest(0, 70, Angle.FromDegrees(20), Polarizations.S, SolverOutputs.Reflectance), used, new SolverResponse { Reflectance = s });
        solver.Solve(structure, new SolverRequest(0, 70, Angle.FromDegrees(20), Polarizations.P, SolverOutputs.Reflectance), used, new SolverResponse { Reflectance = p });
        Assert.Equal(mean, s.Zip(p, (one, other) => (one + other) / 2));
    }

    // The first order opens in the matrix at P (n + sin): there lattice sums of a pack would lose their digits.
    [Fact]
    public void A_wavelength_at_which_an_order_grazes_is_answered_alone()
    {
        Section section = GratingCase.Of("[barbule]\nmatrix = { n = 1.5, k = 0 }\n[[layer]]\nform = \"rod\"\ndiameter = 150\nspacing = 300\nrows = 2\npitch = 200\n").Section;
        double[] wavelengthsNm = [600, 600.001, 599.9999, 450, 450 * (1 + 1e-9)];
        var structure = new SectionPermittivities(section, EmbeddedMaterials.Catalog, wavelengthsNm);
        double[][] found = Solve(structure, LaneWidth.Default, Math.Asin(0.5) * 180 / Math.PI, Polarizations.S, 1e-6), alone = Solve(structure, null, 30, Polarizations.S, 1e-6);
        for (int w = 0; w < wavelengthsNm.Length; w++)
        {
            Assert.Equal(alone[0][w], found[0][w], 3e-6);
            Assert.Equal(1, Enumerable.Range(0, 4).Sum(quantity => found[quantity][w]), 1e-9);
        }
    }

    [Theory]
    [InlineData(Hollow, 1e-6)]
    [InlineData(Porous, 1e-3)]
    public void A_call_allocates_nothing_once_warm(string text, double accuracy)
    {
        SectionPermittivities structure = Structure(GratingCase.Of(text).Section, 61, 8);
        var solver = new GratingSolver(accuracy);
        GratingWorkspace workspace = solver.CreateWorkspace(structure);
        double[] reflectance = new double[61], transmittance = new double[61], absorptance = new double[61];
        Solve(0);
        Solve(30);
        long before = GC.GetAllocatedBytesForCurrentThread();
        Solve(0);
        Solve(30);
        Assert.Equal(0, GC.GetAllocatedBytesForCurrentThread() - before);

        void Solve(double degrees) => solver.Solve(
            structure, new SolverRequest(0, 61, Angle.FromDegrees(degrees), Polarizations.Unpolarized, SolverOutputs.Transmittance | SolverOutputs.Absorptance), workspace,
            new SolverResponse { Reflectance = reflectance, Transmittance = transmittance, Absorptance = absorptance });
    }

    private static SectionPermittivities Structure(int count, double stepNm) => Structure(GratingCase.Of(Hollow).Section, count, stepNm);

    private static SectionPermittivities Structure(Section section, int count, double stepNm)
        => new(section, EmbeddedMaterials.Catalog, [.. Enumerable.Range(0, count).Select(i => 304.3 + stepNm * i)]);

    // R, diffracted R, T, A, estimates.
    private static double[][] Solve(SectionPermittivities structure, LaneWidth? width, double degrees, Polarizations polarization, double accuracy)
    {
        int count = structure.WavelengthsNm.Length;
        double[][] values = [.. Enumerable.Range(0, 5).Select(_ => new double[count])];
        new GratingSolver(accuracy).Solve(
            structure, new SolverRequest(0, count, Angle.FromDegrees(degrees), polarization, SolverOutputs.Transmittance | SolverOutputs.Absorptance),
            new GratingWorkspace(structure.Section, slabsOnly: false, width), new SolverResponse
            {
                Reflectance = values[0],
                DiffractedReflectance = values[1],
                Transmittance = values[2],
                Absorptance = values[3],
                ErrorEstimates = values[4],
            });
        return values;
    }
}
