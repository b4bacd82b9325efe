namespace BarbuleOptics.Files.Toml;

/// <summary>One key of a table with its value.</summary>
internal sealed record TomlEntry(string Key, SourceLocation KeyLocation, TomlNode Value);
