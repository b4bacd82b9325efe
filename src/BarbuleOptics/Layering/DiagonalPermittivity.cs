using System.Numerics;

namespace BarbuleOptics.Layering;

/// <summary>Permittivity whose principal axes are x (along the surface, in the plane of incidence), y (normal to that plane) and z (depth).</summary>
public readonly record struct DiagonalPermittivity(Complex X, Complex Y, Complex Z)
{
    /// <summary>The same along every axis.</summary>
    public static DiagonalPermittivity Isotropic(Complex permittivity) => new(permittivity, permittivity, permittivity);
}
