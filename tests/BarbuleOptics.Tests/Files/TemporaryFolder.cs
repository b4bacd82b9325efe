namespace BarbuleOptics.Tests.Files;

/// <summary>A folder that lasts for one test.</summary>
internal sealed class TemporaryFolder : IDisposable
{
    public string Path { get; } = Directory.CreateTempSubdirectory("barbule-test-").FullName;

    public string this[string name] => System.IO.Path.Combine(Path, name);

    /// <summary>Every file and folder within, relative, in order.</summary>
    public string[] Content()
        => [.. Directory.GetFileSystemEntries(Path, "*", SearchOption.AllDirectories).Select(path => System.IO.Path.GetRelativePath(Path, path)).Order(StringComparer.Ordinal)];

    /// <summary>Text of a file within.</summary>
    public string Text(string name) => File.ReadAllText(this[name]);

    public void Dispose() => Directory.Delete(Path, recursive: true);
}
