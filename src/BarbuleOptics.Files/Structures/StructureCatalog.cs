using System.Diagnostics.CodeAnalysis;
using BarbuleOptics.Materials;

namespace BarbuleOptics.Files;

/// <summary>A catalog with the tables that one structure file names by path.</summary>
internal sealed class StructureCatalog(IMaterialCatalog catalog, IReadOnlyDictionary<string, Material> tables) : IMaterialCatalog
{
    /// <inheritdoc/>
    public bool TryFind(MaterialReference reference, [NotNullWhen(true)] out Material? material)
        => reference is MaterialReference.TablePath table
            ? tables.TryGetValue(table.Path, out material)
            : catalog.TryFind(reference, out material);
}
