namespace BarbuleOptics.Multilayer.Kernels;

/// <summary>One call on the amplitude kernel.</summary>
internal readonly ref struct AmplitudeRun
{
    /// <summary>What it reads.</summary>
    public required DirectionTable Table { get; init; }

    /// <summary>The films, outermost first.</summary>
    public required Span<AmplitudeStep> Steps { get; init; }

    /// <summary>Where the reflections of the uppermost face begin, in doubles from a vector's own beginning.</summary>
    public required int Top { get; init; }

    /// <summary>Number of vectors.</summary>
    public required int Vectors { get; init; }

    /// <summary>|a + rho b|^2 must be above this.</summary>
    public required double LeastNorm { get; init; }

    /// <summary>Is added to.</summary>
    public required Span<double> Reflectance { get; init; }

    /// <summary>Receives true for vectors that the bound does not cover.</summary>
    public required Span<bool> Doubtful { get; init; }
}
