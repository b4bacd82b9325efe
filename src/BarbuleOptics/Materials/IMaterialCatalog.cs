using System.Diagnostics.CodeAnalysis;

namespace BarbuleOptics.Materials;

/// <summary>Where materials come from; the library reads no files.</summary>
public interface IMaterialCatalog
{
    /// <summary>Finds what <paramref name="reference"/> names; false when there is no such material.</summary>
    bool TryFind(MaterialReference reference, [NotNullWhen(true)] out Material? material);
}
