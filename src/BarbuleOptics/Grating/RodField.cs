namespace BarbuleOptics.Grating;

/// <summary>Which field along the rods describes the light.</summary>
internal enum RodField
{
    /// <summary>The electric field alone: no wave vector along the rods, electric field along them.</summary>
    Electric,

    /// <summary>The magnetic field alone: no wave vector along the rods, magnetic field along them.</summary>
    Magnetic,

    /// <summary>Both, coupled at the bodies by a wave vector along the rods.</summary>
    Both,
}
