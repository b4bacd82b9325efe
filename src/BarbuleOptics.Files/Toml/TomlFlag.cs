namespace BarbuleOptics.Files.Toml;

/// <summary>True or false.</summary>
internal sealed class TomlFlag(bool value, SourceLocation location) : TomlNode(location)
{
    public bool Value { get; } = value;

    public override string Found => Value ? "true" : "false";
}
