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

    /// <summary>Power lost in each material of a section, material after material: element m * Count + w. May be empty; films write zeros.</summary>
    public Span<double> MaterialAbsorptance { get; init; }

    /// <summary>Power reflected into each order, order after order: element (n + most) * Count + w for orders n from -most to most, as
    /// many as the span has room for; zero where the order does not travel. May be empty; films fill order 0.</summary>
    public Span<double> ReflectedOrders { get; init; }

    /// <summary>Power transmitted into each order, laid out like <see cref="ReflectedOrders"/>.</summary>
    public Span<double> TransmittedOrders { get; init; }

    /// <summary>Estimate of the largest absolute error of the other outputs, one a wavelength. May be empty.</summary>
    public Span<double> ErrorEstimates { get; init; }
}
