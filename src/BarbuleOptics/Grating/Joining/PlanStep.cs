namespace BarbuleOptics.Grating.Joining;

/// <summary>What a <see cref="PlanPiece"/> is.</summary>
internal enum PlanStep
{
    /// <summary>A homogeneous layer: a gap of matrix, a film.</summary>
    Layer,

    /// <summary>A plane between two media.</summary>
    Interface,

    /// <summary>A row or slab with bodies.</summary>
    Element,

    /// <summary>A plane in the matrix between groups of rows of different spacing.</summary>
    Joint,
}
