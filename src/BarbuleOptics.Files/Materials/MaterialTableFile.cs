using BarbuleOptics.Files.Toml;
using BarbuleOptics.Materials;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Files;

/// <summary>Reads tables of optical constants (TOML 1.0), one material a file.</summary>
/// <remarks>
/// Keys: <c>format = 1</c>, <c>name</c>, <c>unit</c> (nm or um, of the lengths in coefficients and rows), <c>range_nm</c>
/// (two wavelengths, always nm), <c>source</c>, <c>obtained</c>, <c>note</c> (optional), and either <c>[n]</c> and <c>[k]</c>, each
/// with its <c>kind</c>, or one <c>[table]</c> with <c>rows = [[wavelength, n, k], ...]</c>. Over the range n must be above 0
/// and k 0 or above, checked at 1,001 places; a table must cover its range.
/// </remarks>
public static class MaterialTableFile
{
    private static readonly string[] Keys = ["format", "name", "unit", "range_nm", "source", "obtained", "note", "n", "k", "table"];
    private static readonly string[] Units = ["nm", "um"];
    private static readonly NumberRange Wavelength = new(0, 1e9, ExcludesLeast: true);

    /// <summary>Reads a file; what is wrong with it comes as a list.</summary>
    public static FileResult<MaterialTable> Read(string path)
    {
        ArgumentNullException.ThrowIfNull(path);
        var log = new ReadingLog(path);
        return SourceText.ReadFile(path, log) is { } bytes ? Parse(bytes, path) : FileResult.Failure<MaterialTable>(log.Problems());
    }

    /// <summary>Reads the bytes of a file.</summary>
    /// <param name="bytes">The file's content.</param>
    /// <param name="displayName">What messages call the file.</param>
    public static FileResult<MaterialTable> Parse(ReadOnlySpan<byte> bytes, string displayName)
    {
        ArgumentNullException.ThrowIfNull(displayName);
        var log = new ReadingLog(displayName);
        MaterialTable? table = TomlDocument.Parse(bytes, log) is { } root ? Read(new TableReader(root, log), log) : null;
        return table is null || log.HasProblems ? FileResult.Failure<MaterialTable>(log.Problems()) : FileResult.Success(table);
    }

    /// <summary>Whether a text may name a material: not a path, not <c>unknown</c>, which a backing may be.</summary>
    internal static bool IsName(string name)
        => name == name.Trim() && name.Length is > 0 and <= 100 && !name.Any(char.IsControl) && !MaterialReader.IsPath(name) && name != "unknown";

    private static MaterialTable? Read(TableReader reader, ReadingLog log)
    {
        StructureReader.CheckFormat(reader, log);
        reader.RefuseOthers(Keys);
        string? name = Needed(reader, "name", "the name that structures use"), note = reader.Text("note");
        string? source = Needed(reader, "source", "where the values were published, with DOI");
        string? obtained = Needed(reader, "obtained", "how the values were obtained (published, from memory, fitted to ...)");
        if (name is not null && !IsName(name))
            reader.Refuse("name", $"found {OneLine.Quote(name)}; allowed a name without / and not ending in .toml, other than unknown");
        if (!reader.Has("unit"))
            reader.RefuseMissing("unit", TableReader.Quoted(Units));
        double unitNm = reader.Word("unit", Units) == "um" ? 1000 : 1;
        (double LeastNm, double MostNm)? range = ReadRange(reader);
        var dispersions = new DispersionReader(unitNm, log);
        (IDispersion? n, IDispersion? k) = reader.Has("table") ? dispersions.ReadJoint(reader) : dispersions.ReadSeparate(reader);
        if (name is null || source is null || obtained is null || range is not var (least, most) || n is null || k is null || log.HasProblems)
            return null;
        var material = new Material(name, n, k, Length.FromNanometres(least), Length.FromNanometres(most), source, obtained, note);
        CheckRange(material, reader);
        return new MaterialTable(material, log.Source);
    }

    private static (double LeastNm, double MostNm)? ReadRange(TableReader reader)
    {
        const string Allowed = "two ascending wavelengths in nm, such as [400, 700]";
        if (!reader.TryGet("range_nm", out TomlNode? value))
        {
            reader.RefuseMissing("range_nm", Allowed);
            return null;
        }
        if (value is TomlArray { Items: [TomlNumber { Value: var least }, TomlNumber { Value: var most }] }
            && Wavelength.Holds(least) && Wavelength.Holds(most) && least < most)
        {
            return (least, most);
        }
        reader.Refuse("range_nm", $"found {(value is TomlArray list ? string.Join(", ", list.Items.Take(3).Select(item => item.Found)) : value.Found)}; allowed {Allowed}");
        return null;
    }

    private static string? Needed(TableReader reader, string key, string what)
    {
        if (!reader.Has(key))
            reader.RefuseMissing(key, what);
        return reader.Text(key);
    }

    private static void CheckRange(Material material, TableReader reader)
    {
        const int Steps = 1000;
        string nKey = reader.Has("table") ? "table" : "n", kKey = reader.Has("table") ? "table" : "k";
        if (RefuseUncovered(material.N, material, reader, nKey) | (nKey != kKey && RefuseUncovered(material.K, material, reader, kKey)))
            return;
        bool nHolds = true, kHolds = true;
        for (int i = 0; i <= Steps && (nHolds || kHolds); i++)
        {
            double nm = material.LeastNm + (material.MostNm - material.LeastNm) * i / Steps;
            double n = material.N.At(nm), k = material.K.At(nm);
            if (nHolds && !(n > 0 && double.IsFinite(n)))
                nHolds = Refuse(reader, nKey, "n", n, nm, "above 0");
            if (kHolds && !(k >= 0 && double.IsFinite(k)))
                kHolds = Refuse(reader, kKey, "k", k, nm, "0 or above");
        }
    }

    private static bool Refuse(TableReader reader, string key, string constant, double value, double nm, string allowed)
    {
        reader.Refuse(key, $"found {constant} = {OneLine.Number(value)} at {OneLine.Number(nm)} nm; allowed {allowed} over range_nm");
        return false;
    }

    // Rows in um times 1000 may end a rounding error inside the range.
    private static bool RefuseUncovered(IDispersion dispersion, Material material, TableReader reader, string key)
    {
        const double Rounding = 1e-12;
        if (dispersion is not TabulatedDispersion { WavelengthsNm: [var first, .., var last] }
            || (material.LeastNm >= first * (1 - Rounding) && material.MostNm <= last * (1 + Rounding)))
        {
            return false;
        }
        reader.Refuse("range_nm", $"found {OneLine.Number(material.LeastNm)} to {OneLine.Number(material.MostNm)}; "
            + $"allowed within the rows of {key}, {OneLine.Number(first)} to {OneLine.Number(last)} nm");
        return true;
    }
}
