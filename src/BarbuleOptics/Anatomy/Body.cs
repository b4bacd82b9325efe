using BarbuleOptics.Materials;

namespace BarbuleOptics.Anatomy;

/// <summary>One thing in the cell that a row repeats.</summary>
/// <param name="Form">Its section.</param>
/// <param name="Material">What it is made of.</param>
/// <param name="LumenMaterial">What a hollow holds.</param>
/// <param name="SpacingShare">Place along the surface, as a share of the spacing, -1 to 1.</param>
/// <param name="OffsetNm">Depth of its center below the row's, in nm; may be negative.</param>
public sealed record Body(MelanosomeForm Form, MaterialReference Material, MaterialReference LumenMaterial, double SpacingShare, double OffsetNm);
