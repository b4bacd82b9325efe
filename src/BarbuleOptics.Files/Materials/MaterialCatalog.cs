using System.Diagnostics.CodeAnalysis;
using BarbuleOptics.Materials;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Files;

/// <summary>The materials that structures may name. Never changes once made.</summary>
public sealed class MaterialCatalog : IMaterialCatalog
{
    private const double LeastNm = 10;
    private const double MostNm = 100_000;

    private readonly Dictionary<string, MaterialTable> _byName;

    private MaterialCatalog(Dictionary<string, MaterialTable> byName)
    {
        _byName = byName;
        Tables = [.. byName.Values.OrderBy(table => table.Material.Name, StringComparer.Ordinal)];
        Names = [.. Tables.Select(table => table.Material.Name)];
    }

    /// <summary>Every table, by name.</summary>
    public IReadOnlyList<MaterialTable> Tables { get; }

    /// <summary>Every name, in order.</summary>
    public IReadOnlyList<string> Names { get; }

    /// <summary>A catalog of the tables given.</summary>
    /// <exception cref="ArgumentException">Two tables have one name.</exception>
    public static MaterialCatalog Of(IEnumerable<MaterialTable> tables)
    {
        ArgumentNullException.ThrowIfNull(tables);
        return new MaterialCatalog(tables.ToDictionary(table => table.Material.Name, StringComparer.Ordinal));
    }

    /// <summary>This catalog with the tables of a folder, every <c>*.toml</c> in it; its names win over those here.</summary>
    /// <returns>The catalog, or every problem of every table; a folder that cannot be read and a name that stands twice are problems, too.</returns>
    public FileResult<MaterialCatalog> With(string directory)
    {
        ArgumentNullException.ThrowIfNull(directory);
        if (!TryList(directory, out string[] paths, out string? reason))
            return FileResult.Failure<MaterialCatalog>(SourceLocation.Whole(directory), reason);
        var byName = new Dictionary<string, MaterialTable>(_byName, StringComparer.Ordinal);
        var files = new Dictionary<string, string>(StringComparer.Ordinal);
        List<FileProblem> problems = [];
        foreach (string path in paths)
        {
            FileResult<MaterialTable> table = MaterialTableFile.Read(path);
            problems.AddRange(table.Problems);
            if (!table.Succeeded)
                continue;
            string name = table.Value.Material.Name;
            if (files.TryAdd(name, path))
                byName[name] = table.Value;
            else
                problems.Add(new FileProblem(SourceLocation.Whole(path), "name", $"found {OneLine.Quote(name)}, which {files[name]} has already; allowed one table for a name"));
        }
        return problems.Count > 0 ? FileResult.Failure<MaterialCatalog>(problems) : FileResult.Success(new MaterialCatalog(byName));
    }

    /// <inheritdoc/>
    /// <remarks>Finds names, and makes materials of inline constants (valid from 10 nm to 100 um); paths belong to the structure
    /// file that states them (<see cref="LoadedStructure.Catalog"/>).</remarks>
    public bool TryFind(MaterialReference reference, [NotNullWhen(true)] out Material? material)
    {
        ArgumentNullException.ThrowIfNull(reference);
        material = reference switch
        {
            MaterialReference.Named { Name: var name } => _byName.TryGetValue(name, out MaterialTable? table) ? table.Material : null,
            MaterialReference.Inline inline => Inline(inline),
            _ => null,
        };
        return material is not null;
    }

    private static Material Inline(MaterialReference.Inline constants) => new(
        constants.ToString(), new ConstantDispersion(constants.N), new ConstantDispersion(constants.K),
        Length.FromNanometres(LeastNm), Length.FromNanometres(MostNm), "given in the structure file", "given by the user");

    private static bool TryList(string directory, out string[] paths, [NotNullWhen(false)] out string? reason)
    {
        paths = [];
        reason = null;
        try
        {
            if (!Directory.Exists(directory))
                reason = "there is no such folder";
            else
                paths = [.. Directory.GetFiles(directory, "*.toml").Order(StringComparer.Ordinal)];
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException or ArgumentException)
        {
            reason = $"cannot be read: {OneLine.Escape(e.Message)}";
        }
        return reason is null;
    }
}
