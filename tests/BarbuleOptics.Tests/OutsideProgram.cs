using System.Diagnostics;
using Xunit;

namespace BarbuleOptics.Tests;

/// <summary>Runs programs that are no part of this project, to compare with what they compute.</summary>
/// <remarks>A missing program skips the test on a contributor's machine and fails it where the environment variable CI is "true".</remarks>
internal static class OutsideProgram
{
    private const int LimitMs = 30_000;

    /// <summary>The full path of <paramref name="name"/> on the PATH; ends the test as skipped (or failed, see above) without it.</summary>
    public static string Find(string name, string package)
    {
        string? path = (Environment.GetEnvironmentVariable("PATH") ?? "").Split(Path.PathSeparator)
            .Select(folder => Path.Combine(folder, name)).FirstOrDefault(File.Exists);
        string reason = $"The program {name} (Debian package {package}) is not on the PATH.";
        bool mustRun = string.Equals(Environment.GetEnvironmentVariable("CI"), "true", StringComparison.OrdinalIgnoreCase);
        if (path is null && mustRun)
            Assert.Fail(reason);
        Assert.SkipUnless(path is not null, reason);
        return path!;
    }

    /// <summary>Runs the program to its end and returns its standard output; any exit code but 0 fails the test.</summary>
    public static string Run(string program, string workingDirectory, params string[] arguments)
    {
        var start = new ProcessStartInfo(program, arguments)
        {
            WorkingDirectory = workingDirectory,
            RedirectStandardOutput = true,
            RedirectStandardError = true,
        };
        using Process process = Process.Start(start)!;
        Task<string> output = process.StandardOutput.ReadToEndAsync();
        Task<string> errors = process.StandardError.ReadToEndAsync();
        if (!process.WaitForExit(LimitMs))
        {
            process.Kill(entireProcessTree: true);
            Assert.Fail($"{program} did not end within {LimitMs} ms.");
        }

        Assert.True(process.ExitCode == 0, $"{program} ended with {process.ExitCode}: {errors.Result} {output.Result}");
        return output.Result;
    }

    /// <summary>Runs the program until it has written so many characters to its standard output, returns them and ends it.</summary>
    public static string Begin(string program, string workingDirectory, int length, params string[] arguments)
    {
        var start = new ProcessStartInfo(program, arguments) { WorkingDirectory = workingDirectory, RedirectStandardOutput = true };
        using Process process = Process.Start(start)!;
        try
        {
            var characters = new char[length];
            Task<int> reading = process.StandardOutput.ReadBlockAsync(characters, 0, length);
            Assert.True(reading.Wait(LimitMs, TestContext.Current.CancellationToken), $"{program} wrote less than {length} characters within {LimitMs} ms.");
            return new string(characters, 0, reading.Result);
        }
        finally
        {
            process.Kill(entireProcessTree: true);
            process.WaitForExit();
        }
    }
}
