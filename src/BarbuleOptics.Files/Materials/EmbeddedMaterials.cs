using System.Reflection;

namespace BarbuleOptics.Files;

/// <summary>The tables of optical constants that the program carries.</summary>
public static class EmbeddedMaterials
{
    private const string Folder = "material-tables/";

    private static readonly Lazy<MaterialCatalog> Loaded = new(Load);

    /// <summary>All of them; read once, at first use.</summary>
    /// <exception cref="InvalidOperationException">A table that the program carries is wrong: a fault of the program.</exception>
    public static MaterialCatalog Catalog => Loaded.Value;

    /// <summary>The catalog with the tables of a user's folder over it, where one is given.</summary>
    /// <param name="directory">The folder; null for none.</param>
    /// <returns>The catalog, or every problem of the folder's tables.</returns>
    public static FileResult<MaterialCatalog> WithFolder(string? directory)
        => directory is null ? FileResult.Success(Catalog) : Catalog.With(directory);

    private static MaterialCatalog Load()
    {
        Assembly assembly = typeof(EmbeddedMaterials).Assembly;
        string[] names = [.. assembly.GetManifestResourceNames().Where(name => name.StartsWith(Folder, StringComparison.Ordinal))];
        return MaterialCatalog.Of(names.Select(name => Read(assembly, name)));
    }

    private static MaterialTable Read(Assembly assembly, string name)
    {
        using Stream stream = assembly.GetManifestResourceStream(name)!;
        byte[] bytes = new byte[stream.Length];
        stream.ReadExactly(bytes);
        FileResult<MaterialTable> table = MaterialTableFile.Parse(bytes, name);
        return table.Succeeded
            ? table.Value with { File = null }
            : throw new InvalidOperationException($"The embedded table is wrong: {table.Problems[0]}");
    }
}
