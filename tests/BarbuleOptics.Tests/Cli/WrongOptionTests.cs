using BarbuleOptics.Tests.Files;
using BarbuleOptics.Tests.Samples;
using Xunit;

namespace BarbuleOptics.Tests.Cli;

/// <summary>Whatever is wrong with the command line: exit 2, one line that names the option, nothing printed, nothing written.</summary>
public sealed class WrongOptionTests
{
    /// <summary>Option, value, words of the message.</summary>
    public static TheoryData<string, string, string> WrongValues => new()
    {
        { "--wavelengths", "300-780", "300:780:1" },
        { "--wavelengths", "300:780", "from:to:step" },
        { "--wavelengths", "300:780:1:1", "from:to:step" },
        { "--wavelengths", "", "from:to:step" },
        { "--wavelengths", "300:780:0", "from:to:step" },
        { "--wavelengths", "300:780:-1", "from:to:step" },
        { "--wavelengths", "780:300:1", "from:to:step" },
        { "--wavelengths", "300,5:780:1", "300,5" },
        { "--wavelengths", "9:780:1", "10 to 100000 nm" },
        { "--wavelengths", "300:100001:1", "10 to 100000 nm" },
        { "--wavelengths", "NaN:780:1", "NaN" },
        { "--wavelengths", "300:inf:1", "inf" },
        { "--wavelengths", "300:780:0.001", "at most 100000" },
        { "--wavelengths", "300:780:1e-300", "at most 100000" },
        { "--wavelengths", "0x12C:780:1", "0x12C" },
        { "--angles", "90", "below 90" },
        { "--angles", "-1", "-1" },
        { "--angles", "0,30,30", "0,30,30" },
        { "--angles", "0;30", "0;30" },
        { "--angles", "30.5,", "list" },
        { "--angles", "0:90:10", "below 90" },
        { "--angles", "0:60:0", "range" },
        { "--angles", "60:0:10", "range" },
        { "--angles", "0:60:0.01", "at most 1000" },
        { "--angles", "NaN", "NaN" },
        { "--angles", "inf", "inf" },
        { "--angles", "1e400", "1e400" },
        { "--polarization", "S", "did you mean s?" },
        { "--polarization", "te", "unpolarized, s, p" },
        { "--solver", "exact", "auto, multilayer, grating" },
        { "--solver", "gratings", "did you mean grating?" },
        { "--accuracy", "0", "1e-10 to 0.1" },
        { "--accuracy", "-1e-4", "1e-10 to 0.1" },
        { "--accuracy", "1", "1e-10 to 0.1" },
        { "--accuracy", "NaN", "1e-10 to 0.1" },
        { "--accuracy", "0,001", "1e-10 to 0.1" },
        { "--mixing", "brugeman", "did you mean bruggeman?" },
        { "--mixing", "", "mean-index" },
        { "--illuminant", "D66", "did you mean D65?" },
        { "--vision", "pigeon", "peafowl" },
        { "--vision", "average-violett", "did you mean average-violet?" },
        { "--summation", "10", "1 or 5" },
        { "--observer", "2deg", "1931-2deg" },
        { "--observer", "1931-2-deg", "did you mean 1931-2deg?" },
        { "--aperture", "0", "NA0.15" },
        { "--aperture", "80", "75 degrees" },
        { "--aperture", "1,2,3", "light,collection" },
        { "--aperture", "NA1", "below 1" },
        { "--aperture", "wide", "7.5" },
        { "--tilt", "0", "arc:20" },
        { "--tilt", "61", "60 degrees" },
        { "--tilt", "arc:90", "80 degrees" },
        { "--rod-spread", "-1", "0 to 60 degrees" },
        { "--geometry", "two-arms", "turning-arms" },
        { "--geometry", "fixed-arms:", "fixed-arms:60" },
        { "--geometry", "fixed-arms:170", "below 170" },
        { "--reference", "tile", "white-standard" },
        { "--threads", "0", "1 to 1024" },
        { "--threads", "-2", "1 to 1024" },
        { "--threads", "1.5", "1 to 1024" },
        { "--threads", "99999999999", "1 to 1024" },
    };

    [Theory]
    [MemberData(nameof(WrongValues))]
    public async Task A_wrong_value_is_refused_with_what_is_allowed(string option, string value, string words)
    {
        string line = await Refusal(option, value);

        Assert.StartsWith($"barbule: {option}: found '{value}'; allowed ", line, StringComparison.Ordinal);
        Assert.Contains(words, line, StringComparison.Ordinal);
    }

    /// <summary>Words after <c>predict FILE</c>, words of the message.</summary>
    public static TheoryData<string, string> WrongWords => new()
    {
        { "--angels 30", "did you mean --angles?" },
        { "--wavelength 300:780:1", "did you mean --wavelengths?" },
        { "--polarisation s", "did you mean --polarization?" },
        { "--angels=30", "did you mean --angles?" },
        { "--hepl", "did you mean --help?" },
        { "--quiet", "see barbule predict --help" },
        { "-x", "\"-x\"" },
        { "--angles", "--angles" },
        { "--out", "--out" },
        { "--solver grating --mixing bruggeman", "--mixing: found 'bruggeman' with --solver grating" },
        { "--mixing=mean-index --solver=grating", "--mixing: found 'mean-index' with --solver grating" },
        { "--angles 0 --angles 30", "--angles" },
        { "--wavelengths 300:399.999:0.001 --angles 0:30:1", "--angles: found 31 angles at 100000 wavelengths each" },
    };

    [Theory]
    [MemberData(nameof(WrongWords))]
    public async Task A_wrong_word_is_refused_with_a_hint(string words, string hint)
        => Assert.Contains(hint, await Refusal(words.Split(' ')), StringComparison.Ordinal);

    [Fact]
    public async Task Commands_and_names_that_are_not_there_are_refused_with_a_hint()
    {
        Assert.Equal("barbule: there is no command \"material\"; did you mean materials?", (await Barbule.Call("material")).Refusal(2));
        Assert.Equal("barbule: there is no command \"spectra\"; see barbule --help", (await Barbule.Call("spectra", "--angles", "30")).Refusal(2));
        Assert.Equal("barbule: there is no option \"--versoin\"; did you mean --version?", (await Barbule.Call("--versoin")).Refusal(2));
        Assert.Equal("barbule: there is no material \"keratine\"; did you mean keratin?", (await Barbule.Call("materials", "keratine")).Refusal(2));
        Assert.Contains("eumelanin", (await Barbule.Call("materials", "unobtainium")).Refusal(2), StringComparison.Ordinal);
        Assert.Contains("\"water\"", (await Barbule.Call("materials", "keratin", "water")).Refusal(2), StringComparison.Ordinal);
        Assert.Contains("FILE", (await Barbule.Call("predict")).Refusal(2), StringComparison.Ordinal);
        Assert.Equal("barbule: there is no option \"--material\"; did you mean --materials?", (await Barbule.Call("materials", "--material")).Refusal(2));
        Assert.Equal("barbule: FILE: found an empty name; allowed the name of a structure file", (await Barbule.Call("predict", "")).Refusal(2));
        Assert.Equal("barbule: --out: found an empty name; allowed the name of a folder", (await Barbule.Call("predict", "a.toml", "--out", "")).Refusal(2));
    }

    private static async Task<string> Refusal(params string[] words)
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write("cortex-over-sheet", folder.Path);
        string line = (await Barbule.Call(["predict", file, "--out", folder["out"], .. words])).Refusal(2);
        Assert.Equal(["cortex-over-sheet.toml"], folder.Content());
        return line;
    }
}
