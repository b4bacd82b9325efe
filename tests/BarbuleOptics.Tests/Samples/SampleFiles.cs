using System.Reflection;
using BarbuleOptics.Tests.Layering;
using Xunit;

namespace BarbuleOptics.Tests.Samples;

/// <summary>The sample structures within the command.</summary>
internal static class SampleFiles
{
    private const string Folder = "samples/";

    private static readonly Assembly Command = Assembly.Load("barbule");

    /// <summary>Their names, without folder and ending.</summary>
    public static string[] Names { get; } =
        [.. Command.GetManifestResourceNames().Where(name => name.StartsWith(Folder, StringComparison.Ordinal)).Select(name => Path.GetFileNameWithoutExtension(name)).Order(StringComparer.Ordinal)];

    /// <summary>The same, for a theory.</summary>
    public static TheoryData<string> Rows => [.. Names];

    public static string Text(string name)
    {
        using Stream stream = Command.GetManifestResourceStream($"{Folder}{name}.toml") ?? throw new ArgumentException($"No sample {name}.", nameof(name));
        using var reader = new StreamReader(stream);
        return reader.ReadToEnd();
    }

    /// <summary>Writes a sample into a folder; the path of the file.</summary>
    public static string Write(string name, string folder)
    {
        string path = Path.Combine(folder, name + ".toml");
        File.WriteAllText(path, Text(name));
        return path;
    }

    public static BarbuleOptics.Files.LoadedStructure Load(string name, params string[] sets)
        => Structures.Load(Text(name).Replace("format = 1", "", StringComparison.Ordinal), sets);
}
