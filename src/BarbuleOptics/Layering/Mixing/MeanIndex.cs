using System.Numerics;

namespace BarbuleOptics.Layering.Mixing;

/// <summary>Isotropic, n + i k = sum f (n + i k): the average that most of the barbule literature uses.</summary>
public sealed class MeanIndex : IMixingRule
{
    /// <inheritdoc/>
    public string Name => "mean-index";

    /// <inheritdoc/>
    public string Description => "mean of the refractive indices by area, isotropic (common practice, no source)";

    /// <inheritdoc/>
    public DiagonalPermittivity Mix(SectionCut cut, ReadOnlySpan<Complex> permittivities, double wavelengthNm)
    {
        Complex index = Complex.Zero;
        for (int m = 0; m < permittivities.Length; m++)
        {
            if (cut.Fractions[m] > 0)
                index += cut.Fractions[m] * Complex.Sqrt(permittivities[m]);
        }
        return DiagonalPermittivity.Isotropic(PassiveRoot.Passive(index * index));
    }
}
