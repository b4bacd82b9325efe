using System.Globalization;
using System.Text.Json;
using BarbuleOptics.Tests.Files;
using BarbuleOptics.Tests.Samples;
using Xunit;

namespace BarbuleOptics.Tests.Cli;

/// <summary>Several files, results that exist, interrupts, help.</summary>
public sealed class PredictRunTests
{
    private const string Wrong = "format = 1\n[cortex]\nthickness = -5\n";

    private static readonly string[] ResultNames =
        ["absorption.csv", "bird-space.pdf", "bird-space.png", "bird-space.svg", "chromaticity.pdf", "chromaticity.png", "chromaticity.svg", "orders.csv", "prediction.json",
            "reflectance.pdf", "reflectance.png", "reflectance.svg", "section.pdf", "section.png", "section.svg", "spectra.csv", "swatches.pdf", "swatches.png", "swatches.svg"];

    private static readonly string[] Coarse = ["--wavelengths", "400:700:10"];

    [Fact]
    public async Task Several_files_write_a_folder_each_and_one_document()
    {
        using var folder = new TemporaryFolder();
        string one = SampleFiles.Write("hollow-rods", folder.Path), two = SampleFiles.Write("nested-runs", folder.Path);
        JsonElement root = (await Barbule.Call(["predict", one, two, .. Coarse, "--out", folder["out"], "--json"])).Json();

        Assert.Equal("predictions", Assert.Single(root.EnumerateObject()).Name);
        Assert.Equal([one, two], root.GetProperty("predictions").EnumerateArray().Select(item => item.GetProperty("structure").GetProperty("file").GetString()));
        Assert.Equal(
            ["hollow-rods.toml", "nested-runs.toml", "out", "out/hollow-rods", .. Results("out/hollow-rods"), "out/nested-runs", .. Results("out/nested-runs")], folder.Content());
    }

    [Fact]
    public async Task A_wrong_file_does_not_stop_the_others()
    {
        using var folder = new TemporaryFolder();
        string good = SampleFiles.Write("nested-runs", folder.Path), wrong = folder["a-wrong.toml"];
        await File.WriteAllTextAsync(wrong, Wrong, TestContext.Current.CancellationToken);
        Outcome outcome = await Barbule.Call(["predict", wrong, good, folder["absent.toml"], .. Coarse, "--out", folder["out"], "--json"]);

        Assert.Equal(3, outcome.ExitCode);
        Assert.Equal(2, outcome.ErrorLines.Length);
        Assert.StartsWith(wrong + ":3:13: ", outcome.ErrorLines[0], StringComparison.Ordinal);
        Assert.StartsWith(folder["absent.toml"] + ": ", outcome.ErrorLines[1], StringComparison.Ordinal);
        Assert.Single(JsonDocument.Parse(outcome.Output).RootElement.GetProperty("predictions").EnumerateArray());
        Assert.Equal(["a-wrong.toml", "nested-runs.toml", "out", "out/nested-runs", .. Results("out/nested-runs")], folder.Content());
    }

    [Fact]
    public async Task Files_of_one_name_are_refused_before_any_work()
    {
        using var folder = new TemporaryFolder();
        string one = SampleFiles.Write("nested-runs", Directory.CreateDirectory(folder["a"]).FullName), two = SampleFiles.Write("nested-runs", Directory.CreateDirectory(folder["b"]).FullName);
        string line = (await Barbule.Call("predict", one, two, "--out", folder["out"])).Refusal(2);

        Assert.Contains("--out", line, StringComparison.Ordinal);
        Assert.Contains("\"nested-runs\"", line, StringComparison.Ordinal);
        Assert.False(Directory.Exists(folder["out"]));
    }

    [Fact]
    public async Task Results_that_exist_are_replaced_with_force_only()
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write("nested-runs", folder.Path);
        string[] run = ["predict", file, .. Coarse, "--out", folder["out"]];
        (await Barbule.Call(run)).Good();
        string spectra = folder.Text("out/spectra.csv"), document = folder.Text("out/prediction.json");

        Assert.Contains("--force", (await Barbule.Call([.. run, "--angles", "50"])).Refusal(5), StringComparison.Ordinal);
        Assert.Equal((spectra, document), (folder.Text("out/spectra.csv"), folder.Text("out/prediction.json")));
        (await Barbule.Call([.. run, "--angles", "50", "--force"])).Good();
        Assert.NotEqual(spectra, folder.Text("out/spectra.csv"));
        (await Barbule.Call([.. run, "--force"])).Good();
        Assert.Equal((spectra, document), (folder.Text("out/spectra.csv"), folder.Text("out/prediction.json")));
        Assert.Equal(["nested-runs.toml", "out", .. Results("out")], folder.Content());
    }

    // Below a regular file nobody can make a folder, the superuser neither.
    [Theory]
    [InlineData("nested-runs.toml")]
    [InlineData("nested-runs.toml/out")]
    [InlineData("nested-runs.toml/a/b")]
    public async Task A_folder_that_cannot_be_made_ends_with_5(string output)
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write("nested-runs", folder.Path);
        string line = (await Barbule.Call(["predict", file, .. Coarse, "--out", folder[output]])).Refusal(5);

        Assert.Contains("nested-runs.toml", line, StringComparison.Ordinal);
        Assert.Equal(["nested-runs.toml"], folder.Content());
    }

    [Fact]
    public async Task A_cancelled_run_ends_with_130_and_writes_nothing()
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write("hollow-rods", folder.Path);
        using var stop = new CancellationTokenSource(300);
        Outcome outcome = await Barbule.Call(stop.Token, "predict", file, "--wavelengths", "300:399.999:0.001", "--angles", "0:18:1", "--out", folder["out"]);

        Assert.Equal("barbule: interrupted; nothing was written", outcome.Refusal(130));
        Assert.Equal(["hollow-rods.toml"], folder.Content());
    }

    // The process is bound to one culture; called within, the thread's own must not matter either.
    [Fact]
    public async Task A_German_thread_prints_the_same()
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write("hollow-rods", folder.Path);
        string[] run = ["predict", file, .. Coarse, "--angles", "0,30.5", "--accuracy", "0.001"];
        string table = (await Barbule.Call(run)).Good().Output, document = (await Barbule.Call([.. run, "--json"])).Good().Output;
        CultureInfo before = CultureInfo.CurrentCulture;
        try
        {
            var german = (CultureInfo)CultureInfo.InvariantCulture.Clone();
            (german.NumberFormat.NumberDecimalSeparator, german.NumberFormat.NumberGroupSeparator) = (",", ".");
            german.NumberFormat.NegativeSign = "\u2212";
            CultureInfo.CurrentCulture = german;
            Assert.Equal("1,5", 1.5.ToString(CultureInfo.CurrentCulture));
            Assert.Equal(table, (await Barbule.Call(run)).Good().Output);
            Assert.Equal(document, (await Barbule.Call([.. run, "--json"])).Good().Output);
        }
        finally
        {
            CultureInfo.CurrentCulture = before;
        }
    }

    [Theory]
    [InlineData("--help")]
    [InlineData("predict --help")]
    [InlineData("materials --help")]
    [InlineData("sample --help")]
    [InlineData("predict -h")]
    public async Task Help_shows_an_example(string arguments)
    {
        string text = (await Barbule.Call(arguments.Split(' '))).Good().Output;
        Assert.Contains("Example:\n  barbule ", text.ReplaceLineEndings("\n"), StringComparison.Ordinal);
    }

    [Fact]
    public async Task Help_of_predict_names_every_option_and_default()
    {
        string text = (await Barbule.Call("predict", "--help")).Good().Output;
        string[] options = ["--wavelengths", "--angles", "--polarization", "--solver", "--accuracy", "--mixing", "--illuminant", "--observer", "--out", "--force", "--json", "--materials", "--set", "--threads", "--overlay", "--width", "[300:780:1]", "[1e-4]", "[D65]", "[1931-2deg]", "[auto]", "bruggeman-2 with --solver multilayer"];
        Assert.All(options, option => Assert.Contains(option, text, StringComparison.Ordinal));
    }

    [Fact]
    public async Task Materials_lists_all_and_shows_one()
    {
        string all = (await Barbule.Call("materials")).Good().Output;
        string[] names = ["air", "keratin", "eumelanin", "water", "silver", "tio2-rutile"];
        Assert.All(names, name => Assert.Contains("\n" + name + " ", "\n" + all, StringComparison.Ordinal));

        // n = 1.532 + 5890/l^2 is 1.5556 at 500 nm (Leertouwer, Wilts and Stavenga 2011, Opt. Express 19:24061).
        string keratin = (await Barbule.Call("materials", "keratin")).Good().Output;
        Assert.Contains("1.5556", keratin, StringComparison.Ordinal);
        Assert.Contains("extrapolated", keratin, StringComparison.Ordinal);
        Assert.Contains("doi", keratin, StringComparison.OrdinalIgnoreCase);
    }

    [Theory]
    [InlineData("170", "170mm")]
    [InlineData("62.5", "62.5mm")]
    public async Task Figures_have_the_width_asked_for(string width, string written)
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write("nested-runs", folder.Path);
        (await Barbule.Call(["predict", file, .. Coarse, "--out", folder["out"], "--width", width])).Good();

        Assert.Contains($" width=\"{written}\"", folder.Text("out/reflectance.svg"), StringComparison.Ordinal);
        Assert.Contains($" width=\"{written}\"", folder.Text("out/section.svg"), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("59")]
    [InlineData("201")]
    [InlineData("wide")]
    public async Task A_width_that_no_page_has_is_refused(string width)
        => Assert.Contains("60 to 200 mm", (await Barbule.Call("predict", "x.toml", "--width", width)).Refusal(2), StringComparison.Ordinal);

    /// <summary>Every file that a prediction writes, in the order of their names.</summary>
    private static IEnumerable<string> Results(string folder) => ResultNames.Select(name => $"{folder}/{name}");
}
