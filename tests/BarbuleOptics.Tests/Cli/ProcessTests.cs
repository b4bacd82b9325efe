using System.Diagnostics;
using BarbuleOptics.Figures;
using BarbuleOptics.Files;
using BarbuleOptics.Files.Results;
using BarbuleOptics.Tests.Files;
using BarbuleOptics.Tests.Samples;
using Xunit;

namespace BarbuleOptics.Tests.Cli;

/// <summary>The command as a process: what only a process shows.</summary>
public sealed class ProcessTests
{
    [Fact]
    public async Task Results_are_the_same_bytes_in_a_German_shell_on_one_thread_and_called_within()
    {
        using var folder = new TemporaryFolder();
        SampleFiles.Write("hollow-rods", folder.Path);
        string[] German(string threads, string into) => ["predict", "hollow-rods.toml", "--angles", "0,30.5", "--threads", threads, "--out", into];
        Outcome first = await Barbule.Run(German("1", "one"), folder.Path, ("LANG", "de_DE.UTF-8"), ("LC_ALL", "de_DE.UTF-8"));
        Outcome second = await Barbule.Run(German("2", "two"), folder.Path, ("LANG", "C"), ("LC_ALL", "C"));
        string path = folder["hollow-rods.toml"];
        (await Barbule.Call("predict", path, "--angles", "0,30.5", "--out", folder["three"])).Good();

        Assert.Equal(first.Good().Output.Replace("one/", "two/", StringComparison.Ordinal), second.Good().Output);
        Assert.Contains("Written into ", first.Output, StringComparison.Ordinal);
        string spectra = folder.Text("one/" + SpectraCsv.FileName), json = folder.Text("one/" + PredictionJson.FileName);
        Assert.Equal(spectra, folder.Text("two/" + SpectraCsv.FileName));
        Assert.Equal(spectra, folder.Text("three/" + SpectraCsv.FileName));
        Assert.Equal(json, folder.Text("two/" + PredictionJson.FileName));
        foreach (string name in PredictionFigures.FileNames)
        {
            byte[] figure = await File.ReadAllBytesAsync(folder["one/" + name], TestContext.Current.CancellationToken);
            Assert.Equal(figure, await File.ReadAllBytesAsync(folder["two/" + name], TestContext.Current.CancellationToken));
            Assert.Equal(figure, await File.ReadAllBytesAsync(folder["three/" + name], TestContext.Current.CancellationToken));
        }
        // The file as typed is the one thing that differs.
        Assert.Equal(json, folder.Text("three/" + PredictionJson.FileName).Replace(path, "hollow-rods.toml", StringComparison.Ordinal));
    }

    [Fact]
    public async Task Json_is_one_document_and_nothing_else()
    {
        using var folder = new TemporaryFolder();
        SampleFiles.Write("deep-multilayer", folder.Path);
        Outcome outcome = await Barbule.Run(["predict", "deep-multilayer.toml", "--json"], folder.Path);

        Assert.StartsWith("{", outcome.Good().Output, StringComparison.Ordinal);
        Assert.EndsWith("}\n", outcome.Output, StringComparison.Ordinal);
        Assert.Equal("deep-multilayer.toml", outcome.Json().GetProperty("structure").GetProperty("file").GetString());
        Assert.Equal(["deep-multilayer.toml"], folder.Content());
    }

    [Fact]
    public async Task A_wrong_file_ends_with_3_and_one_line_on_standard_error()
    {
        using var folder = new TemporaryFolder();
        await File.WriteAllTextAsync(folder["wrong.toml"], "format = 1\n[cortex]\nthickness = -5\n", TestContext.Current.CancellationToken);
        Outcome outcome = await Barbule.Run(["predict", "wrong.toml", "--out", "out"], folder.Path);

        Assert.StartsWith("wrong.toml:3:13: cortex.thickness: ", outcome.Refusal(3), StringComparison.Ordinal);
        Assert.Equal(["wrong.toml"], folder.Content());
    }

    [Fact]
    public async Task A_wrong_word_ends_with_2_and_a_hint()
        => Assert.Equal("barbule: there is no command \"predcit\"; did you mean predict?", (await Barbule.Run(["predcit", "x.toml"])).Refusal(2));

    [Fact]
    public async Task Version_names_the_program_and_where_the_licenses_are()
    {
        string[] lines = (await Barbule.Run(["--version"])).Good().Output.Split('\n');
        Assert.Equal([$"{ProgramIdentity.Name} {ProgramIdentity.Version}", "MIT license; licenses of the libraries within: THIRD-PARTY-NOTICES.txt, beside the program", ""], lines);
        Assert.True(File.Exists(Path.Combine(AppContext.BaseDirectory, "THIRD-PARTY-NOTICES.txt")));
    }

    // 130 is 128 and the number of the signal, SIGINT, as a shell reports it (POSIX.1-2017, Shell Command Language, 2.8.2: "greater than 128").
    [Theory]
    [InlineData("predict hollow-rods.toml --wavelengths 300:399.999:0.001 --angles 0:18:1 --out out", 1)]
    [InlineData("predict hollow-rods.toml --wavelengths 300:780:20 --draws 10000000 --out out", 2)]
    [InlineData("sensitivity hollow-rods.toml --wavelengths 300:780:20 --draws 10000000 --out out", 2)]
    public async Task An_interrupt_ends_with_130_and_writes_nothing(string words, int seconds)
    {
        Assert.SkipWhen(OperatingSystem.IsWindows(), "Windows has no kill.");
        using var folder = new TemporaryFolder();
        SampleFiles.Write("hollow-rods", folder.Path);
        using Process process = Barbule.Start(words.Split(' '), folder.Path);
        // By then it computes: start-up takes a fifth of a second.
        while (!process.HasExited && process.TotalProcessorTime < TimeSpan.FromSeconds(seconds))
            await Task.Delay(20, TestContext.Current.CancellationToken);
        OutsideProgram.Run(OutsideProgram.Find("kill", "procps"), folder.Path, Signal(process), process.Id.ToString(System.Globalization.CultureInfo.InvariantCulture));
        Outcome outcome = await Barbule.End(process);

        Assert.Equal("barbule: interrupted; nothing was written", outcome.Refusal(130));
        Assert.Equal(["hollow-rods.toml"], folder.Content());
    }

    // A shell starts what runs in the background with SIGINT ignored, and every process below inherits that; SIGTERM asks for the same end.
    private static string Signal(Process process)
    {
        string status = $"/proc/{process.Id}/status";
        string? ignored = File.Exists(status) ? File.ReadLines(status).FirstOrDefault(line => line.StartsWith("SigIgn:", StringComparison.Ordinal)) : null;
        const ulong Interrupt = 1UL << (2 - 1);
        return ignored is not null && (Convert.ToUInt64(ignored[7..].Trim(), 16) & Interrupt) != 0 ? "-TERM" : "-INT";
    }
}
