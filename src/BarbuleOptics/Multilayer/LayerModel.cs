using BarbuleOptics.Layering;
using BarbuleOptics.Layering.Mixing;
using BarbuleOptics.Materials;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Multilayer;

/// <summary>A section as films, in slices just fine enough for the reflectance asked for.</summary>
public sealed class LayerModel
{
    private readonly FilmPlan _plan;
    private readonly Section _section;
    private readonly IMaterialCatalog _catalog;
    private readonly IMixingRule _rule;

    private LayerModel(DepthProfile profile, IMaterialCatalog catalog, IMixingRule rule, int[] slices, double sliceError)
    {
        _plan = FilmPlan.Of(profile, slices);
        _section = profile.Section;
        _catalog = catalog;
        _rule = rule;
        Slices = ValueList.Create<int>(slices);
        SliceError = sliceError;
    }

    /// <summary>Number of films.</summary>
    public int FilmCount => _plan.FilmCount;

    /// <summary>Number of slices of each kind of interval.</summary>
    public ValueList<int> Slices { get; }

    /// <summary>Estimate of the largest error of R, T and A that the slices leave: twice the largest change seen when every slice was halved.</summary>
    /// <remarks>The method is of fourth order, so the error is 16/15 of that change; the rest of the factor allows for the
    /// wavelengths that were not tried.</remarks>
    public double SliceError { get; }

    /// <summary>Finds the slices.</summary>
    /// <param name="section">The section.</param>
    /// <param name="catalog">Where its materials are.</param>
    /// <param name="rule">How cuts are averaged.</param>
    /// <param name="grid">The wavelengths.</param>
    /// <param name="incidences">The angles of incidence that will be asked for; at least one.</param>
    /// <param name="ofReflectance">Largest change of R allowed when slices are halved, at any wavelength; above 0.</param>
    /// <param name="ofAny">The same for T and A.</param>
    /// <param name="solver">The solver that judges the slices.</param>
    /// <param name="cancellation">Ends the search early with an <see cref="OperationCanceledException"/>.</param>
    /// <exception cref="ArgumentException">A material cannot be had, or the rods lie at an angle (see <see cref="FilmBuilder"/>).</exception>
    public static LayerModel Of<TWorkspace>(
        Section section, IMaterialCatalog catalog, IMixingRule rule, WavelengthGrid grid, IReadOnlyList<Angle> incidences, double ofReflectance, double ofAny,
        ISpectralSolver<FilmStack, TWorkspace> solver, CancellationToken cancellation = default)
    {
        ArgumentNullException.ThrowIfNull(grid);
        Guard.Positive(ofReflectance);
        Guard.Positive(ofAny);
        DepthProfile profile = DepthProfile.Of(section);
        var refinement = new SliceRefinement<TWorkspace>(profile, catalog, rule, grid, incidences, solver);
        (int[] slices, double change) = refinement.Find(ofReflectance, ofAny, cancellation);
        return new LayerModel(profile, catalog, rule, slices, 2 * change);
    }

    /// <summary>A section much like this one, in slices as fine, without a search.</summary>
    /// <remarks>Where it falls into other kinds of intervals, each gets the slices of the finest.</remarks>
    internal LayerModel Like(Section section)
    {
        DepthProfile profile = DepthProfile.Of(section);
        var slices = new int[profile.KindCount];
        Array.Fill(slices, Slices.Count == 0 ? 1 : Slices.Max());
        if (slices.Length == Slices.Count)
            Slices.AsSpan().CopyTo(slices);
        return new LayerModel(profile, _catalog, _rule, slices, SliceError);
    }

    /// <summary>The films at the wavelengths at which materials were looked up.</summary>
    internal FilmStack FilmsOf(SampledMaterials materials) => _plan.Build(new SectionPermittivities(_section, materials), _rule);

    /// <summary>The films at some wavelengths; a long grid is taken in blocks, for each film holds six numbers a wavelength.</summary>
    /// <param name="wavelengthsNm">Vacuum wavelengths, in nm.</param>
    /// <exception cref="ArgumentException">A table does not reach a wavelength.</exception>
    public FilmStack FilmsAt(ReadOnlySpan<double> wavelengthsNm) => _plan.Build(new SectionPermittivities(_section, _catalog, wavelengthsNm), _rule);
}
