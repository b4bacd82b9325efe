namespace BarbuleOptics.Layering;

/// <summary>One stretch of a single material along a cut.</summary>
/// <param name="Material">Number of its material.</param>
/// <param name="Share">Its share of the period.</param>
public readonly record struct Lamella(int Material, double Share);
