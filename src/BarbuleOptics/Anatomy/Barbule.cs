using BarbuleOptics.Materials;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Anatomy;

/// <summary>One barbule as measured: the cortex, the layers of melanosomes under it from the outside in, and the far side.</summary>
/// <param name="Name">As the user calls it.</param>
/// <param name="Surround">Where the light comes from; lossless.</param>
/// <param name="Matrix">The cortex and what embeds the melanosomes.</param>
/// <param name="Backing">What lies under the last row; null when unknown.</param>
/// <param name="Axis">Direction of the rods from "across the plane of incidence" (0) to "along it" (90 degrees).</param>
/// <param name="Cortex">Thickness from the surface to the top of the first row; null when there is none.</param>
/// <param name="Layers">From the outside in; may be empty where there is a cortex.</param>
/// <param name="Back">Where the backing ends; null for a half-space.</param>
public sealed record Barbule(
    string Name, MaterialReference Surround, MaterialReference Matrix, MaterialReference? Backing, Angle Axis,
    MeasuredLength? Cortex, ValueList<BarbuleLayer> Layers, Back? Back)
{
    /// <summary>What cutting, drying and embedding did to the lengths; null where they are those of the barbule.</summary>
    public Preparation? Preparation { get; init; }

    /// <summary>What a fossil lost in size; null for none.</summary>
    public Preservation? Preservation { get; init; }

    /// <summary>Name of the default surround.</summary>
    public const string DefaultSurround = "air";

    /// <summary>Name of the default matrix and backing.</summary>
    public const string DefaultMatrix = "keratin";

    /// <summary>Name of the default material of melanosomes.</summary>
    public const string DefaultMelanin = "eumelanin";

    /// <summary>Name of the default content of a hollow.</summary>
    public const string DefaultLumen = "air";
}
