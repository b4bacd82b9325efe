using BarbuleOptics.Quantities;

namespace BarbuleOptics.Multilayer;

/// <summary>What every medium of a stack sees of the light: one wavelength, one direction, s or p.</summary>
/// <param name="SurroundIndex">Real index n0 of the surround.</param>
/// <param name="Sine">Sine of the angle of incidence.</param>
/// <param name="Cosine">Cosine of the angle of incidence.</param>
/// <param name="IsP">Whether the magnetic field lies along y; otherwise the electric field does.</param>
internal readonly record struct PlaneWave(double SurroundIndex, double Sine, double Cosine, bool IsP)
{
    /// <summary>Sine and cosine of an angle of incidence.</summary>
    /// <remarks>The cosine is the sine of the complement, which keeps its digits at grazing incidence.</remarks>
    public static (double Sine, double Cosine) Direction(Angle incidence)
        => (Math.Sin(incidence.Radians), Math.Sin(double.DegreesToRadians(90 - incidence.Degrees)));

    /// <summary>(kx/k0)^2, the same in all media.</summary>
    public double LateralSquared => SurroundIndex * SurroundIndex * (Sine * Sine);

    /// <summary>Admittance of the surround, in the units of <see cref="MediumWave.Admittance"/>.</summary>
    public double SurroundAdmittance => IsP ? Cosine / SurroundIndex : SurroundIndex * Cosine;

    /// <summary><paramref name="permittivity"/> - (kx/k0)^2.</summary>
    /// <remarks>Near grazing incidence written as (e - n0^2) + (n0 cos)^2, so that a medium much like the surround keeps its digits.</remarks>
    public double MinusLateralSquared(double permittivity)
    {
        if (Sine < Cosine)
            return permittivity - LateralSquared;
        double normal = SurroundIndex * Cosine;
        return Math.FusedMultiplyAdd(-SurroundIndex, SurroundIndex, permittivity) + normal * normal;
    }
}
