using System.Security.Cryptography;
using System.Text;
using BarbuleOptics.Anatomy;
using BarbuleOptics.Files.Toml;

namespace BarbuleOptics.Files.Specimens;

/// <summary>A table of specimens, one a row, with the keys of a structure file as columns.</summary>
/// <remarks>What is wrong with the table as a whole refuses it; what is wrong with a row is a problem of that row alone. Places are row and column as a
/// spreadsheet counts them, from 1.</remarks>
public sealed class SpecimenTable
{
    private SpecimenTable(string sha256, IReadOnlyList<SpecimenRow> rows)
    {
        Sha256 = sha256;
        Rows = rows;
    }

    /// <summary>SHA-256 of the file's bytes, lower-case hexadecimal.</summary>
    public string Sha256 { get; }

    /// <summary>The specimens in the order of the table.</summary>
    public IReadOnlyList<SpecimenRow> Rows { get; }

    /// <summary>Reads a file.</summary>
    /// <param name="path">As the user named it; messages repeat it.</param>
    /// <param name="catalog">The materials that may be named.</param>
    /// <param name="sets">KEY=VALUE texts, applied to every specimen.</param>
    public static FileResult<SpecimenTable> Read(string path, MaterialCatalog catalog, IReadOnlyList<string>? sets = null)
    {
        ArgumentNullException.ThrowIfNull(path);
        var log = new ReadingLog(path);
        Sheet? sheet = Sheet.Read(path, log, out byte[] bytes);
        return Of(sheet, bytes, log, Path.GetDirectoryName(path) ?? "", catalog, sets ?? []);
    }

    /// <summary>Reads the bytes of a file.</summary>
    /// <param name="bytes">The file's content.</param>
    /// <param name="displayName">What messages call the file.</param>
    /// <param name="baseDirectory">The folder that paths of material tables start from, empty for the current one; null where paths are refused.</param>
    /// <param name="catalog">The materials that may be named.</param>
    /// <param name="sets">KEY=VALUE texts, applied to every specimen.</param>
    public static FileResult<SpecimenTable> Parse(ReadOnlySpan<byte> bytes, string displayName, string? baseDirectory, MaterialCatalog catalog, IReadOnlyList<string>? sets = null)
    {
        ArgumentNullException.ThrowIfNull(displayName);
        var log = new ReadingLog(displayName);
        return Of(Sheet.Parse(bytes, log), bytes, log, baseDirectory, catalog, sets ?? []);
    }

    private static FileResult<SpecimenTable> Of(Sheet? sheet, ReadOnlySpan<byte> bytes, ReadingLog log, string? folder, MaterialCatalog catalog, IReadOnlyList<string> sets)
    {
        ArgumentNullException.ThrowIfNull(catalog);
        if (sheet is null)
            return FileResult.Failure<SpecimenTable>(log.Problems());
        IReadOnlyList<SpecimenColumn> columns = SpecimenHeader.Read(sheet, log, out int specimen);
        if (log.HasProblems)
            return FileResult.Failure<SpecimenTable>(log.Problems());
        var seen = new Dictionary<string, int>(StringComparer.OrdinalIgnoreCase);
        List<SpecimenRow> rows = [];
        foreach (SheetRow row in sheet.Rows)
        {
            string name = row.Cell(specimen);
            var own = new ReadingLog(log.Source);
            SourceLocation nameAt = new(log.Source, row.Number, specimen + 1);
            if (name.Trim().Length == 0)
                own.Refuse(nameAt, SpecimenKeys.Specimen, "found nothing; needed a name");
            else if (!seen.TryAdd(name.Trim(), row.Number))
                own.Refuse(nameAt, SpecimenKeys.Specimen, FormattableString.Invariant($"found {OneLine.Quote(name)} a second time; the first is row {seen[name.Trim()]}"));
            RefuseBeyond(row, sheet.Header.Cells.Count, own);
            rows.Add(new SpecimenRow(row.Number, name, Structure(row, name, nameAt, columns, sheet.HasDecimalComma, own, new MaterialReader(catalog, folder, own), sets)));
        }
        return FileResult.Success(new SpecimenTable(Convert.ToHexStringLower(SHA256.HashData(bytes)), rows));
    }

    private static FileResult<LoadedStructure> Structure(
        SheetRow row, string name, SourceLocation nameAt, IReadOnlyList<SpecimenColumn> columns, bool hasDecimalComma, ReadingLog log, MaterialReader materials, IReadOnlyList<string> sets)
    {
        TomlTable root = new SpecimenTree(row, hasDecimalComma, log).Build(name.Length == 0 ? "?" : name, nameAt, columns);
        // A cell that could not be read would be told a second time by what needs it.
        if (log.HasProblems)
            return FileResult.Failure<LoadedStructure>(log.Problems());
        SetOptions.Apply(root, sets, log);
        if (new StructureReader(materials, log).Read(root, name) is not Barbule barbule)
            return FileResult.Failure<LoadedStructure>(log.Problems());
        string sha256 = Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(StructureWriter.Write(barbule))));
        return FileResult.Success(new LoadedStructure(barbule, log.Source, sha256, materials.Catalog, log.Notes, log.Locations));
    }

    private static void RefuseBeyond(SheetRow row, int columns, ReadingLog log)
    {
        for (int i = columns; i < row.Cells.Count; i++)
        {
            if (row.Cells[i].Length > 0)
                log.Refuse(new SourceLocation(log.Source, row.Number, i + 1), null, FormattableString.Invariant($"found {OneLine.Quote(row.Cells[i])} beyond the last of {columns} columns"));
        }
    }
}
