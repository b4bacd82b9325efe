using System.Text;
using BarbuleOptics.Tests.Files;
using Xunit;

namespace BarbuleOptics.Tests.Cli;

/// <summary>Whatever is wrong with a structure: exit 3, one line that names the place, nothing printed, nothing written.</summary>
public sealed class WrongFileTests
{
    private const string Head = "format = 1\n[cortex]\nthickness = 100\n";
    private const string Rod = Head + "[[layer]]\nform = 'rod'\ndiameter = 100\n";
    private const string Film = Head + "[[layer]]\nform = 'film'\nthickness = 60\n";
    private const string Cell = Head + "[[layer]]\nspacing = 300\n[[layer.body]]\nform = 'rod'\ndiameter = 100\n[[layer.body]]\nform = 'rod'\ndiameter = 100\n";

    /// <summary>Text, options, place after the file's name (lines and columns counted by hand), words of the message.</summary>
    public static TheoryData<string, string, string, string> Wrong => new()
    {
        // The reader's.
        { "[cortex]\nthickness = 5\n", "", ":1:1: format: ", "format = 1" },
        { "format = 1\n", "", ":1:1: ", "at least one layer" },
        { Head + "[[layer]]\nform = 'rood'\ndiameter = 100\nspacing = 150\n", "", ":5:8: layer1.form: ", "rod" },
        { Rod, "", ":4:1: layer1.spacing: ", "spacing" },
        { Rod + "spacing = 150\nlumen = 120\n", "", ":8:9: layer1.lumen: ", "120" },
        { Rod + "spacing = 90\n", "", ":7:11: layer1.spacing: ", "90" },
        { Rod + "spacing = 150\nspacing = 160\n", "", ":8:1: layer1.spacing: ", "second time" },
        { Rod + "spacing = 150\nrows = 3\n", "", ":4:1: layer1.pitch: ", "pitch" },
        { Rod + "spacing = 150\nrows = 1001\npitch = 120\n", "", ":8:8: layer1.rows: ", "1000" },
        { Rod + "spacing = 150\ncolor = 'green'\n", "", ":8:1: layer1.color: ", "color" },
        { Film + "thickness = 50,5\n", "", ":7:", "comma" },
        { Film + "rows = 2\npitch = 50\n", "", ":8:9: layer1.pitch: ", "60" },
        { Head + "[barbule]\nmatrix = 'keratine'\n", "", ":5:10: barbule.matrix: ", "keratin" },
        { Head + "[barbule]\nsurround = 'silver'\n", "", ":5:12: barbule.surround: ", "lossless" },
        { Head + "[barbule]\nmatrix = './none.toml'\n", "", ":5:10: barbule.matrix: ", "none.toml" },
        { Head + "[barbule]\nmatrix = { n = 1.5, k = -0.1 }\n", "", ":5:", "-0.1" },
        { "format = 1\n[cortex]\nthickness = nan\n", "", ":3:13: cortex.thickness: ", "NaN" },
        { "format = 1\n[cortex]\nthickness = 1e7\n", "", ":3:13: cortex.thickness: ", "1000000" },
        { "format = 1\n[cortex]\nthickness = { mean = 5, sd = -1 }\n", "", ":3:", "sd" },
        { "format = 1\n[cortex]\nthickness = { min = 9, max = 5 }\n", "", ":3:", "max" },

        // What only the section shows.
        { Rod + "spacing = 150\nrows = 3\npitch = 90\n", "", ":9:9: layer1.pitch: ", "rows overlap; allowed at least 100 nm" },
        { Rod + "spacing = 100\nrows = 2\npitch = 86\nstacking = 'staggered'\n", "", ":9:9: layer1.pitch: ", "allowed at least 86.603 nm" },
        { Rod + "spacing = 150\nrows = 3\npitch = 45\nstacking = 'staggered'\n", "", ":9:9: layer1.pitch: ", "rows overlap" },
        { Cell + "x = 0.3\n", "", ":12:5: layer1.body2.x: ", "overlaps body 1 by 10 nm" },
        { Rod + "spacing = 150\ngap = -30\n[[layer]]\nform = 'rod'\ndiameter = 100\nspacing = 150\n", "", ":8:7: layer1.gap: ", "layers 1 and 2 overlap; allowed at least 30 nm more" },
        { Rod + "spacing = 150\ngap = -30\n[[layer]]\nform = 'rod'\ndiameter = 100\nspacing = 157\nshift = 0.5\n", "", ":8:7: layer1.gap: ", "overlap" },
        { Film + "gap = -60\n[[layer]]\nform = 'film'\nthickness = 30\n", "", ":7:7: layer1.gap: ", "overlap" },
        { Rod + "spacing = 150\ngap = -1\n", "", ":8:7: layer1.gap: ", "backing" },
        { "format = 1\n[[layer]]\nform = 'film'\nthickness = 20\ngap = -60\n[[layer]]\nform = 'film'\nthickness = 30\n", "", ":5:7: layer1.gap: ", "surface" },

        // What only the solver or the wavelengths show.
        { Film + "material = 'tio2-rutile'\n", "--wavelengths 250:280:1", ":7:12: layer1.material: ", "tio2-rutile has a resonance at 283.4 nm" },
        { Film + "material = 'silver'\n", "--wavelengths 1000:1300:10", ":7:12: layer1.material: ", "206.6-1240 nm" },
        { Film + "material = 'silver'\n", "--wavelengths 200:500:10", ":7:12: layer1.material: ", "206.6-1240 nm" },
        { Film + "material = 'n-bk7'\n", "--wavelengths 100:200:1", ":7:12: layer1.material: ", "n-bk7 has a resonance at 141.5 nm" },
        { Film + "material = 'fused-silica'\n", "--wavelengths 10000:20000:100", ":7:12: layer1.material: ", "fused-silica has a resonance at 9896.2 nm" },
        { Film + "material = 'fused-silica'\n", "--wavelengths 9000:9800:100", ":7:12: layer1.material: ", "fused-silica has n = NaN" },

        // What options do to a good file.
        { Film, "--set layer2.rows=3", "--set layer2.rows=3: ", "layer" },
        { Film, "--set layer1.thickness=-1", "--set layer1.thickness=-1: ", "-1" },
        { Film, "--set layer1.thickness", "--set layer1.thickness: ", "KEY=VALUE" },
        { Film, "--set layer1.thicknes=50", "--set layer1.thicknes=50: ", "thickness" },
        { Film, "--set barbule.surround=eumelanin", "--set barbule.surround=eumelanin: ", "lossless" },
        { Rod + "spacing = 150\n", "--set barbule.axis=45 --mixing bruggeman", "--set barbule.axis=45: ", "found 45 degrees; the layer model allows across (0) or along (90) only, the grating solver any angle" },
        { Rod + "spacing = 150\n", "--set barbule.axis=45 --solver multilayer", "--set barbule.axis=45: ", "leave --mixing and --solver multilayer out" },
        { Film, "--set layer1.thickness=50,5", "--set layer1.thickness=50,5: ", "50,5" },
        { Rod + "spacing = 150\n", "--set layer1.rows=2 --set layer1.pitch=60", "--set layer1.pitch=60: ", "rows overlap" },
        { Rod + "spacing = 150\n", "--set layer1.lumen=200", "--set layer1.lumen=200: ", "200" },
    };

    [Theory]
    [MemberData(nameof(Wrong))]
    public async Task A_wrong_structure_is_refused_at_its_place(string text, string options, string place, string words)
    {
        string line = await Refusal(Encoding.UTF8.GetBytes(text), options.Split(' ', StringSplitOptions.RemoveEmptyEntries));

        Assert.StartsWith(place.StartsWith(':') ? "FILE" + place : place, line, StringComparison.Ordinal);
        Assert.Contains(words, line, StringComparison.Ordinal);
    }

    public static TheoryData<string, byte[]> NoText => new()
    {
        { "UTF-16", Encoding.Unicode.GetPreamble().Concat(Encoding.Unicode.GetBytes(Film)).ToArray() },
        { "zero byte", Encoding.Unicode.GetBytes(Film) },
        { "not UTF-8", [.. Encoding.UTF8.GetBytes(Head), 0xE4] },
        { "zero byte", [0x7F, (byte)'E', (byte)'L', (byte)'F', 2, 1, 1, 0, 0, 0, 0] },
        { "1 MB", Encoding.UTF8.GetBytes(Film + new string('#', 1_000_000)) },
    };

    [Theory]
    [MemberData(nameof(NoText))]
    public async Task A_file_that_is_no_text_is_refused(string words, byte[] bytes) => Assert.Contains(words, await Refusal(bytes, []), StringComparison.Ordinal);

    [Fact]
    public async Task An_empty_file_is_refused()
    {
        using var folder = new TemporaryFolder();
        await File.WriteAllTextAsync(folder["empty.toml"], "", TestContext.Current.CancellationToken);
        Outcome outcome = await Barbule.Call("predict", folder["empty.toml"], "--out", folder["out"]);

        Assert.StartsWith(folder["empty.toml"] + ":1:1: ", outcome.Refusal(3), StringComparison.Ordinal);
        Assert.Equal(["empty.toml"], folder.Content());
    }

    [Fact]
    public async Task A_file_that_is_not_there_or_a_folder_is_refused()
    {
        using var folder = new TemporaryFolder();
        string absent = folder["absent.toml"], output = folder["out"];

        Assert.Equal($"{absent}: there is no such file", (await Barbule.Call("predict", absent, "--out", output)).Refusal(3));
        Assert.Equal($"{folder.Path}: found a folder; allowed a file", (await Barbule.Call("predict", folder.Path, "--out", output)).Refusal(3));
        Assert.Equal($"{absent}/x: there is no such file", (await Barbule.Call("predict", absent + "/x", "--json")).Refusal(3));
        Assert.Empty(folder.Content());
    }

    [Fact]
    public async Task A_wrong_material_table_is_refused_at_its_place()
    {
        using var folder = new TemporaryFolder();
        Directory.CreateDirectory(folder["tables"]);
        await File.WriteAllTextAsync(folder["tables/glass.toml"], "format = 1\nname = \"glass\"\n", TestContext.Current.CancellationToken);
        await File.WriteAllTextAsync(folder["film.toml"], Film, TestContext.Current.CancellationToken);
        foreach (string[] words in (string[][])[["predict", folder["film.toml"]], ["materials"]])
        {
            Outcome outcome = await Barbule.Call([.. words, "--materials", folder["tables"]]);
            Assert.Equal(3, outcome.ExitCode);
            Assert.Equal("", outcome.Output);
            Assert.NotEmpty(outcome.ErrorLines);
            Assert.All(outcome.ErrorLines, line => Assert.StartsWith(folder["tables/glass.toml"] + ":", line, StringComparison.Ordinal));
        }
        Assert.Contains(folder["none"], (await Barbule.Call("materials", "--materials", folder["none"])).Refusal(3), StringComparison.Ordinal);
    }

    /// <summary>The line of a refused file, with FILE for its path.</summary>
    private static async Task<string> Refusal(byte[] content, string[] options)
    {
        using var folder = new TemporaryFolder();
        string file = folder["wrong.toml"];
        await File.WriteAllBytesAsync(file, content, TestContext.Current.CancellationToken);
        string line = (await Barbule.Call(["predict", file, "--out", folder["out"], .. options])).Refusal(3);
        Assert.Equal(["wrong.toml"], folder.Content());
        return line.Replace(file, "FILE", StringComparison.Ordinal);
    }
}
