namespace BarbuleOptics.Multilayer;

/// <summary>A backing that ends: its medium, the half-space behind it, and k0 times its thickness.</summary>
internal readonly record struct Slab(MediumWave Medium, MediumWave Behind, double Thickness)
{
    /// <summary>Whether it holds at least one fringe, so that averaging over one stands for thicknesses that exist.</summary>
    /// <remarks>A slab that does not is solved as it is: a thin one, and one whose wave decays before it turns, as under total
    /// reflection or in a metal.</remarks>
    public bool HoldsFringe => Medium.Depth.Real * Thickness >= Math.PI;
}
