namespace BarbuleOptics.Grating;

/// <summary>How finely a section is solved; refinement climbs through such steps.</summary>
/// <param name="Orders">Largest plane-wave order that couples the pieces, M.</param>
/// <param name="Multipoles">Largest multipole of a rod, L.</param>
/// <param name="Harmonics">Largest harmonic within a modal slab, N; at least <paramref name="Orders"/> is used.</param>
/// <param name="Depth">Fineness of the depth mesh of a modal slab, 0 the coarsest; each step about halves its elements or raises their order.</param>
/// <param name="SplitsLosses">Whether losses are told apart by material; otherwise one material may be given the loss of all, which costs less.</param>
internal readonly record struct Resolution(int Orders, int Multipoles, int Harmonics, int Depth, bool SplitsLosses = true);
