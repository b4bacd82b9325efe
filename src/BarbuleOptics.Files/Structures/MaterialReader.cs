using BarbuleOptics.Files.Toml;
using BarbuleOptics.Materials;

namespace BarbuleOptics.Files;

/// <summary>Reads how a structure names its materials, and finds each.</summary>
internal sealed class MaterialReader(MaterialCatalog catalog, string? baseDirectory, ReadingLog log)
{
    private static readonly NumberRange RefractiveIndex = new(0, 100, ExcludesLeast: true);
    private static readonly NumberRange Extinction = new(0, 100);
    private static readonly string[] InlineKeys = ["n", "k", "n_sd", "k_sd"];

    private readonly Dictionary<string, Material?> _tables = new(StringComparer.Ordinal);

    /// <summary>The catalog, with the tables that the file names by their paths.</summary>
    public StructureCatalog Catalog => new(catalog, _tables.Where(table => table.Value is not null).ToDictionary(table => table.Key, table => table.Value!));

    /// <summary>Whether a text is the path of a table rather than a name.</summary>
    public static bool IsPath(string text) => text.Contains('/', StringComparison.Ordinal) || text.EndsWith(".toml", StringComparison.OrdinalIgnoreCase);

    /// <summary>The material under a key, or the default where the key is absent; what is refused is logged and the default stands in.</summary>
    public MaterialReference Read(TableReader reader, string key, string @default)
    {
        var fallback = new MaterialReference.Named(@default);
        if (!reader.TryGet(key, out TomlNode? value))
        {
            if (!catalog.TryFind(fallback, out _))
                reader.RefuseMissing(key, $"a material, for the default \"{@default}\" is not in the catalog");
            return fallback;
        }
        switch (value)
        {
            case TomlText { Value: var text } when IsPath(text):
                return Table(reader, key, text) ?? (MaterialReference)fallback;
            case TomlText { Value: var text }:
                return Named(reader, key, text) ?? fallback;
            case TomlTable table:
                return Inline(new TableReader(table, log)) ?? (MaterialReference)fallback;
            default:
                reader.Refuse(key, $"found {value.Found}; allowed the name of a material, the path of a table, or {{ n, k }}");
                return fallback;
        }
    }

    /// <summary>The surround, which must not absorb. Tiny absorption, as tables of water have, is for the prediction to judge
    /// at the wavelengths asked for; refused here is what absorbs everywhere.</summary>
    public MaterialReference ReadLossless(TableReader reader, string key, string @default)
    {
        const double Tiny = 1e-3;
        MaterialReference reference = Read(reader, key, @default);
        double? least = reference switch
        {
            MaterialReference.Inline { K: > 0 } inline => inline.K,
            MaterialReference.Inline { KSd: > 0 } inline => inline.KSd,
            MaterialReference.Inline => null,
            _ => Catalog.TryFind(reference, out Material? material) ? LeastExtinction(material) is > Tiny and var k ? k : null : null,
        };
        if (least is { } found)
            reader.Refuse(key, $"found a material with k = {OneLine.Rounded(found)}{(reference is MaterialReference.Inline ? "" : " or more")}; allowed a lossless one, k = 0");
        return reference;
    }

    private MaterialReference.Named? Named(TableReader reader, string key, string name)
    {
        var reference = new MaterialReference.Named(name);
        if (catalog.TryFind(reference, out _))
            return reference;
        string known = catalog.Names.Count == 0 ? "none is in the catalog" : string.Join(", ", catalog.Names);
        reader.Refuse(key, $"found the unknown material {OneLine.Quote(name)}{TableReader.Suggestion(name, catalog.Names)}; "
            + $"allowed {known}, a path (with / or ending in .toml), or {{ n, k }}");
        return null;
    }

    private static MaterialReference.Inline? Inline(TableReader reader)
    {
        reader.RefuseOthers(InlineKeys);
        if (!reader.Has("n"))
            reader.RefuseMissing("n", "a refractive index");
        double? n = reader.Number("n", RefractiveIndex), k = reader.Has("k") ? reader.Number("k", Extinction) : 0;
        double? nSd = reader.Has("n_sd") ? reader.Number("n_sd", Extinction) : 0, kSd = reader.Has("k_sd") ? reader.Number("k_sd", Extinction) : 0;
        return n is { } index && k is { } extinction && nSd is { } ofIndex && kSd is { } ofExtinction
            ? new MaterialReference.Inline(index, extinction) { NSd = ofIndex, KSd = ofExtinction } : null;
    }

    private MaterialReference.TablePath? Table(TableReader reader, string key, string path)
    {
        if (baseDirectory is null)
        {
            reader.Refuse(key, $"found the path {OneLine.Quote(path)}, but there is no folder to look in; allowed a name or {{ n, k }}");
            return null;
        }
        if (!_tables.TryGetValue(path, out Material? material))
        {
            material = LoadTable(reader, key, path);
            _tables.Add(path, material);
        }
        return material is null ? null : new MaterialReference.TablePath(path);
    }

    private Material? LoadTable(TableReader reader, string key, string path)
    {
        string full = Path.Combine(baseDirectory!, path);
        if (SourceText.TryReadFile(full, out byte[] bytes) is { } reason)
        {
            reader.Refuse(key, $"found {OneLine.Quote(path)}, a path to a table: {reason}");
            return null;
        }
        FileResult<MaterialTable> table = MaterialTableFile.Parse(bytes, full);
        foreach (FileProblem problem in table.Problems)
            log.Refuse(problem);
        return table.Value?.Material;
    }

    private static double LeastExtinction(Material material)
    {
        const int Steps = 64;
        return Enumerable.Range(0, Steps + 1).Min(i => material.K.At(material.LeastNm + (material.MostNm - material.LeastNm) * i / Steps));
    }
}
