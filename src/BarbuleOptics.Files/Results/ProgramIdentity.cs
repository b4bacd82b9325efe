using System.Reflection;

namespace BarbuleOptics.Files.Results;

/// <summary>What the program calls itself in its output.</summary>
public static class ProgramIdentity
{
    /// <summary>The program's name.</summary>
    public const string Name = "Barbule Optics";

    /// <summary>The version, the same for every build of one source.</summary>
    public static string Version { get; } =
        typeof(ProgramIdentity).Assembly.GetCustomAttribute<AssemblyInformationalVersionAttribute>()?.InformationalVersion ?? "unknown";
}
