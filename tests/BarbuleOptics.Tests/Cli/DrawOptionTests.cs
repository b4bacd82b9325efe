using System.Globalization;
using System.Text.Json;
using BarbuleOptics.Files.Results;
using BarbuleOptics.Tests.Ensembles;
using BarbuleOptics.Tests.Files;
using Xunit;

namespace BarbuleOptics.Tests.Cli;

/// <summary>Draws, things not known and sensitivity through the command.</summary>
public sealed class DrawOptionTests
{
    private static readonly string[] Quick = ["--wavelengths", "300:780:20", "--threads", "2"];

    [Fact]
    public async Task Draws_stand_in_table_document_and_files_and_are_the_same_for_any_threads()
    {
        using var folder = new TemporaryFolder();
        string file = Written(folder);
        string printed = (await Barbule.Call(["predict", file, .. Quick, "--draws", "64", "--out", folder["one"]])).Good().Output;
        Assert.Contains("draws of", printed, StringComparison.Ordinal);
        Assert.Contains("Hue at 0 degrees:", printed, StringComparison.Ordinal);
        Assert.Contains("melanin-older", printed, StringComparison.Ordinal);
        Assert.Contains("bands.csv, bands.svg", printed.ReplaceLineEndings(" ").Replace("  ", " ", StringComparison.Ordinal), StringComparison.Ordinal);

        (await Barbule.Call(["predict", file, .. Quick, "--threads", "1", "--draws", "64", "--out", folder["two"]])).Refusal(2);
        (await Barbule.Call(["predict", file, "--wavelengths", "300:780:20", "--threads", "1", "--draws", "64", "--out", folder["two"]])).Good();
        foreach (string name in (string[])["bands.csv", "prediction.json", "bands.svg", "bands.png", "bands.pdf"])
            Assert.Equal(File.ReadAllBytes(folder["one/" + name]), File.ReadAllBytes(folder["two/" + name]));

        JsonElement draws = JsonDocument.Parse(File.ReadAllText(folder["one/prediction.json"])).RootElement.GetProperty("draws");
        Assert.Equal((64, "mean", 1), (draws.GetProperty("count").GetInt32(), draws.GetProperty("spread").GetString(), draws.GetProperty("seed").GetInt32()));
        JsonElement view = draws.GetProperty("views")[0];
        Assert.Equal(1, view.GetProperty("hue_terms").EnumerateArray().Sum(term => term.GetProperty("probability").GetDouble()), 1e-9);
        Assert.Equal(4, view.GetProperty("melanin_constants").GetArrayLength());
        Assert.Equal(2, view.GetProperty("values").GetProperty("h_deg").GetProperty("interval_95").GetArrayLength());

        string[] lines = File.ReadAllLines(folder["one/bands.csv"]);
        Assert.Equal(BandsCsv.Header, lines[0]);
        Assert.Equal(1 + 25, lines.Length);
        double[] first = [.. lines[1].Split(',').Skip(3).Select(cell => double.Parse(cell, CultureInfo.InvariantCulture))];
        // median, then 50 %, then 95 %: each inside the next.
        Assert.True(first[3] <= first[1] && first[1] <= first[0] && first[0] <= first[2] && first[2] <= first[4]);
    }

    [Fact]
    public async Task Without_draws_files_of_earlier_draws_are_taken_away()
    {
        using var folder = new TemporaryFolder();
        string file = Written(folder);
        (await Barbule.Call(["predict", file, .. Quick, "--draws", "20", "--out", folder["out"]])).Good();
        Assert.True(File.Exists(folder["out/bands.csv"]));
        (await Barbule.Call(["predict", file, .. Quick, "--out", folder["out"], "--force"])).Good();
        Assert.False(File.Exists(folder["out/bands.csv"]));
    }

    [Fact]
    public async Task What_a_spread_lacks_is_refused_with_its_place()
    {
        using var folder = new TemporaryFolder();
        string file = folder["structure.toml"];
        File.WriteAllText(file, "format = 1\n[cortex]\nthickness = { mean = 100, sd = 5 }\n");
        Assert.Equal(
            $"{file}:3:13: cortex.thickness: found an sd without n; needed n, the number of independent units, to say how sure the mean is",
            (await Barbule.Call(["predict", file, .. Quick, "--draws", "100"])).Refusal(3));
    }

    [Theory]
    [InlineData("--spread between", "--spread: found without --draws")]
    [InlineData("--seed 3", "--seed: found without --draws")]
    [InlineData("--draws 5", "a whole number from 20 to 10000000")]
    [InlineData("--draws 100 --spread betwen", "did you mean between?")]
    [InlineData("--draws 100 --seed -1", "--seed")]
    public async Task Wrong_options_are_refused(string words, string says)
    {
        using var folder = new TemporaryFolder();
        Assert.Contains(says, (await Barbule.Call(["predict", Written(folder), .. words.Split(' ')])).Refusal(2), StringComparison.Ordinal);
    }

    [Fact]
    public async Task Things_not_known_are_shown_with_what_they_may_give()
    {
        using var folder = new TemporaryFolder();
        string file = folder["fossil.toml"];
        File.WriteAllText(file, "format = 1\n[cortex]\nthickness = { min = 100, max = 200 }\n[[layer]]\nform = 'film'\nthickness = 60\ngap = { min = 0, max = 50 }\n[preservation]\nmelanosome_shrinkage = 0.2\n");
        string printed = (await Barbule.Call(["predict", file, .. Quick, "--out", folder["out"]])).Good().Output.ReplaceLineEndings(" ").Replace("   ", " ", StringComparison.Ordinal);
        Assert.Contains("Assumed: lengths were corrected", printed, StringComparison.Ordinal);
        Assert.Contains("Not known at 0 degrees: cortex.thickness, 100", printed, StringComparison.Ordinal);
        Assert.Contains("Hue terms within reach", printed, StringComparison.Ordinal);
        string[] lines = File.ReadAllLines(folder["out/unknowns.csv"]);
        Assert.Equal(UnknownsCsv.Header, lines[0]);
        Assert.Equal(1 + 21 + 21, lines.Length);
        JsonElement root = JsonDocument.Parse(File.ReadAllText(folder["out/prediction.json"])).RootElement;
        Assert.Equal(0.2, root.GetProperty("corrections").GetProperty("preservation.melanosome_shrinkage").GetDouble());
        Assert.True(root.GetProperty("unknowns").GetProperty("views")[0].GetProperty("reachable_hue_terms").GetArrayLength() > 1);
    }

    [Fact]
    public async Task Sensitivity_stands_in_table_document_and_files()
    {
        using var folder = new TemporaryFolder();
        string file = Written(folder);
        string printed = (await Barbule.Call(["sensitivity", file, .. Quick, "--draws", "100", "--out", folder["out"]])).Good().Output;
        Assert.Contains("hue angle at 0 degrees", printed, StringComparison.Ordinal);
        Assert.Contains("For the hue, measure ", printed, StringComparison.Ordinal);
        Assert.Equal(["sensitivity.csv", "sensitivity.json", "sensitivity.pdf", "sensitivity.png", "sensitivity.svg"], Directory.GetFiles(folder["out"]).Select(Path.GetFileName).Order(StringComparer.Ordinal));
        Assert.Equal(1 + 3 * 3, File.ReadAllLines(folder["out/sensitivity.csv"]).Length);
        JsonElement root = (await Barbule.Call(["sensitivity", file, .. Quick, "--draws", "100", "--json"])).Json();
        Assert.Equal(3, root.GetProperty("views")[0].GetProperty("outcomes").GetProperty("h_deg").GetProperty("inputs").GetArrayLength());
        Assert.Contains(folder["out"], (await Barbule.Call(["sensitivity", file, .. Quick, "--draws", "100", "--out", folder["out"]])).Refusal(5), StringComparison.Ordinal);
    }

    private static string Written(TemporaryFolder folder)
    {
        string path = folder["structure.toml"];
        File.WriteAllText(path, "format = 1\n" + Ensemble.Films);
        return path;
    }
}
