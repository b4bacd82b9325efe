using System.Reflection;

namespace BarbuleOptics.Cli;

/// <summary>Files carried within the program.</summary>
internal static class Embedded
{
    private static readonly Assembly Carrier = typeof(Embedded).Assembly;

    /// <summary>Names of the files whose name starts so, in order.</summary>
    public static string[] Names(string prefix)
        => [.. Carrier.GetManifestResourceNames().Where(name => name.StartsWith(prefix, StringComparison.Ordinal)).Order(StringComparer.Ordinal)];

    /// <summary>The text of one.</summary>
    public static string Text(string name)
    {
        using Stream stream = Carrier.GetManifestResourceStream(name)!;
        using var reader = new StreamReader(stream);
        return reader.ReadToEnd();
    }
}
