using BarbuleOptics.Materials;

namespace BarbuleOptics.Files;

/// <summary>A material with what its table says beside the constants.</summary>
/// <param name="Material">The optical constants, with their source.</param>
/// <param name="Note">The table's remark; null when it has none.</param>
/// <param name="File">The file as the user named it; null for a table that the program carries.</param>
public sealed record MaterialTable(Material Material, string? Note, string? File);
