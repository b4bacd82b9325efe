using System.Globalization;
using System.Text.Json;
using BarbuleOptics.Tests.Files;
using BarbuleOptics.Tests.Samples;
using Xunit;

namespace BarbuleOptics.Tests.Cli;

/// <summary>Options that describe an instrument, from the command line to what is written.</summary>
public sealed class InstrumentOptionTests
{
    private static readonly string[] Quick = ["--wavelengths", "400:700:20", "--accuracy", "1e-3"];

    public static TheoryData<string> Samples => SampleFiles.Rows;

    [Theory]
    [MemberData(nameof(Samples))]
    public async Task Every_sample_is_read_with_an_instrument(string name)
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write(name, folder.Path);
        string[] wavelengths = ["--wavelengths", "400:700:60", "--accuracy", "1e-2"];
        JsonElement json = (await Barbule.Call(["predict", file, .. wavelengths, "--aperture", "2,4", "--tilt", "3", "--geometry", "fixed-arms:30", "--json"])).Good().Json();
        JsonElement signal = json.GetProperty("views")[0].GetProperty("signal");
        Assert.InRange(signal.GetProperty("facing_share").GetDouble(), 0.05, 0.5);
        Assert.InRange(signal.GetProperty("mean_incidence_deg").GetDouble(), 14, 16);
        Assert.Equal("fixed-arms", json.GetProperty("instrument").GetProperty("geometry").GetString());
        Assert.Equal("mirror", json.GetProperty("reference").GetString());
    }

    // The one is the other times the factor between mirror and matt white, which is printed: nothing is hidden.
    [Fact]
    public async Task The_scale_between_references_is_stated()
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write("solid-rods-one-row", folder.Path);
        string[] call = ["predict", file, .. Quick, "--aperture", "NA0.15", "--out"];
        (await Barbule.Call([.. call, folder["mirror"]])).Good();
        (await Barbule.Call([.. call, folder["white"], "--reference", "white-standard"])).Good();
        double[] mirror = Signals(folder.Text("mirror/signal.csv")), white = Signals(folder.Text("white/signal.csv"));
        using JsonDocument json = JsonDocument.Parse(folder.Text("white/prediction.json"));
        double scale = json.RootElement.GetProperty("views")[0].GetProperty("signal").GetProperty("scale").GetDouble();
        // One over the square of the aperture would be exact for light of one direction: equal cones of 8.6 degrees add the half of their own opening.
        Assert.Equal(1, scale * 0.15 * 0.15, 0.01);
        Assert.Equal(16, mirror.Length);
        for (int i = 0; i < mirror.Length; i++)
            Assert.Equal(mirror[i] * scale, white[i], 1e-12);
    }

    [Fact]
    public async Task Without_an_instrument_there_is_no_signal()
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write("solid-rods-one-row", folder.Path);
        (await Barbule.Call(["predict", file, .. Quick, "--out", folder["out"], "--tilt", "5", "--aperture", "2"])).Good();
        Assert.True(File.Exists(folder["out/signal.csv"]));
        (await Barbule.Call(["predict", file, .. Quick, "--out", folder["out"], "--force"])).Good();
        // A result of another way of looking is not left beside the new ones.
        Assert.False(File.Exists(folder["out/signal.csv"]));
        using JsonDocument json = JsonDocument.Parse(folder.Text("out/prediction.json"));
        Assert.Equal(JsonValueKind.Null, json.RootElement.GetProperty("instrument").ValueKind);
        Assert.Equal(JsonValueKind.Null, json.RootElement.GetProperty("views")[0].GetProperty("signal").ValueKind);
    }

    [Theory]
    [InlineData("predict", "--draws", "16", "--draws")]
    [InlineData("sensitivity", "--seed", "2", "sensitivity")]
    public async Task Draws_take_no_instrument(string command, string option, string value, string words)
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write("solid-rods-one-row", folder.Path);
        string line = (await Barbule.Call(command, file, option, value, "--tilt", "5")).Refusal(2);
        Assert.StartsWith($"barbule: --tilt: found with {words}, ", line, StringComparison.Ordinal);
    }

    [Fact]
    public async Task A_white_standard_without_cones_is_refused()
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write("solid-rods-one-row", folder.Path);
        string line = (await Barbule.Call("predict", file, "--reference", "white-standard")).Refusal(2);
        Assert.StartsWith("barbule: --reference: found 'white-standard' without --aperture", line, StringComparison.Ordinal);
    }

    private static double[] Signals(string csv)
        => [.. csv.Split('\n')[1..^1].Select(line => double.Parse(line.Split(',')[3], CultureInfo.InvariantCulture))];
}
