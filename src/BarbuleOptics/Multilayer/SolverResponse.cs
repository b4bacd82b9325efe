namespace BarbuleOptics.Multilayer;

/// <summary>Where a solver writes, one element for each wavelength of the block; fractions 0 to 1. Spans that were not asked for may be empty.</summary>
public readonly ref struct SolverResponse
{
    /// <summary>Power reflected into the specular direction.</summary>
    public Span<double> Reflectance { get; init; }

    /// <summary>Power through the last face, over all orders.</summary>
    public Span<double> Transmittance { get; init; }

    /// <summary>Power lost inside.</summary>
    public Span<double> Absorptance { get; init; }

    /// <summary>Power reflected into other orders; films have none and write zeros where the span is not empty.</summary>
    public Span<double> DiffractedReflectance { get; init; }

    /// <summary>Power lost in each film, film after film: element f * Count + w. May be empty.</summary>
    public Span<double> FilmAbsorptance { get; init; }
}
