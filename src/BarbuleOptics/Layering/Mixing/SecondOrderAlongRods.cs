using System.Numerics;

namespace BarbuleOptics.Layering.Mixing;

/// <summary>A rule for the plane of the section joined with the second order in period / wavelength along the rods.</summary>
/// <remarks>Where the electric field lies along the rods it is continuous, lamellae of one cut are the right picture and the second
/// order of <see cref="SecondOrderFormBirefringence"/> corrects the mean; across them the shape of a body counts, which
/// the quasi-static rules for cylinders know and lamellae do not.</remarks>
/// <param name="inPlane">Gives the permittivity across the rods and in depth.</param>
public sealed class SecondOrderAlongRods(IMixingRule inPlane) : IMixingRule
{
    private readonly IMixingRule _inPlane = inPlane ?? throw new ArgumentNullException(nameof(inPlane));

    /// <inheritdoc/>
    public string Name => _inPlane.Name + "-2";

    /// <inheritdoc/>
    public string Description => $"{_inPlane.Name} across the rods; along them the second order in period over wavelength (Rytov 1956)";

    /// <inheritdoc/>
    public DiagonalPermittivity Mix(SectionCut cut, ReadOnlySpan<Complex> permittivities, double wavelengthNm)
        => _inPlane.Mix(cut, permittivities, wavelengthNm) with { Y = SecondOrderFormBirefringence.Along(cut, permittivities, wavelengthNm) };
}
