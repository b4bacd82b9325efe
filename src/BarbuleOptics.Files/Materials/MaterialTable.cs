using BarbuleOptics.Materials;

namespace BarbuleOptics.Files;

/// <summary>A material and the table it came from.</summary>
/// <param name="Material">The optical constants, with their source.</param>
/// <param name="File">The file as the user named it; null for a table that the program carries.</param>
public sealed record MaterialTable(Material Material, string? File);
