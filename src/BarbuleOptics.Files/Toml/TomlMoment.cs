namespace BarbuleOptics.Files.Toml;

/// <summary>A date or a time; no key of ours takes one.</summary>
internal sealed class TomlMoment(SourceLocation location) : TomlNode(location)
{
    public override string Found => "a date or time";
}
