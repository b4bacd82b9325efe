using BarbuleOptics.Files.Toml;

namespace BarbuleOptics.Files;

/// <summary>Puts the values of <c>--set KEY=VALUE</c> options into the tree of a structure file, before it is checked.</summary>
/// <remarks>VALUE is taken as TOML; what is none is a text, so that <c>surround=water</c> needs no quotes. A later option
/// counts more than an earlier one. Of two keys that exclude each other the one set removes the other: spacing and
/// separation, pitch and row_separation.</remarks>
internal static class SetOptions
{
    private static readonly string[] Sections = ["barbule", "cortex", "back", "preparation", "preservation"];

    public static void Apply(TomlTable root, IEnumerable<string> sets, ReadingLog log)
    {
        foreach (string set in sets)
            Apply(root, set, log);
    }

    private static void Apply(TomlTable root, string set, ReadingLog log)
    {
        SourceLocation at = SourceLocation.Whole($"--set {set}");
        int equals = set.IndexOf('=', StringComparison.Ordinal);
        string path = (equals < 0 ? set : set[..equals]).Trim();
        string[] names = path.Split('.');
        if (equals < 0 || names.Length > NestingGuard.Most || !names.All(IsName))
        {
            log.Refuse(at, null, "allowed KEY=VALUE, with a KEY such as barbule.surround or layer1.diameter");
            return;
        }
        TomlTable table = root;
        foreach (string name in names[..^1])
        {
            if (Descend(table, name, at) is not { } inner)
            {
                log.Refuse(at, path, WhyNot(table, name));
                return;
            }
            table = inner;
        }
        if (table == root && (names[^1] == "layer" || Sections.Contains(names[^1]) || ItemOf(root, names[^1]) is not null))
            log.Refuse(at, path, $"allowed one value at a time, {names[^1]}{(names[^1] == "layer" ? "1" : "")}.KEY=VALUE");
        else
            Put(table, names[^1], set[(equals + 1)..].Trim(), at);
    }

    private static void Put(TomlTable table, string key, string text, SourceLocation at)
    {
        TomlNode value = TomlDocument.ParseValue(text, table.PathOf(key), at) ?? new TomlText(text, at);
        table.Put(new TomlEntry(key, at, value));
        if (PartnerKeys.Of(key) is { } partner)
            table.Remove(partner);
    }

    private static TomlTable? Descend(TomlTable table, string name, SourceLocation at)
    {
        if (table.TryGet(name, out TomlEntry? entry))
            return entry.Value as TomlTable;
        if (ItemOf(table, name) is { } item)
            return item;
        if (table.Path.Length > 0 || !Sections.Contains(name))
            return null;
        var section = new TomlTable(name, TableOrigin.Header, at);
        table.Put(new TomlEntry(name, at, section));
        return section;
    }

    // layer2 and body3: the second [[layer]], the third [[layer.body]].
    private static TomlTable? ItemOf(TomlTable table, string name)
        => Numbered(table).FirstOrDefault(item => item.Path == table.PathOf(name));

    private static IEnumerable<TomlTable> Numbered(TomlTable table)
        => table.Entries.Select(entry => entry.Value).OfType<TomlArray>().SelectMany(list => list.Items).OfType<TomlTable>();

    private static string WhyNot(TomlTable table, string name)
    {
        bool isFile = table.Path.Length == 0;
        string[] parts = [.. isFile ? Sections : [], .. Numbered(table).Select(item => item.Path[(isFile ? 0 : table.Path.Length + 1)..])];
        return table.TryGet(name, out TomlEntry? entry) && entry.Value is not TomlArray { IsOfHeaders: true }
            ? $"{table.PathOf(name)} is {entry.Value.Found} and has no keys of its own"
            : $"there is no {table.PathOf(name)}{TableReader.Suggestion(name, parts)}{(parts.Length > 0 ? $"; there is {string.Join(", ", parts)}" : "")}";
    }

    private static bool IsName(string name) => name.Length > 0 && name.All(c => char.IsAsciiLetterOrDigit(c) || c is '_' or '-');
}
