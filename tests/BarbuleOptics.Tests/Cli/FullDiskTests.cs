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
