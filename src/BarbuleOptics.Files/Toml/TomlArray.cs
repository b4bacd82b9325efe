namespace BarbuleOptics.Files.Toml;

/// <summary>A list of values, or the tables under one <c>[[header]]</c>.</summary>
internal sealed class TomlArray(bool isOfHeaders, SourceLocation location) : TomlNode(location)
{
    private readonly List<TomlNode> _items = [];

    /// <summary>Whether it was written as <c>[[header]]</c> sections, which may be added to.</summary>
    public bool IsOfHeaders { get; } = isOfHeaders;

    public IReadOnlyList<TomlNode> Items => _items;

    public override string Found => _items.Count switch
    {
        0 => "an empty list",
        1 => "a list of one",
        int count => FormattableString.Invariant($"a list of {count}"),
    };

    internal void Add(TomlNode item) => _items.Add(item);
}
