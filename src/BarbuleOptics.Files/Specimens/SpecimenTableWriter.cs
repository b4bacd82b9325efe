using System.Text;
using BarbuleOptics.Anatomy;
using BarbuleOptics.Files.Toml;

namespace BarbuleOptics.Files.Specimens;

/// <summary>Writes structures as a table of specimens. What <see cref="SpecimenTable"/> reads back is equal to what was written.</summary>
/// <remarks>Goes by the structure file of each, so that no key can be forgotten here: a value without spread takes one cell, a summary a cell for each part,
/// a list of replicates and an inline material one cell in the writing of the structure file.</remarks>
public static class SpecimenTableWriter
{
    /// <summary>The table's text, lines ended by a line feed.</summary>
    public static string Write(IReadOnlyList<Barbule> barbules)
    {
        ArgumentNullException.ThrowIfNull(barbules);
        List<string> columns = [SpecimenKeys.Specimen];
        var rows = new List<Dictionary<string, string>>();
        foreach (Barbule barbule in barbules)
        {
            var row = new Dictionary<string, string>(StringComparer.Ordinal) { [SpecimenKeys.Specimen] = barbule.Name };
            var log = new ReadingLog(barbule.Name);
            TomlTable root = TomlDocument.Parse(StructureWriter.Write(barbule), log) ?? throw new InvalidOperationException("A structure was written that cannot be read.");
            Flatten(root, row);
            columns.AddRange(row.Keys.Except(columns).ToArray());
            rows.Add(row);
        }
        var text = new StringBuilder();
        Line(text, columns);
        foreach (Dictionary<string, string> row in rows)
            Line(text, columns.Select(column => row.GetValueOrDefault(column, "")));
        return text.ToString();
    }

    private static void Flatten(TomlTable table, Dictionary<string, string> row)
    {
        foreach (TomlEntry entry in table.Entries)
        {
            string path = table.PathOf(entry.Key);
            if (path is "format" or "name")
                continue;
            switch (entry.Value)
            {
                case TomlArray { IsOfHeaders: true } list:
                    foreach (TomlTable item in list.Items.OfType<TomlTable>())
                        Flatten(item, row);
                    break;
                case TomlTable inner when SpecimenKeys.KindOf(path) is CellKind.Length or CellKind.Factor:
                    foreach (TomlEntry part in inner.Entries)
                        row.Add(Column(path, part.Key), Cell(part.Value));
                    break;
                case TomlTable inner when SpecimenKeys.KindOf(path) is null:
                    Flatten(inner, row);
                    break;
                default:
                    row.Add(Column(path, "mean"), Cell(entry.Value));
                    break;
            }
        }
    }

    private static string Column(string path, string part)
        => SpecimenKeys.NameOf(path) + (part != "mean" ? "_" + part : SpecimenKeys.KindOf(path) == CellKind.Length ? "_nm" : "");

    private static string Cell(TomlNode value) => value switch
    {
        TomlNumber number => OneLine.Number(number.Value),
        TomlText text => text.Value,
        TomlFlag flag => flag.Value ? "true" : "false",
        TomlArray list => $"[{string.Join(", ", list.Items.Select(Cell))}]",
        TomlTable table => $"{{ {string.Join(", ", table.Entries.Select(entry => $"{entry.Key} = {Cell(entry.Value)}"))} }}",
        _ => throw new InvalidOperationException("No key of a structure takes such a value."),
    };

    private static void Line(StringBuilder text, IEnumerable<string> cells) => text.AppendJoin(',', cells.Select(DelimitedText.Quoted)).Append('\n');
}
