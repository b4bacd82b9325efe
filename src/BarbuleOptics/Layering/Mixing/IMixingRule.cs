using System.Numerics;

namespace BarbuleOptics.Layering.Mixing;

/// <summary>Averages a cut through the section into the permittivity of a film.</summary>
public interface IMixingRule
{
    /// <summary>Name on the command line and in files.</summary>
    string Name { get; }

    /// <summary>What the rule is, in one line with its source.</summary>
    string Description { get; }

    /// <summary>The effective permittivity with the rods along y: x across them, y along them, z in depth. Imaginary parts are 0 or above.</summary>
    /// <param name="cut">The section at one depth.</param>
    /// <param name="permittivities">Permittivity of each material, by its number.</param>
    /// <param name="wavelengthNm">Vacuum wavelength in nm, above 0.</param>
    DiagonalPermittivity Mix(SectionCut cut, ReadOnlySpan<Complex> permittivities, double wavelengthNm);
}
