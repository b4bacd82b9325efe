using System.Numerics;

namespace BarbuleOptics.Layering.Mixing;

/// <summary>Isotropic, e = sum f e: exact for a field along the lamellae, in the limit of a short period.</summary>
public sealed class MeanPermittivity : IMixingRule
{
    /// <inheritdoc/>
    public string Name => "mean-permittivity";

    /// <inheritdoc/>
    public string Description => "mean of the permittivities by area, isotropic (upper bound of Wiener 1912)";

    /// <inheritdoc/>
    public DiagonalPermittivity Mix(SectionCut cut, ReadOnlySpan<Complex> permittivities, double wavelengthNm)
        => DiagonalPermittivity.Isotropic(Averages.Permittivity(cut, permittivities));
}
