using System.Diagnostics;
using BarbuleOptics.Tests.Files;
using BarbuleOptics.Tests.Samples;
using Xunit;

namespace BarbuleOptics.Tests.Cli;

/// <summary>A disk without room, made of memory; needs the right to mount one.</summary>
public sealed class FullDiskTests
{
    [Fact]
    public async Task A_full_disk_ends_with_exit_5_one_line_and_nothing_left_behind()
    {
        using var folder = new TemporaryFolder();
        string disk = folder["disk"];
        Directory.CreateDirectory(disk);
        Assert.SkipUnless(OperatingSystem.IsLinux() && await Run("mount", "-t", "tmpfs", "-o", "size=16k", "tmpfs", disk), "A small disk cannot be mounted here (not root, or not Linux).");
        try
        {
            Outcome outcome = await Barbule.Call("predict", SampleFiles.Write("hollow-rods", folder.Path), "--out", Path.Combine(disk, "results"));
            Assert.Contains("no space is left", outcome.Refusal(5), StringComparison.Ordinal);
            Assert.Empty(Directory.EnumerateFileSystemEntries(disk));
        }
        finally
        {
            Assert.True(await Run("umount", disk));
        }
    }

    [Theory]
    [InlineData("--version")]
    [InlineData("materials")]
    public async Task A_full_standard_output_ends_with_exit_5_and_one_line(string words)
    {
        Assert.SkipUnless(File.Exists("/dev/full"), "There is no /dev/full here.");
        using Process process = Process.Start(new ProcessStartInfo("bash", ["-c", $"{Barbule.CommandLine} {words} > /dev/full"]) { RedirectStandardError = true })!;
        string error = await process.StandardError.ReadToEndAsync(TestContext.Current.CancellationToken);
        await process.WaitForExitAsync(TestContext.Current.CancellationToken);
        Assert.Equal((5, "barbule: standard output cannot be written: no space is left on the disk\n"), (process.ExitCode, error));
    }

    [Fact]
    public async Task A_folder_that_cannot_be_made_is_refused_before_the_work_in_words_of_our_own()
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write("hollow-rods", folder.Path);
        // A million points would take a minute.
        Outcome outcome = await Barbule.Call("predict", file, "--wavelengths", "300:780:0.01", "--angles", "0:80:4", "--out", Path.Combine(file, "below"));
        Assert.Equal($"{file}: is a file, not a folder", outcome.Refusal(5));
    }

    private static async Task<bool> Run(string program, params string[] arguments)
    {
        try
        {
            using Process process = Process.Start(new ProcessStartInfo(program, arguments) { RedirectStandardError = true })!;
            await process.WaitForExitAsync(TestContext.Current.CancellationToken);
            return process.ExitCode == 0;
        }
        catch (System.ComponentModel.Win32Exception)
        {
            return false;
        }
    }
}
