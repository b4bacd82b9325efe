using System.Numerics;

namespace BarbuleOptics.Layering;

/// <summary>Permittivity of a core whose pores are small against the wavelength: three-dimensional Bruggeman average.</summary>
/// <remarks>f (ea - e)/(ea + 2 e) + (1 - f) (eb - e)/(eb + 2 e) = 0 (Bruggeman 1935, Ann. Phys. 416:636), a quadratic; the root
/// with Im e >= 0, for real permittivities the positive one, is the passive one.</remarks>
public static class PorousCore
{
    /// <summary>Name of the average, for the output.</summary>
    public const string Name = "bruggeman-3d";

    /// <summary>The average of a solid and the filler of its pores.</summary>
    /// <param name="solid">Permittivity of the solid.</param>
    /// <param name="filler">Permittivity of what fills the pores.</param>
    /// <param name="fillerShare">Share of the filler by volume, 0 to 1.</param>
    public static Complex Average(Complex solid, Complex filler, double fillerShare)
    {
        Complex b = (3 * fillerShare - 1) * filler + (2 - 3 * fillerShare) * solid;
        return PassiveRoot.OfQuadratic(b / 4, solid * filler / 2);
    }
}
