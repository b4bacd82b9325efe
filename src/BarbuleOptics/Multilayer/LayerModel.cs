using BarbuleOptics.Layering;
using BarbuleOptics.Layering.Mixing;
using BarbuleOptics.Materials;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Multilayer;

/// <summary>A section as films, in slices just fine enough for the reflectance asked for.</summary>
public sealed class LayerModel
{
    private LayerModel(FilmStack films, int[] slices, double sliceError)
    {
        Films = films;
        Slices = ValueList.Create<int>(slices);
        SliceError = sliceError;
    }

    /// <summary>The films, at the wavelengths asked for.</summary>
    public FilmStack Films { get; }

    /// <summary>Number of slices of each kind of interval.</summary>
    public ValueList<int> Slices { get; }

    /// <summary>Estimate of the largest error of R that the slices leave: twice the largest change seen when every slice was halved.</summary>
    /// <remarks>The method is of fourth order, so the error is 16/15 of that change; the rest of the factor allows for the
    /// wavelengths that were not tried.</remarks>
    public double SliceError { get; }

    /// <summary>Finds the slices and builds the films.</summary>
    /// <param name="section">The section.</param>
    /// <param name="catalog">Where its materials are.</param>
    /// <param name="rule">How cuts are averaged.</param>
    /// <param name="grid">The wavelengths.</param>
    /// <param name="incidences">The angles of incidence that will be asked for; at least one.</param>
    /// <param name="tolerance">Largest change of R allowed when slices are halved, at any wavelength; above 0.</param>
    /// <param name="solver">The solver that judges the slices.</param>
    /// <exception cref="ArgumentException">A material cannot be had, or the rods lie at an angle (see <see cref="FilmBuilder"/>).</exception>
    public static LayerModel Of<TWorkspace>(
        Section section, IMaterialCatalog catalog, IMixingRule rule, WavelengthGrid grid, IReadOnlyList<Angle> incidences, double tolerance,
        ISpectralSolver<FilmStack, TWorkspace> solver)
    {
        ArgumentNullException.ThrowIfNull(grid);
        Guard.Positive(tolerance);
        DepthProfile profile = DepthProfile.Of(section);
        var refinement = new SliceRefinement<TWorkspace>(profile, catalog, rule, grid, incidences, solver);
        (int[] slices, double change) = refinement.Find(tolerance);
        var permittivities = new SectionPermittivities(section, catalog, grid.Nanometres);
        return new LayerModel(FilmBuilder.Build(profile, slices, permittivities, rule), slices, 2 * change);
    }
}
