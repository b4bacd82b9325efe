namespace BarbuleOptics.Files.Toml;

/// <summary>A text.</summary>
internal sealed class TomlText(string value, SourceLocation location) : TomlNode(location)
{
    public string Value { get; } = value;

    public override string Found => OneLine.Quote(Value);
}
