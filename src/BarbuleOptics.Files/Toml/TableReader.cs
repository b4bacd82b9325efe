using System.Diagnostics.CodeAnalysis;

namespace BarbuleOptics.Files.Toml;

/// <summary>Reads the keys of one table and logs what is wrong with them.</summary>
internal sealed class TableReader
{
    private readonly ReadingLog _log;

    public TableReader(TomlTable table, ReadingLog log)
    {
        Table = table;
        _log = log;
        if (table.Path.Length > 0)
            log.Remember(table.Path, table.Location);
        foreach (TomlEntry entry in table.Entries)
            log.Remember(table.PathOf(entry.Key), entry.Value.Location);
    }

    public TomlTable Table { get; }

    public bool Has(string key) => Table.TryGet(key, out _);

    public bool TryGet(string key, [NotNullWhen(true)] out TomlNode? value)
    {
        value = Table.TryGet(key, out TomlEntry? entry) ? entry.Value : null;
        return value is not null;
    }

    /// <summary>Logs a problem with the value of a key, or with the table where the key is absent.</summary>
    public void Refuse(string key, string message)
        => _log.Refuse(TryGet(key, out TomlNode? value) ? value.Location : Table.Location, Table.PathOf(key), message);

    /// <summary>Logs a problem with a key itself.</summary>
    public void RefuseKey(TomlEntry entry, string message) => _log.Refuse(entry.KeyLocation, Table.PathOf(entry.Key), message);

    public void RefuseMissing(string key, string allowed)
        => _log.Refuse(Table.Location, Table.PathOf(key), $"found nothing; needed {allowed}");

    /// <summary>A text without control characters; null when it is absent or was refused.</summary>
    public string? Text(string key)
    {
        if (!TryGet(key, out TomlNode? value))
            return null;
        if (value is TomlText { Value: var text } && text.Trim().Length > 0 && !text.Any(char.IsControl))
            return text;
        Refuse(key, $"found {value.Found}; allowed a text of one line in quotes");
        return null;
    }

    /// <summary>One of several words; null when it is absent or was refused.</summary>
    public string? Word(string key, IReadOnlyList<string> words)
    {
        if (!TryGet(key, out TomlNode? value))
            return null;
        string? word = (value as TomlText)?.Value;
        if (word is not null && words.Contains(word, StringComparer.Ordinal))
            return word;
        Refuse(key, $"found {value.Found}{Suggestion(word, words)}; allowed {Quoted(words)}");
        return null;
    }

    /// <summary>A number in a range; null when it is absent or was refused.</summary>
    public double? Number(string key, NumberRange range, string unit = "")
    {
        if (!TryGet(key, out TomlNode? value))
            return null;
        if (value is TomlNumber number && range.Holds(number.Value))
            return number.Value;
        Refuse(key, $"found {value.Found}; allowed {(value is TomlNumber ? "" : "a number, ")}{range}{unit}");
        return null;
    }

    /// <summary>True or false; null when it is absent or was refused.</summary>
    public bool? Flag(string key)
    {
        if (!TryGet(key, out TomlNode? value))
            return null;
        if (value is TomlFlag flag)
            return flag.Value;
        Refuse(key, $"found {value.Found}; allowed true or false");
        return null;
    }

    /// <summary>A table under a key; null when it is absent or was refused.</summary>
    public TableReader? Inner(string key)
    {
        if (!TryGet(key, out TomlNode? value))
            return null;
        if (value is TomlTable table)
            return new TableReader(table, _log);
        Refuse(key, $"found {value.Found}; allowed a table, [{Table.PathOf(key)}]");
        return null;
    }

    /// <summary>The tables under <c>[[key]]</c>; those that are none are refused and left out.</summary>
    public IReadOnlyList<TableReader> Many(string key, string header)
    {
        if (!TryGet(key, out TomlNode? value))
            return [];
        if (value is not TomlArray list || list.Items.Any(item => item is not TomlTable))
        {
            Refuse(key, $"found {value.Found}; allowed sections that open with {header}");
            return [];
        }
        return [.. list.Items.OfType<TomlTable>().Select(table => new TableReader(table, _log))];
    }

    /// <summary>Refuses every key that is not among <paramref name="allowed"/>.</summary>
    /// <param name="allowed">The keys that the table may have.</param>
    /// <param name="misplaced">For a key that is known elsewhere, why it is not allowed here; null for any other key.</param>
    public void RefuseOthers(IReadOnlyList<string> allowed, Func<string, string?>? misplaced = null)
    {
        foreach (TomlEntry entry in Table.Entries.Where(entry => !allowed.Contains(entry.Key, StringComparer.Ordinal)))
        {
            string problem = misplaced?.Invoke(entry.Key) ?? $"is no key of {(Table.Path.Length == 0 ? "the file" : Table.Path)}{Suggestion(entry.Key, allowed)}";
            RefuseKey(entry, $"{problem}; allowed {string.Join(", ", allowed)}");
        }
    }

    /// <summary>"; did you mean …" where a word comes near, otherwise nothing.</summary>
    public static string Suggestion(string? word, IEnumerable<string> words)
        => word is not null && NearMiss.Find(word, words) is { } near ? $"; did you mean \"{near}\"" : "";

    public static string Quoted(IEnumerable<string> words) => string.Join(", ", words.Select(word => $"\"{word}\""));
}
