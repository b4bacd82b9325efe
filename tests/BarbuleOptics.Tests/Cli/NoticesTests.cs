using System.Text.Json;
using Xunit;

namespace BarbuleOptics.Tests.Cli;

/// <summary>Whatever is shipped with the command stands with its license in the notices.</summary>
public sealed class NoticesTests
{
    private static readonly string Notices = File.ReadAllText(Path.Combine(AppContext.BaseDirectory, "THIRD-PARTY-NOTICES.txt"));

    [Fact]
    public void Every_package_shipped_is_named_in_the_notices()
    {
        string[] packages = Packages();
        Assert.Contains("System.CommandLine", packages);
        string[] named = [.. Notices.Split('\n').TakeWhile(line => !line.StartsWith("---", StringComparison.Ordinal)).Where(line => line.StartsWith("  ", StringComparison.Ordinal)).Select(line => line.Trim().Split(' ')[0])];
        Assert.All(packages, package => Assert.Contains(package, named));
    }

    [Theory]
    [InlineData("Permission is hereby granted, free of charge")]
    [InlineData("Redistributions in binary form must reproduce the above copyright notice")]
    public void The_texts_of_the_licenses_are_there(string words) => Assert.Contains(words, Notices, StringComparison.Ordinal);

    [Theory]
    [InlineData("LiberationSans-LICENSE.txt", "SIL OPEN FONT LICENSE Version 1.1")]
    [InlineData("SCOTTPLOT-THIRD-PARTY-NOTICES.txt", "Some third-party components it includes require attribution")]
    [InlineData("SKIA-THIRD-PARTY-NOTICES.txt", "HarfBuzz")]
    [InlineData("SKIA-THIRD-PARTY-NOTICES.txt", "The FreeType Project LICENSE")]
    public void Font_and_drawing_library_bring_their_licenses(string file, string words)
        => Assert.Contains(words, File.ReadAllText(Path.Combine(AppContext.BaseDirectory, file)), StringComparison.Ordinal);

    /// <summary>Packages that bring a file along, for this or any other machine: the list that the command's restore left.</summary>
    private static string[] Packages()
    {
        using var list = JsonDocument.Parse(File.ReadAllText(Path.Combine(Repository.Root, "src", "BarbuleOptics.Cli", "obj", "project.assets.json")));
        JsonElement target = list.RootElement.GetProperty("targets").GetProperty("net10.0");
        return [.. target.EnumerateObject()
            .Where(library => library.Value.GetProperty("type").GetString() == "package" && (Brings(library.Value, "runtime") || Brings(library.Value, "runtimeTargets") || Brings(library.Value, "native")))
            .Select(library => library.Name.Split('/')[0])];
    }

    // A package that is empty for a framework holds a file named _._ in place of others.
    private static bool Brings(JsonElement library, string kind)
        => library.TryGetProperty(kind, out JsonElement files) && files.EnumerateObject().Any(file => !file.Name.EndsWith("_._", StringComparison.Ordinal));
}
