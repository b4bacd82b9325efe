using System.Text.RegularExpressions;
using BarbuleOptics.Cli;
using BarbuleOptics.Color;
using BarbuleOptics.Tests.Files;
using BarbuleOptics.Tests.Samples;
using Xunit;

namespace BarbuleOptics.Tests.Cli;

/// <summary>Color swatches where the terminal can show them, and no escape byte where it cannot.</summary>
public sealed partial class TerminalTests
{
    private const char Escape = '\x1b';

    // NO_COLOR: "when present and not an empty string (regardless of its value), prevents the addition of ANSI color" (no-color.org).
    // COLORTERM=truecolor or 24bit: common practice, no source. TERM=dumb: terminfo(5), a terminal without capabilities.
    [Theory]
    [InlineData("TERM=xterm-256color COLORTERM=truecolor", "Full")]
    [InlineData("TERM=screen COLORTERM=24bit", "Full")]
    [InlineData("TERM=xterm-256color COLORTERM=truecolor NO_COLOR=", "Full")]
    [InlineData("TERM=xterm-256color", "Palette")]
    [InlineData("TERM=screen-256color COLORTERM=yes", "Palette")]
    [InlineData("TERM=xterm", "None")]
    [InlineData("TERM=xterm-256color COLORTERM=truecolor NO_COLOR=1", "None")]
    [InlineData("TERM=xterm-256color COLORTERM=truecolor NO_COLOR=0", "None")]
    [InlineData("TERM=dumb COLORTERM=truecolor", "None")]
    [InlineData("TERM= COLORTERM=truecolor", "None")]
    [InlineData("COLORTERM=truecolor", "None")]
    public void The_environment_decides_how_many_colors_are_shown(string variables, string depth)
    {
        var values = variables.Split(' ').Select(pair => pair.Split('=')).ToDictionary(pair => pair[0], pair => pair[1]);
        Assert.Equal(depth, TerminalColors.For(isRedirected: false, name => values.GetValueOrDefault(name)).Depth.ToString());
        Assert.False(TerminalColors.For(isRedirected: true, name => values.GetValueOrDefault(name)).AreShown);
    }

    // ECMA-48, 8.3.117 (SGR), and ISO 8613-6 for the parameters of 48: 2 is RGB, 5 a number of the palette (sections from memory).
    [Fact]
    public void Full_color_is_set_as_background_and_reset()
        => Assert.Equal("\x1b[48;2;26;143;124m   \x1b[0m", new TerminalColors(ColorDepth.Full).Block(new SrgbColor(26, 143, 124), 3));

    // xterm's 256 colors: 16 + 36 r + 6 g + b with levels 0, 95, 135, 175, 215, 255; 232 to 255 are grays 8, 18, ... 238 (256colres.pl of xterm, from memory).
    [Theory]
    [InlineData(0, 0, 0, 16)]
    [InlineData(255, 0, 0, 196)]
    [InlineData(0, 255, 0, 46)]
    [InlineData(0, 0, 255, 21)]
    [InlineData(255, 255, 255, 231)]
    [InlineData(95, 135, 175, 67)]
    [InlineData(128, 128, 128, 244)]
    [InlineData(8, 8, 8, 232)]
    [InlineData(238, 238, 238, 255)]
    [InlineData(120, 118, 119, 243)]
    [InlineData(250, 100, 10, 202)]
    public void The_palette_gives_the_nearest_of_its_colors(byte red, byte green, byte blue, int number)
        => Assert.Equal($"\x1b[48;5;{number}m  \x1b[0m", new TerminalColors(ColorDepth.Palette).Block(new SrgbColor(red, green, blue), 2));

    [Fact]
    public void A_swatch_stands_before_each_code_and_has_its_color()
    {
        string[] plain = Table(TerminalColors.None), colored = Table(new TerminalColors(ColorDepth.Full));
        Assert.DoesNotContain(plain, line => line.Contains(Escape, StringComparison.Ordinal));
        string[] rows = [.. colored.Where(line => line.Contains(Escape, StringComparison.Ordinal))];
        Assert.Equal(3, rows.Length);
        foreach (string row in rows)
        {
            MatchCollection swatches = Swatch().Matches(row);
            Assert.Equal(2, swatches.Count);
            Assert.All(swatches, swatch => Assert.Equal(
                Convert.FromHexString(swatch.Groups[4].Value), swatch.Groups.Cast<Group>().Skip(1).Take(3).Select(group => byte.Parse(group.Value, System.Globalization.CultureInfo.InvariantCulture))));
        }
        // Without the swatches the table says the same.
        Assert.Equal(plain.Select(Words), colored.Select(line => Words(Sequence().Replace(line, ""))));
    }

    [Fact]
    public async Task A_terminal_gets_colors_and_a_pipe_none()
    {
        using var folder = new TemporaryFolder();
        SampleFiles.Write("cortex-over-sheet", folder.Path);
        string[] run = ["predict", "cortex-over-sheet.toml", "--wavelengths", "360:780:5"];
        (string, string)[] terminal = [("TERM", "xterm-256color"), ("COLORTERM", "truecolor"), ("NO_COLOR", "")];
        Outcome piped = await Barbule.Run(run, folder.Path, terminal);
        Assert.DoesNotContain(Escape, piped.Good().Output);

        string script = OutsideProgram.Find("script", "bsdutils");
        string shown = OutsideProgram.Run(
            script, folder.Path, "-qec", $"TERM=xterm-256color COLORTERM=truecolor NO_COLOR= {Barbule.CommandLine} {string.Join(' ', run)}", "/dev/null");
        Assert.Matches(Swatch(), shown);
        string silenced = OutsideProgram.Run(
            script, folder.Path, "-qec", $"TERM=xterm-256color COLORTERM=truecolor NO_COLOR=1 {Barbule.CommandLine} {string.Join(' ', run)}", "/dev/null");
        Assert.DoesNotMatch(Swatch(), silenced);
    }

    // Minutes of work, which end with the reader: once the terminal has shown the first line nobody listens any more.
    [Fact]
    public void A_long_calculation_shows_how_far_it_is_on_a_terminal()
    {
        using var folder = new TemporaryFolder();
        SampleFiles.Write("hollow-rods", folder.Path);
        string run = $"{Barbule.CommandLine} predict hollow-rods.toml --wavelengths 300:700:0.01 --angles 0,10,20,30,40,50,60,70 --accuracy 1e-9 --threads 1";
        string script = OutsideProgram.Find("script", "bsdutils");
        string shown = OutsideProgram.Begin(script, folder.Path, 60, "-qefc", run, "/dev/null");
        Assert.Matches(@"\rhollow-rods\.toml: \d+ %", shown);
    }

    // A clock on which a second passes at each glance makes any calculation long.
    [Fact]
    public async Task A_long_calculation_takes_its_line_away()
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write("hollow-rods", folder.Path);
        StringWriter terminal = new(), output = new();
        int exitCode = await BarbuleProgram.RunAsync(
            ["predict", file, "--wavelengths", "500:700:5", "--json"], output, TextWriter.Null, progress: new ProgressLine(terminal, new HastyClock()),
            cancellation: TestContext.Current.CancellationToken);
        Assert.Equal(0, exitCode);
        Assert.Matches(@"^\r[^\r]*hollow-rods\.toml: \d+ %[^\r]*\r", terminal.ToString());
        Assert.Matches(@"\r +\r$", terminal.ToString());
        Assert.DoesNotContain(" %", output.ToString(), StringComparison.Ordinal);
    }

    [Fact]
    public void Warnings_come_last_and_what_holds_of_several_angles_is_said_once()
    {
        string[] lines = Table(TerminalColors.None);
        int first = Array.FindIndex(lines, line => line.StartsWith("Warning ", StringComparison.Ordinal));
        Assert.All(lines[first..], line => Assert.True(line.Length == 0 || line.StartsWith("Warning ", StringComparison.Ordinal) || line.StartsWith("  ", StringComparison.Ordinal), line));
        string[] codes = [.. lines.Where(line => line.StartsWith("Warning ", StringComparison.Ordinal)).Select(line => line.Split(' ')[1].TrimEnd(':'))];
        Assert.Contains("orders-in-matrix", codes);
        // A spectrum may rise at one end at some angles and at the other at others.
        string[] once = [.. codes.Where(code => code != "peak-at-edge")];
        Assert.Equal(once.Distinct(), once);
        Assert.Contains(lines, line => line.StartsWith("Warning orders-in-matrix at 30 and 60 degrees: up to ", StringComparison.Ordinal));
        Assert.Contains(lines, line => line.StartsWith("Warning index-extrapolated: the index of keratin and eumelanin was published for ", StringComparison.Ordinal));
    }

    private static string[] Table(TerminalColors colors)
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write("hollow-rods", folder.Path);
        var output = new StringWriter { NewLine = "\n" };
        int exitCode = BarbuleProgram.RunAsync(
            ["predict", file, "--wavelengths", "300:780:5", "--angles", "0,30,60", "--accuracy", "1e-3"], output, TextWriter.Null, colors, cancellation: TestContext.Current.CancellationToken)
            .GetAwaiter().GetResult();
        Assert.Equal(0, exitCode);
        return output.ToString().Replace(folder.Path, "", StringComparison.Ordinal).Split('\n');
    }

    private static string Words(string line) => string.Join(' ', line.Split(' ', StringSplitOptions.RemoveEmptyEntries));

    private sealed class HastyClock : TimeProvider
    {
        private long _seconds;

        public override long TimestampFrequency => 1;

        public override long GetTimestamp() => Interlocked.Increment(ref _seconds);
    }

    [GeneratedRegex(@"\x1b\[48;2;(\d+);(\d+);(\d+)m +\x1b\[0m #([0-9a-f]{6})")]
    private static partial Regex Swatch();

    [GeneratedRegex(@"\x1b\[[0-9;]*m")]
    private static partial Regex Sequence();
}
