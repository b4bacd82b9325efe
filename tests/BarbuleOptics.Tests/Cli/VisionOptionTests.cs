using System.Text.Json;
using BarbuleOptics.Tests.Files;
using BarbuleOptics.Tests.Samples;
using Xunit;

namespace BarbuleOptics.Tests.Cli;

/// <summary>Eyes, lights and backgrounds of a user's own, through the command.</summary>
public sealed class VisionOptionTests
{
    private const string Eye = "format = 1\nname = \"marsh-singer\"\nlike = \"average-ultraviolet\"\nweber_fraction = 0.05\n";
    private const string Light = "format = 1\nname = \"shade\"\nrows = [[300, 1], [500, 2], [560, 4], [780, 4]]\n";
    private const string Leaf = "format = 1\nname = \"leaf\"\nrows = [[300, 0.05], [500, 0.05], [550, 0.2], [600, 0.1], [700, 0.4]]\n";

    [Fact]
    public async Task Eyes_that_are_asked_for_stand_beside_the_averages_with_their_sources()
    {
        using var folder = new TemporaryFolder();
        string eye = Written(folder, "eye.toml", Eye);
        JsonElement root = await Predict(folder, "--vision", "peafowl", "--vision", eye, "--vision", "Average-Violet");

        string[] names = ["average-ultraviolet", "average-violet", "peafowl", "marsh-singer"];
        JsonElement vision = root.GetProperty("bird_vision"), bird = root.GetProperty("views")[0].GetProperty("bird");
        Assert.Equal(names, bird.EnumerateObject().Select(property => property.Name));
        Assert.Equal(names, vision.GetProperty("eyes").EnumerateArray().Select(one => one.GetProperty("name").GetString()));
        Assert.All(vision.GetProperty("eyes").EnumerateArray(), one => Assert.NotEqual(("", ""), (one.GetProperty("source").GetString(), one.GetProperty("obtained").GetString())));
        Assert.Contains("from memory", vision.GetProperty("eyes")[1].GetProperty("obtained").GetString(), StringComparison.Ordinal);
        Assert.Contains("varies", vision.GetProperty("illuminant_note").GetString(), StringComparison.Ordinal);
        Assert.Equal(("D65", "flat, a perfect mirror"), (vision.GetProperty("illuminant").GetString(), vision.GetProperty("background").GetString()));

        // Half the noise, twice the contrast; the same place.
        JsonElement one = bird.GetProperty("average-ultraviolet"), other = bird.GetProperty("marsh-singer");
        Assert.Equal(2 * one.GetProperty("chromatic_contrast").GetDouble(), other.GetProperty("chromatic_contrast").GetDouble(), 1e-9);
        Assert.Equal(one.GetProperty("chroma").GetDouble(), other.GetProperty("chroma").GetDouble(), 1e-12);
    }

    [Fact]
    public async Task A_light_and_a_background_of_ones_own_are_used_and_named()
    {
        using var folder = new TemporaryFolder();
        JsonElement root = await Predict(folder, "--illuminant", Written(folder, "light.toml", Light), "--background", Written(folder, "leaf.toml", Leaf), "--summation", "5");
        JsonElement plain = await Predict(folder);

        JsonElement vision = root.GetProperty("bird_vision"), view = root.GetProperty("views")[0];
        Assert.Equal(("shade", "leaf"), (vision.GetProperty("illuminant").GetString(), vision.GetProperty("background").GetString()));
        Assert.Equal("shade", view.GetProperty("cie").GetProperty("illuminant").GetString());
        Assert.Equal((5, 1), (root.GetProperty("summation_nm").GetInt32(), plain.GetProperty("summation_nm").GetInt32()));
        Assert.NotEqual(Chroma(plain.GetProperty("views")[0]), Chroma(view));
    }

    [Fact]
    public async Task The_table_says_what_birds_see()
    {
        using var folder = new TemporaryFolder();
        string printed = (await Barbule.Call("predict", SampleFiles.Write("hollow-rods", folder.Path), "--solver", "multilayer", "--vision", "peafowl")).Good().Output;
        Assert.Contains("bird hue", printed, StringComparison.Ordinal);
        Assert.Contains("0  peafowl ", printed, StringComparison.Ordinal);
        Assert.Contains("ultraviolet of real daylight", printed.ReplaceLineEndings(" ").Replace("  ", " ", StringComparison.Ordinal), StringComparison.Ordinal);
        string without = (await Barbule.Call("predict", SampleFiles.Write("hollow-rods", folder.Path), "--solver", "multilayer", "--wavelengths", "380:780:1")).Good().Output;
        Assert.DoesNotContain("bird hue", without, StringComparison.Ordinal);
        Assert.Contains("Warning no-bird-color", without, StringComparison.Ordinal);
    }

    [Fact]
    public async Task A_dark_structure_is_warned_of()
    {
        using var folder = new TemporaryFolder();
        string file = Written(folder, "dark.toml", "format = 1\n[barbule]\nbacking = { n = 1.001, k = 0.0 }\nmatrix = \"air\"\n[cortex]\nthickness = 100\n");
        Assert.Contains("Warning dark-to-birds", (await Barbule.Call("predict", file)).Good().Output, StringComparison.Ordinal);
    }

    /// <summary>Option, text of its file, place after the file's name (counted by hand), words of the message.</summary>
    public static TheoryData<string, string, string, string> Wrong => new()
    {
        { "--vision", "name = 'x'\nlike = 'peafowl'\n", ":1:1: format: ", "format = 1" },
        { "--vision", "format = 1\nlike = 'peafowl'\n", ":1:1: name: ", "what output calls this eye" },
        { "--vision", "format = 1\nname = 'peafowl'\nlike = 'peafowl'\n", ":2:8: name: ", "other than" },
        { "--vision", "format = 1\nname = 'x'\nlike = 'peafoul'\n", ":3:8: like: ", "did you mean \"peafowl\"" },
        { "--vision", "format = 1\nname = 'x'\nlike = 'peafowl'\nweber = 0.1\n", ":4:1: weber: ", "weber_fraction" },
        { "--vision", "format = 1\nname = 'x'\nlike = 'peafowl'\nweber_fraction = 0\n", ":4:18: weber_fraction: ", "above 0" },
        { "--vision", "format = 1\nname = 'x'\nlike = 'peafowl'\n[media]\nhalf_nm = 'x'\n", ":5:11: media.half_nm: ", "a number" },
        { "--vision", "format = 1\nname = 'x'\nlike = 'peafowl'\n[short]\npigment_nm = 300\n", ":5:14: short.pigment_nm: ", "320 to 650" },
        { "--vision", "format = 1\nname = 'x'\nlike = 'peafowl'\n[short]\npigment_nm = 520\n", ":5:14: short.pigment_nm: ", "below that of medium, 505" },
        { "--vision", "format = 1\nname = 'x'\nlike = 'peafowl'\n[medium]\npigment_nm = 440\n", ":5:14: medium.pigment_nm: ", "above that of short, 458" },
        { "--vision", "format = 1\nname = 'x'\nlike = 'peafowl'\n[long]\ncut_nm = 600\nmid_nm = 590\n", ":6:10: long.mid_nm: ", "above cut_nm, 600" },
        { "--vision", "format = 1\nname = 'x'\nlike = 'peafowl'\n[long]\ntransparent = true\nmid_nm = 590\n", ":6:10: long.mid_nm: ", "transparent" },
        { "--vision", "format = 1\nname = 'x'\nlike = 'peafowl'\n[shortest]\ncut_nm = 390\n", ":4:1: shortest.mid_nm: ", "needed a number" },
        { "--vision", "format = 1\nname = 'x'\nlike = 'peafowl'\n[double]\nnumber = 2\n", ":5:1: double.number: ", "pigment_nm" },
        { "--illuminant", "format = 1\nname = 'x'\nrows = [[310, 1], [780, 1]]\n", ":3:8: rows: ", "310 to 780 nm; allowed" },
        { "--illuminant", "format = 1\nname = 'D65'\nrows = [[300, 1], [780, 1]]\n", ":2:8: name: ", "the CIE's" },
        { "--illuminant", "format = 1\nname = 'x'\nrows = [[300, 0], [560, 0], [780, 1]]\n", ":3:8: rows: ", "560 nm" },
        { "--illuminant", "format = 1\nname = 'x'\nunit = 'watt'\nrows = [[300, 1], [780, 1]]\n", ":3:8: unit: ", "\"energy\", \"photons\"" },
        { "--illuminant", "format = 1\nname = 'x'\nrows = [[300, 1], [780, -1]]\n", ":3:19: rows: ", "no value below 0" },
        { "--background", "format = 1\nname = 'x'\nrows = [[300, 1], [300, 1], [700, 1]]\n", ":3:19: rows: ", "300 after 300" },
        { "--background", "format = 1\nname = 'x'\nrows = [[300, 0], [700, 0]]\n", ":3:8: rows: ", "black" },
        { "--background", "format = 1\nname = 'x'\nrows = 5\n", ":3:8: rows: ", "a list of" },
        { "--background", "format = 1\nname = 'x'\n", ":1:1: rows: ", "300 to 700 nm" },
    };

    [Theory]
    [MemberData(nameof(Wrong))]
    public async Task A_wrong_file_is_refused_at_its_place(string option, string text, string place, string words)
    {
        using var folder = new TemporaryFolder();
        string path = Written(folder, "own.toml", text), file = SampleFiles.Write("cortex-over-sheet", folder.Path);
        string line = (await Barbule.Call("predict", file, option, path, "--out", folder["out"])).Refusal(3);
        Assert.StartsWith(path + place, line, StringComparison.Ordinal);
        Assert.Contains(words, line, StringComparison.Ordinal);
        Assert.False(Directory.Exists(folder["out"]));
    }

    [Theory]
    [InlineData("--vision")]
    [InlineData("--illuminant")]
    [InlineData("--background")]
    public async Task A_file_that_is_not_there_is_refused(string option)
        => Assert.Equal("./absent.toml: there is no such file", (await Barbule.Call("predict", "x.toml", option, "./absent.toml")).Refusal(3));

    [Fact]
    public async Task Two_eyes_of_one_name_are_refused()
    {
        using var folder = new TemporaryFolder();
        string one = Written(folder, "one.toml", Eye), two = Written(folder, "two.toml", Eye.Replace("0.05", "0.06", StringComparison.Ordinal));
        Assert.Equal($"{two}: name: found \"marsh-singer\" a second time; allowed one eye of a name", (await Barbule.Call("predict", "x.toml", "--vision", one, "--vision", two)).Refusal(3));
    }

    private static double Chroma(JsonElement view) => view.GetProperty("bird").GetProperty("average-violet").GetProperty("chroma").GetDouble();

    private static string Written(TemporaryFolder folder, string name, string text)
    {
        File.WriteAllText(folder[name], text);
        return folder[name];
    }

    private static async Task<JsonElement> Predict(TemporaryFolder folder, params string[] words)
        => (await Barbule.Call(["predict", SampleFiles.Write("hollow-rods", folder.Path), "--solver", "multilayer", "--json", .. words])).Json();
}
