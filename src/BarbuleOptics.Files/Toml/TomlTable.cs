using System.Diagnostics.CodeAnalysis;

namespace BarbuleOptics.Files.Toml;

/// <summary>Keys with their values, in the order of the file. Changed only while a file and its <c>--set</c> options are taken in.</summary>
/// <param name="path">Its name as on the command line, empty for the whole file: <c>layer1.body2</c>.</param>
/// <param name="origin">How it came to be.</param>
/// <param name="location">Where it starts.</param>
internal sealed class TomlTable(string path, TableOrigin origin, SourceLocation location) : TomlNode(location)
{
    private readonly Dictionary<string, int> _places = new(StringComparer.Ordinal);
    private readonly List<TomlEntry?> _entries = [];

    public string Path { get; } = path;

    public TableOrigin Origin { get; private set; } = origin;

    public IEnumerable<TomlEntry> Entries => _entries.OfType<TomlEntry>();

    public IEnumerable<string> Keys => Entries.Select(entry => entry.Key);

    public override string Found => _places.Count == 0 ? "an empty table" : $"a table with {string.Join(", ", Keys.Take(6).Select(OneLine.Escape))}";

    /// <summary>Name of one of its keys as on the command line.</summary>
    public string PathOf(string key) => Path.Length == 0 ? key : $"{Path}.{key}";

    public bool TryGet(string key, [NotNullWhen(true)] out TomlEntry? entry)
    {
        entry = _places.TryGetValue(key, out int place) ? _entries[place] : null;
        return entry is not null;
    }

    /// <summary>Adds an entry, or replaces the one of the same key in its place.</summary>
    internal void Put(TomlEntry entry)
    {
        if (_places.TryGetValue(entry.Key, out int place))
        {
            _entries[place] = entry;
            return;
        }
        _places.Add(entry.Key, _entries.Count);
        _entries.Add(entry);
    }

    internal void Remove(string key)
    {
        if (_places.Remove(key, out int place))
            _entries[place] = null;
    }

    /// <summary>Its own header was met after a deeper one.</summary>
    internal void BecomeHeader() => Origin = TableOrigin.Header;
}
