using BarbuleOptics.Layering;

namespace BarbuleOptics.Multilayer.Kernels;

/// <summary>One call on the field kernel.</summary>
internal readonly ref struct FieldRun
{
    /// <summary>The stack.</summary>
    public required FilmStack Stack { get; init; }

    /// <summary>Its films, equal ones found.</summary>
    public required FilmSequence Films { get; init; }

    /// <summary>First wavelength of the block.</summary>
    public required int First { get; init; }

    /// <summary>Number of wavelengths.</summary>
    public required int Count { get; init; }

    /// <summary>Sine of the angle of incidence.</summary>
    public required double Sine { get; init; }

    /// <summary>Its cosine.</summary>
    public required double Cosine { get; init; }

    /// <summary>How far R + T + A may be from 1.</summary>
    public required double MostImbalance { get; init; }

    /// <summary>Is added to.</summary>
    public required Span<double> Reflectance { get; init; }

    /// <summary>Is added to where it is not empty.</summary>
    public Span<double> Transmittance { get; init; }

    /// <summary>Is added to where it is not empty.</summary>
    public Span<double> Absorptance { get; init; }
}
