using System.Numerics;

namespace BarbuleOptics.Layering.Mixing;

/// <summary>Lamellae much narrower than the wavelength: along the rods and in depth sum f e, across them 1 / sum(f / e)
/// (Rytov 1956, Sov. Phys. JETP 2:466, zeroth order; Born and Wolf, Principles of Optics, section 14.5.2, number from memory).</summary>
public sealed class FormBirefringence : IMixingRule
{
    /// <inheritdoc/>
    public string Name => "form-birefringence";

    /// <inheritdoc/>
    public string Description => "form birefringence of lamellae, zeroth order (Rytov 1956)";

    /// <inheritdoc/>
    public DiagonalPermittivity Mix(SectionCut cut, ReadOnlySpan<Complex> permittivities, double wavelengthNm)
    {
        Complex mean = Averages.Permittivity(cut, permittivities);
        return new(Averages.SeriesPermittivity(cut, permittivities), mean, mean);
    }
}
