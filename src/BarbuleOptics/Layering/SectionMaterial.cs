using BarbuleOptics.Materials;

namespace BarbuleOptics.Layering;

/// <summary>A material of the section: one as it is, or a porous core averaged from two.</summary>
/// <param name="Main">The material, or the solid part of the core.</param>
/// <param name="Filler">What fills the pores; null for a plain material.</param>
/// <param name="FillerShare">Share of the filler by volume, 0 to 1.</param>
public sealed record SectionMaterial(MaterialReference Main, MaterialReference? Filler, double FillerShare)
{
    /// <summary>A plain material.</summary>
    public static SectionMaterial Plain(MaterialReference main) => new(main, null, 0);

    /// <summary>Whether this is an average of two materials.</summary>
    public bool IsAveraged => Filler is not null;
}
