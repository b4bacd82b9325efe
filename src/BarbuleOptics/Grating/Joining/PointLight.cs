using System.Numerics;

namespace BarbuleOptics.Grating.Joining;

/// <summary>The incident light at one wavelength and direction, seen by the rods.</summary>
/// <param name="WavelengthNm">Vacuum wavelength, in nm.</param>
/// <param name="Index">Index of the surround.</param>
/// <param name="Across">Sine of the angle of incidence times the cosine of the rods' axis angle.</param>
/// <param name="Along">Sine of the angle of incidence times the sine of the rods' axis angle.</param>
/// <param name="Cosine">Cosine of the angle of incidence.</param>
internal readonly record struct PointLight(double WavelengthNm, double Index, double Across, double Along, double Cosine)
{
    /// <summary>Vacuum wave number, in 1/nm.</summary>
    public double K0 => 2 * Math.PI / WavelengthNm;

    /// <summary>Wave vector across the rods, in 1/nm.</summary>
    public double Kx0 => K0 * Index * Across;

    /// <summary>Wave vector along the rods, in 1/nm.</summary>
    public double Ky => K0 * Index * Along;

    /// <summary>Whether fields along the rods are coupled.</summary>
    public bool IsConical => Along != 0;

    /// <summary>(kz/k0)^2 of the zeroth order in a medium.</summary>
    /// <remarks>Written from the cosine, so that near grazing incidence the surround and media much like it keep their digits.</remarks>
    public Complex ZerothDepthSquared(Complex permittivity)
    {
        double normal = Index * Cosine;
        return new Complex(Math.FusedMultiplyAdd(-Index, Index, permittivity.Real) + normal * normal, permittivity.Imaginary);
    }
}
