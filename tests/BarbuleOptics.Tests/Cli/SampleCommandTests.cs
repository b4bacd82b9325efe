using System.Text.RegularExpressions;
using BarbuleOptics.Tests.Files;
using BarbuleOptics.Tests.Samples;
using Xunit;

namespace BarbuleOptics.Tests.Cli;

/// <summary>What <c>barbule sample</c> writes, and that it never writes over a person's files.</summary>
public sealed partial class SampleCommandTests
{
    private static readonly string[] Written = [.. SampleFiles.Names.Select(name => name + ".toml").Append("README.md").Append("specimens.csv").Order(StringComparer.Ordinal)];

    [Fact]
    public async Task Samples_are_the_files_of_the_sources_byte_for_byte()
    {
        using var folder = new TemporaryFolder();
        (await Barbule.Call("sample", folder["new/birds"])).Good();

        Assert.Equal(Written, Directory.GetFiles(folder["new/birds"]).Select(path => Path.GetFileName(path)).Order(StringComparer.Ordinal));
        string sources = Path.Combine(Repository.Root, "src", "BarbuleOptics.Cli", "Samples");
        Assert.Equal(Directory.GetFiles(sources, "*.toml").Length, Written.Length - 2);
        Assert.All(Directory.GetFiles(sources, "*.toml"), source => Assert.Equal(File.ReadAllBytes(source), File.ReadAllBytes(folder["new/birds/" + Path.GetFileName(source)])));
    }

    [Fact]
    public async Task The_readme_says_of_each_file_what_its_first_line_says()
    {
        using var folder = new TemporaryFolder();
        (await Barbule.Call("sample", folder.Path)).Good();
        string[] lines = folder.Text("README.md").Split('\n');

        int header = Array.IndexOf(lines, "|---|---|");
        Assert.Equal(["| file | what it is |"], lines[(header - 1)..header]);
        string[] rows = lines[(header + 1)..^1];
        Assert.Equal(SampleFiles.Names.Length, rows.Length);
        Assert.All(SampleFiles.Names.Zip(rows), pair =>
        {
            string comment = File.ReadLines(folder[pair.First + ".toml"]).First()[2..];
            Assert.StartsWith($"| `{pair.First}.toml` | {comment}", pair.Second, StringComparison.Ordinal);
            Assert.EndsWith(". |", pair.Second, StringComparison.Ordinal);
        });
    }

    [Theory]
    [InlineData("birds")]
    [InlineData("my birds")]
    public async Task The_commands_shown_can_be_typed(string name)
    {
        using var folder = new TemporaryFolder();
        string printed = (await Barbule.Call("sample", folder[name])).Good().Output;

        string next = Next().Match(printed).Groups[1].Value;
        Assert.Equal(name.Contains(' ', StringComparison.Ordinal), next.Contains('"', StringComparison.Ordinal));
        string[] words = [.. Word().Matches(next).Select(match => match.Value.Trim('"'))];
        Assert.Contains("Quillmere tarnwing", (await Barbule.Call(words)).Good().Output, StringComparison.Ordinal);
        string[] shown = Next().Match(folder.Text(name + "/README.md").Replace("    barbule", "Next:    barbule", StringComparison.Ordinal)).Groups[1].Value.Split(' ');
        shown = [.. shown.Select(word => word.EndsWith(".toml", StringComparison.Ordinal) || word == "results" ? folder[$"{name}/{word}"] : word)];
        (await Barbule.Call(shown)).Good();
        Assert.True(File.Exists(folder[name + "/results/spectra.csv"]));
    }

    [Fact]
    public async Task A_file_that_is_there_is_kept_unless_force_is_given()
    {
        using var folder = new TemporaryFolder();
        string mine = folder["hollow-rods.toml"];
        await File.WriteAllTextAsync(mine, "mine", TestContext.Current.CancellationToken);
        string line = (await Barbule.Call("sample", folder.Path)).Refusal(5);

        Assert.StartsWith(mine + ": exists", line, StringComparison.Ordinal);
        Assert.Contains("--force", line, StringComparison.Ordinal);
        Assert.Equal(["hollow-rods.toml"], folder.Content());
        Assert.Equal("mine", folder.Text("hollow-rods.toml"));

        (await Barbule.Call("sample", folder.Path, "--force")).Good();
        Assert.Equal(Written, folder.Content());
        Assert.Equal(SampleFiles.Text("hollow-rods"), folder.Text("hollow-rods.toml"));
    }

    [Fact]
    public async Task A_file_in_place_of_the_folder_is_refused()
    {
        using var folder = new TemporaryFolder();
        await File.WriteAllTextAsync(folder["birds"], "mine", TestContext.Current.CancellationToken);
        Assert.StartsWith(folder["birds"] + ": is a file", (await Barbule.Call("sample", folder["birds"])).Refusal(5), StringComparison.Ordinal);
        Assert.Equal("mine", folder.Text("birds"));
    }

    [Theory]
    [InlineData("DIR")]
    [InlineData("DIR", "")]
    [InlineData("did you mean --force?", "--forc")]
    public async Task A_wrong_command_line_is_refused_in_one_line(string words, params string[] arguments)
        => Assert.Contains(words, (await Barbule.Call(["sample", .. arguments])).Refusal(2), StringComparison.Ordinal);

    [GeneratedRegex(@"Next:\s+barbule (.*)")]
    private static partial Regex Next();

    [GeneratedRegex("\"[^\"]*\"|\\S+")]
    private static partial Regex Word();
}
