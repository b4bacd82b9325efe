namespace BarbuleOptics.Grating.Joining;

/// <summary>A round rod of a cell.</summary>
/// <param name="Place">Its place along x, in parts of the period.</param>
/// <param name="RadiusNm">Radius, in nm.</param>
/// <param name="CoreRadiusNm">Radius of the concentric core, in nm; 0 when solid.</param>
/// <param name="Material">Number of the material.</param>
/// <param name="CoreMaterial">Number of the core's material; that of the rod when solid.</param>
internal readonly record struct CellRod(int Place, double RadiusNm, double CoreRadiusNm, int Material, int CoreMaterial);
