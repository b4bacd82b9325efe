using BarbuleOptics.Files.Toml;

namespace BarbuleOptics.Files.Specimens;

/// <summary>Turns one row into the tree that a structure file would have, every value placed at its cell, so that both are checked by the same code.</summary>
internal sealed class SpecimenTree(SheetRow row, bool hasDecimalComma, ReadingLog log)
{
    private readonly TomlTable _root = new("", TableOrigin.Header, new SourceLocation(log.Source, row.Number, 1));
    private readonly Dictionary<string, TomlArray> _lists = new(StringComparer.Ordinal);

    /// <summary>The tree; problems of single cells are logged.</summary>
    public TomlTable Build(string name, SourceLocation nameAt, IReadOnlyList<SpecimenColumn> columns)
    {
        _root.Put(new TomlEntry("format", nameAt, new TomlNumber(StructureReader.Format, StructureReader.Format, nameAt)));
        _root.Put(new TomlEntry("name", nameAt, new TomlText(name, nameAt)));
        // Layers and bodies in their order, whatever that of the columns.
        var filled = columns.Where(column => row.Cell(column.Index).Length > 0).GroupBy(column => column.Path).OrderBy(group => Order(group.Key)).ThenBy(group => group.Min(column => column.Index));
        foreach (IGrouping<string, SpecimenColumn> group in filled)
        {
            SpecimenColumn[] parts = [.. group];
            SourceLocation at = At(parts[0]);
            int dot = group.Key.LastIndexOf('.');
            if (Table(group.Key[..dot], at) is not { } table)
                return _root;
            string key = group.Key[(dot + 1)..];
            table.Put(new TomlEntry(key, at, parts is [{ Part: "mean" }] ? Value(parts[0]) : Whole(group.Key, parts, at)));
        }
        return _root;
    }

    private TomlTable Whole(string path, SpecimenColumn[] parts, SourceLocation at)
    {
        var table = new TomlTable(path, TableOrigin.Inline, at);
        foreach (SpecimenColumn part in parts)
            table.Put(new TomlEntry(part.Part, At(part), Value(part)));
        return table;
    }

    private TomlTable? Table(string path, SourceLocation at)
    {
        if (!path.StartsWith("layer", StringComparison.Ordinal))
            return Section(path, at);
        TomlTable? parent = _root;
        string[] names = path.Split('.');
        for (int i = 0; i < names.Length && parent is not null; i++)
            parent = Item(parent, names[i].StartsWith("layer", StringComparison.Ordinal) ? "layer" : "body", names[i], at);
        return parent;
    }

    private TomlTable Section(string path, SourceLocation at)
    {
        if (_root.TryGet(path, out TomlEntry? entry))
            return (TomlTable)entry.Value;
        var section = new TomlTable(path, TableOrigin.Header, at);
        _root.Put(new TomlEntry(path, at, section));
        return section;
    }

    private TomlTable? Item(TomlTable parent, string key, string name, SourceLocation at)
    {
        string path = parent.PathOf(key);
        if (!_lists.TryGetValue(path, out TomlArray? list))
        {
            _lists.Add(path, list = new TomlArray(true, at));
            parent.Put(new TomlEntry(key, at, list));
        }
        int number = int.Parse(name.AsSpan(key.Length), System.Globalization.CultureInfo.InvariantCulture);
        if (number <= list.Items.Count)
            return (TomlTable)list.Items[number - 1];
        if (number > list.Items.Count + 1)
        {
            log.Refuse(at, parent.PathOf(name), FormattableString.Invariant($"found without a {key}{list.Items.Count + 1}; {(key == "layer" ? "layers" : "bodies")} are numbered from 1 on, {(key == "layer" ? "outermost first" : "none left out")}"));
            return null;
        }
        var item = new TomlTable(parent.PathOf(name), TableOrigin.Header, at);
        list.Add(item);
        return item;
    }

    private TomlNode Value(SpecimenColumn column)
    {
        string cell = row.Cell(column.Index);
        SourceLocation at = At(column);
        if (cell[0] is '[' or '{')
        {
            if (column.PowerOfTen == 0 && TomlDocument.ParseValue(cell, column.Path, at) is { } node)
                return node;
            log.Refuse(at, column.Path, $"found {OneLine.Quote(cell)}; allowed lists as a structure file has them, in nm, with decimal points: [118, 121.5]");
            return new TomlText(cell, at);
        }
        if (column.Kind == CellKind.Flag)
            return bool.TryParse(cell, out bool flag) ? new TomlFlag(flag, at) : new TomlText(cell, at);
        return column.Kind == CellKind.Text ? new TomlText(cell, at) : Number(cell, column, at);
    }

    private TomlNode Number(string cell, SpecimenColumn column, SourceLocation at)
    {
        string text = cell;
        if (hasDecimalComma && SheetNumber.HasDecimalComma(cell))
            text = cell.Replace(',', '.');
        else if (SheetNumber.HasDecimalComma(cell))
            log.Refuse(at, column.Path, $"found {OneLine.Quote(cell)} in a table whose cells are parted by commas; allowed a decimal point, or semicolons between the cells");
        else if (hasDecimalComma && cell.Contains('.', StringComparison.Ordinal) && SheetNumber.TryParse(cell, 0, out _))
            log.Refuse(at, column.Path, $"found {OneLine.Quote(cell)} in a table with decimal commas elsewhere, which may mean thousands; allowed a decimal comma");
        if (!SheetNumber.TryParse(text, column.PowerOfTen, out double value))
            return new TomlText(cell, at);
        return new TomlNumber(value, column.PowerOfTen == 0 ? SheetNumber.Whole(text) : null, at);
    }

    private SourceLocation At(SpecimenColumn column) => new(log.Source, row.Number, column.Index + 1);

    private static string Order(string path)
        => string.Join('.', path.Split('.')[..^1].Select(name => char.IsAsciiDigit(name[^1]) ? name.TrimEnd("0123456789".ToCharArray()) + name[name.TrimEnd("0123456789".ToCharArray()).Length..].PadLeft(2, '0') : name));
}
