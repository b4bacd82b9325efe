namespace BarbuleOptics.Grating.Batches;

/// <summary>What a <see cref="BatchStep"/> is.</summary>
internal enum BatchStepKind
{
    /// <summary>A homogeneous layer, with a move along the surface behind it.</summary>
    Layer,

    /// <summary>A plane between two media.</summary>
    Interface,

    /// <summary>A row or slab with bodies.</summary>
    Element,
}
