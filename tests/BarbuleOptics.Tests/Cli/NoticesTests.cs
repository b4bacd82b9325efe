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

    /// <summary>Packages of which the command's own list of dependencies says that they bring a file along.</summary>
    private static string[] Packages()
    {
        using var list = JsonDocument.Parse(File.ReadAllText(Path.Combine(AppContext.BaseDirectory, "barbule.deps.json")));
        JsonElement target = list.RootElement.GetProperty("targets").EnumerateObject().First().Value;
        var kinds = list.RootElement.GetProperty("libraries").EnumerateObject().ToDictionary(library => library.Name, library => library.Value.GetProperty("type").GetString());
        return [.. target.EnumerateObject()
            .Where(library => kinds[library.Name] == "package" && (library.Value.TryGetProperty("runtime", out _) || library.Value.TryGetProperty("runtimeTargets", out _) || library.Value.TryGetProperty("native", out _)))
            .Select(library => library.Name.Split('/')[0])];
    }
}
