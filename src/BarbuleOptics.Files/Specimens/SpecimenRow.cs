namespace BarbuleOptics.Files.Specimens;

/// <summary>One specimen of a table: what was read of it, or what is wrong with it.</summary>
/// <param name="Number">Number of its row.</param>
/// <param name="Name">Its name; empty where it has none.</param>
/// <param name="Structure">The structure, or its problems, each placed at row and column.</param>
public sealed record SpecimenRow(int Number, string Name, FileResult<LoadedStructure> Structure);
