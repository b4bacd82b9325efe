namespace BarbuleOptics.Spectra.Instruments;

/// <summary>Shapes of the distribution of facet normals.</summary>
public enum FacetTiltKind
{
    /// <summary>All facets lie in the mean surface.</summary>
    Flat,

    /// <summary>Tilts about both axes are normally distributed.</summary>
    Normal,

    /// <summary>Normals lie evenly on an arc across the rods.</summary>
    Arc,
}
