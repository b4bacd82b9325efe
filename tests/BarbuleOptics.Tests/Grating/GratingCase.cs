using BarbuleOptics.Files;
using BarbuleOptics.Grating;
using BarbuleOptics.Layering;
using BarbuleOptics.Layering.Mixing;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;
using BarbuleOptics.Tests.Layering;
using Xunit;

namespace BarbuleOptics.Tests.Grating;

/// <summary>A section with its materials, ready to be solved.</summary>
internal sealed class GratingCase(Section section)
{
    /// <summary>Most order that answers tell apart.</summary>
    public const int MostOrder = 12;

    public Section Section { get; } = section;

    /// <summary>From the text of a structure file without its first line.</summary>
    public static GratingCase Of(string text) => new(Structures.Section(text));

    /// <summary>With the rods at another angle to the plane of incidence.</summary>
    public GratingCase At(double axisDegrees) => new(Section with { Axis = Angle.FromDegrees(axisDegrees) });

    /// <summary>Solves one wavelength.</summary>
    public GratingAnswer Solve(double wavelengthNm, double degrees, Polarizations polarization, double accuracy = 1e-8, bool slabsOnly = false)
        => Solve([wavelengthNm], degrees, polarization, accuracy, slabsOnly)[0];

    /// <summary>Solves a block of wavelengths.</summary>
    public GratingAnswer[] Solve(double[] wavelengthsNm, double degrees, Polarizations polarization, double accuracy = 1e-8, bool slabsOnly = false)
    {
        var structure = new SectionPermittivities(Section, EmbeddedMaterials.Catalog, wavelengthsNm);
        int count = wavelengthsNm.Length, materials = Section.Materials.Count, orders = 2 * MostOrder + 1;
        double[][] values = [.. Enumerable.Range(0, 5).Select(_ => new double[count])];
        double[] byMaterial = new double[materials * count], reflected = new double[orders * count], transmitted = new double[orders * count];
        var workspace = new GratingWorkspace(Section, slabsOnly);
        double largest = new GratingSolver(accuracy).Solve(
            structure, new SolverRequest(0, count, Angle.FromDegrees(degrees), polarization, SolverOutputs.Transmittance | SolverOutputs.Absorptance), workspace,
            new SolverResponse
            {
                Reflectance = values[0],
                DiffractedReflectance = values[1],
                Transmittance = values[2],
                Absorptance = values[3],
                ErrorEstimates = values[4],
                MaterialAbsorptance = byMaterial,
                ReflectedOrders = reflected,
                TransmittedOrders = transmitted,
            });
        Assert.Equal(values[4].Max(), largest);
        return [.. Enumerable.Range(0, count).Select(w => new GratingAnswer(
            values[0][w], values[1][w], values[2][w], values[3][w], values[4][w], Pick(byMaterial, w), Pick(reflected, w), Pick(transmitted, w)))];

        double[] Pick(double[] all, int w) => [.. Enumerable.Range(0, all.Length / count).Select(i => all[i * count + w])];
    }

    /// <summary>R, T and A of the same section by the multilayer solver: exact where every body has the index of what surrounds it.</summary>
    public Powers AsFilms(double wavelengthNm, double degrees, Polarizations polarization)
    {
        Section across = Section with { Axis = Angle.FromDegrees(0) };
        DepthProfile profile = DepthProfile.Of(across);
        int[] slices = [.. Enumerable.Repeat(1, profile.KindCount)];
        FilmStack films = FilmBuilder.Build(profile, slices, new SectionPermittivities(across, EmbeddedMaterials.Catalog, [wavelengthNm]), new MeanIndex());
        var solver = new ReferenceFilmSolver();
        double[] reflected = new double[1], transmitted = new double[1], absorbed = new double[1];
        solver.Solve(
            films, new SolverRequest(0, 1, Angle.FromDegrees(degrees), polarization, SolverOutputs.Transmittance | SolverOutputs.Absorptance),
            solver.CreateWorkspace(films), new SolverResponse { Reflectance = reflected, Transmittance = transmitted, Absorptance = absorbed });
        return new Powers(reflected[0], transmitted[0], absorbed[0]);
    }

    /// <summary>Powers of films.</summary>
    internal readonly record struct Powers(double Reflected, double Transmitted, double Absorbed);
}
