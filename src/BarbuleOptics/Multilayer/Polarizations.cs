namespace BarbuleOptics.Multilayer;

/// <summary>Polarization of the incident light.</summary>
[Flags]
public enum Polarizations
{
    /// <summary>None.</summary>
    None = 0,

    /// <summary>Electric field along y, normal to the plane of incidence.</summary>
    S = 1,

    /// <summary>Magnetic field along y, normal to the plane of incidence.</summary>
    P = 2,

    /// <summary>Mean of the intensities of s and p.</summary>
    Unpolarized = S | P,
}
