namespace BarbuleOptics.Grating.Modal.Lanes;

/// <summary>A slab solved for functions of one kind, with what was recorded.</summary>
/// <param name="Shape">The slab.</param>
/// <param name="Geometry">Its functions.</param>
/// <param name="Parity">0 for all of them, 1 for the even, -1 for the odd ones.</param>
/// <param name="Record">What was eliminated.</param>
/// <param name="Light">The light.</param>
/// <param name="IsElectric">Whether E is followed, otherwise H.</param>
internal readonly record struct SlabPart(SlabShape Shape, UprightGeometry Geometry, int Parity, SlabRecord Record, SlabLight Light, bool IsElectric)
{
    /// <summary>The functions.</summary>
    public UprightSector Sector => Geometry.Of(Parity);

    /// <summary>Those of their slopes along the surface.</summary>
    public UprightSector Slopes => Geometry.Of(-Parity);
}
