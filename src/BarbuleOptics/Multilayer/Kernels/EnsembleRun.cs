namespace BarbuleOptics.Multilayer.Kernels;

/// <summary>One call on the ensemble kernel.</summary>
internal readonly ref struct EnsembleRun
{
    /// <summary>Factors against thickness.</summary>
    public required FactorNodes Nodes { get; init; }

    /// <summary>The films, outermost first; at least one.</summary>
    public required ReadOnlySpan<EnsembleStep> Steps { get; init; }

    /// <summary>For each stack and film where its factor is found.</summary>
    public required ReadOnlySpan<ThicknessPlace> Places { get; init; }

    /// <summary>Where the reflections of the uppermost face begin.</summary>
    public required int Top { get; init; }

    /// <summary>Number of stacks.</summary>
    public required int Stacks { get; init; }

    /// <summary>Number of wavelengths.</summary>
    public required int Wavelengths { get; init; }

    /// <summary>Weight of what is added.</summary>
    public required double Weight { get; init; }

    /// <summary>|a + rho b|^2 must be above this.</summary>
    public required double LeastNorm { get; init; }

    /// <summary>Is added to, stack after stack.</summary>
    public required Span<double> Reflectance { get; init; }

    /// <summary>Receives true for stacks that the error bound does not cover.</summary>
    public required Span<bool> Doubtful { get; init; }
}
