namespace BarbuleOptics.Files.Toml;

/// <summary>A value with its place.</summary>
internal abstract class TomlNode(SourceLocation location)
{
    public SourceLocation Location { get; } = location;

    /// <summary>What was found, for a message.</summary>
    public abstract string Found { get; }
}
