using BarbuleOptics.Layering.Mixing;

namespace BarbuleOptics.Layering;

/// <summary>Replaces the section by films: slices it in depth, averages each cut by a mixing rule and each slice over its depth.</summary>
/// <remarks>
/// Maxwell's equations for a layered medium depend on depth through ex, ey and 1/ez alone (s: ey; p: ex and 1/ez), linearly. A slice
/// becomes two films of half its thickness whose values have the slice's own mean and first moment of these three. That makes the
/// product of transfer matrices right to fourth order in the slice's thickness, as in a commutator-free Magnus integrator
/// (Blanes and Moan 2006, Appl. Numer. Math. 56:1519), where plain averages are of second order. No higher order can be had so: beyond the
/// fourth, some exponential of every such integrator runs backward (Hofstaetter and Koch 2019, Numer. Math. 141; from memory), and a film of negative
/// thickness amplifies what should be absorbed. Within an interval, slices are equal in
/// psi, depth = (1 - cos psi) x thickness / 2: they crowd towards the ends, where the chord of a round body grows like a square root,
/// and in psi it is smooth. Five Gauss points in psi a slice give a slice's areas to 1e-7 of the interval with one slice, 1e-9 with two or more.
/// </remarks>
public static class FilmBuilder
{
    /// <summary>The films of a section.</summary>
    /// <param name="profile">Its intervals.</param>
    /// <param name="slices">Number of slices of each kind of interval, 1 or above; uniform kinds stay one film.</param>
    /// <param name="permittivities">The materials at the wavelengths wanted.</param>
    /// <param name="rule">How a cut is averaged.</param>
    /// <exception cref="ArgumentException">The rods lie neither across nor along the plane of incidence: films have no such axis.</exception>
    public static FilmStack Build(DepthProfile profile, ReadOnlySpan<int> slices, SectionPermittivities permittivities, IMixingRule rule)
        => FilmPlan.Of(profile, slices).Build(permittivities, rule);
}
