namespace BarbuleOptics.Multilayer;

/// <summary>What a solver is asked to fill; reflectance always is.</summary>
[Flags]
public enum SolverOutputs
{
    /// <summary>Specular reflectance alone.</summary>
    Reflectance = 0,

    /// <summary>Total transmittance as well.</summary>
    Transmittance = 1,

    /// <summary>Absorbed power as well, from the fields.</summary>
    Absorptance = 2,
}
