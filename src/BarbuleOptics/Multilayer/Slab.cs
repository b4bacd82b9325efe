namespace BarbuleOptics.Multilayer;

/// <summary>A backing that ends: its medium, the half-space behind it, and k0 times its thickness.</summary>
internal readonly record struct Slab(MediumWave Medium, MediumWave Behind, double Thickness)
{
    /// <summary>Whether there are fringes to average over: the wave turns faster than it decays, and a slab that absorbs is a radian thick.</summary>
    /// <remarks>Under total reflection or in a metal no thickness shows a fringe, and the slab is solved as it is. An average at a fixed decay
    /// gives a lossless slab of any thickness its mean; an absorbing one thinner than a radian would seem to amplify. Callers that want no
    /// change of method within a spectrum average only slabs that hold a fringe at every wavelength.</remarks>
    public bool HasFringes => Medium.Depth.Real > Medium.Depth.Imaginary && (Medium.Depth.Imaginary == 0 || Medium.Depth.Real * Thickness >= 1);
}
