using System.Text.RegularExpressions;
using BarbuleOptics.Files.Toml;

namespace BarbuleOptics.Files.Specimens;

/// <summary>Reads the names of the columns of a table of specimens.</summary>
/// <remarks>A name is that of the structure file, then the part (<c>_sd</c>, <c>_sd_between</c>, <c>_n</c>, <c>_min</c>, <c>_max</c>) and a unit, in any order:
/// <c>layer1.diameter_nm</c>, <c>layer1.diameter_sd</c>, <c>layer1.diameter_sd_nm</c>, <c>layer1.diameter [um]</c>. A spread without unit has that of its length.</remarks>
internal static partial class SpecimenHeader
{
    private static readonly string[] Parts = ["sd_between", "sd", "n", "min", "max"];
    private static readonly string[] FactorParts = ["mean", "sd", "min", "max"];
    private static readonly Dictionary<string, int> Units = new(StringComparer.Ordinal) { ["nm"] = 0, ["um"] = 3, ["\u00B5m"] = 3, ["\u03BCm"] = 3 };

    /// <summary>The columns, the place of the specimens' names apart; problems are logged.</summary>
    public static IReadOnlyList<SpecimenColumn> Read(Sheet sheet, ReadingLog log, out int specimen)
    {
        specimen = -1;
        List<(SpecimenColumn Column, bool HasUnit)> found = [];
        for (int i = 0; i < sheet.Header.Cells.Count; i++)
        {
            string cell = sheet.Header.Cells[i].Trim();
            SourceLocation at = new(log.Source, sheet.Header.Number, i + 1);
            if (cell.Length == 0)
            {
                if (sheet.Rows.FirstOrDefault(row => row.Cell(i).Length > 0) is { } filled)
                    log.Refuse(at, null, FormattableString.Invariant($"found a column without a name whose cell in row {filled.Number} is not blank"));
            }
            else if (cell.ToLowerInvariant() is SpecimenKeys.Specimen or "name")
            {
                if (specimen >= 0)
                    log.Refuse(at, cell, FormattableString.Invariant($"found a second column of names; the first is column {specimen + 1}"));
                specimen = i;
            }
            else if (ReadOne(cell, i, at, log) is { } column)
            {
                if (found.FirstOrDefault(other => other.Column.Path == column.Column.Path && other.Column.Part == column.Column.Part) is { Column: { } twin })
                    log.Refuse(at, cell, FormattableString.Invariant($"found a second time; the first is column {twin.Index + 1}"));
                found.Add(column);
            }
        }
        if (specimen < 0)
            log.Refuse(new SourceLocation(log.Source, sheet.Header.Number, 1), SpecimenKeys.Specimen, "found no column of this name; needed one that names each specimen");
        return [.. found.Select(one => WithUnit(one, found))];
    }

    private static SpecimenColumn WithUnit((SpecimenColumn Column, bool HasUnit) one, List<(SpecimenColumn Column, bool HasUnit)> all)
        => one.HasUnit || one.Column.Part == "n" ? one.Column
            : one.Column with { PowerOfTen = all.Where(other => other.HasUnit && other.Column.Path == one.Column.Path).Select(other => other.Column.PowerOfTen).FirstOrDefault() };

    private static (SpecimenColumn Column, bool HasUnit)? ReadOne(string cell, int index, SourceLocation at, ReadingLog log)
    {
        string name = cell;
        string? unit = null;
        if (Bracketed().Match(cell) is { Success: true } bracketed)
            (name, unit) = (bracketed.Groups["name"].Value, bracketed.Groups["unit"].Value);
        name = name.ToLowerInvariant();
        string part = "mean";
        // Twice: the unit may stand before the part or behind it.
        for (int turn = 0; turn < 2 && SpecimenKeys.KindOf(SpecimenKeys.PathOf(name)) is null; turn++)
        {
            if (unit is null && Units.Keys.FirstOrDefault(one => name.EndsWith("_" + one, StringComparison.Ordinal)) is { } suffix)
                (name, unit) = (name[..^(suffix.Length + 1)], suffix);
            if (part == "mean" && Parts.FirstOrDefault(one => name.EndsWith("_" + one, StringComparison.Ordinal)) is { } ending)
                (name, part) = (name[..^(ending.Length + 1)], ending);
        }
        string path = SpecimenKeys.PathOf(name);
        if (SpecimenKeys.KindOf(path) is not { } kind)
        {
            log.Refuse(at, cell, $"is no column of a table of specimens{TableReader.Suggestion(name, SpecimenKeys.Candidates(name))}; allowed {SpecimenKeys.Specimen} and the keys of a structure file, such as cortex_nm, layer1.diameter_nm, layer1.diameter_sd");
            return null;
        }
        if (part != "mean" && (kind is not (CellKind.Length or CellKind.Factor) || (kind == CellKind.Factor && !FactorParts.Contains(part))))
        {
            log.Refuse(at, cell, $"found _{part}; {name} has no such part");
            return null;
        }
        bool takesUnit = kind == CellKind.Length && part != "n";
        int power = 0;
        if (unit is not null && !(takesUnit && Units.TryGetValue(unit, out power)) && !(path.EndsWith(".z", StringComparison.Ordinal) && unit == "nm"))
        {
            log.Refuse(at, cell, $"found the unit {OneLine.Quote(unit)}; allowed {(takesUnit ? "nm or um" : "none here")}");
            return null;
        }
        return (new SpecimenColumn(index, path, part, kind, power), unit is not null);
    }

    [GeneratedRegex(@"^(?<name>.*?)[\s_]*[\(\[]\s*(?<unit>[^\)\]]*?)\s*[\)\]]$")]
    private static partial Regex Bracketed();
}
