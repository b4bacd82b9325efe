using System.Diagnostics;
using System.Text;
using BarbuleOptics.Cli;
using Xunit;

namespace BarbuleOptics.Tests.Cli;

/// <summary>The command, run as a process as a user does, or called within the test, which is some hundred times faster.</summary>
internal static class Barbule
{
    private const int LimitMs = 60_000;

    /// <summary>The folder that the command was built into, which a user runs it from; beside the tests its libraries are theirs.</summary>
    public static string Folder { get; } = Path.Combine(
        Repository.Root, "src", "BarbuleOptics.Cli", "bin", Path.GetFileName(Path.GetDirectoryName(Path.TrimEndingDirectorySeparator(AppContext.BaseDirectory)))!,
        Path.GetFileName(Path.TrimEndingDirectorySeparator(AppContext.BaseDirectory)));

    private static readonly string Program = Path.Combine(Folder, "barbule.dll");

    /// <summary>The runtime that runs the test runs the command, too.</summary>
    private static readonly string Runtime = Environment.ProcessPath is string path && Path.GetFileNameWithoutExtension(path) == "dotnet" ? path : "dotnet";

    /// <summary>The command as a shell runs it.</summary>
    public static string CommandLine => $"'{Runtime}' '{Program}'";

    /// <summary>Runs the command as a process.</summary>
    /// <param name="arguments">The words after <c>barbule</c>.</param>
    /// <param name="workingDirectory">Where relative paths start; that of the test when null.</param>
    /// <param name="environment">Variables set beside those of the test.</param>
    public static async Task<Outcome> Run(string[] arguments, string? workingDirectory = null, params (string Name, string Value)[] environment)
    {
        using Process process = Start(arguments, workingDirectory, environment);
        return await End(process);
    }

    /// <summary>Starts the command as a process.</summary>
    public static Process Start(string[] arguments, string? workingDirectory = null, params (string Name, string Value)[] environment)
    {
        var start = new ProcessStartInfo(Runtime, [Program, .. arguments])
        {
            WorkingDirectory = workingDirectory ?? "",
            RedirectStandardOutput = true,
            RedirectStandardError = true,
            StandardOutputEncoding = Encoding.UTF8,
            StandardErrorEncoding = Encoding.UTF8,
        };
        foreach ((string name, string value) in environment)
            start.Environment[name] = value;
        return Process.Start(start)!;
    }

    /// <summary>Waits for the end of a process.</summary>
    public static async Task<Outcome> End(Process process)
    {
        Task<string> output = process.StandardOutput.ReadToEndAsync(), error = process.StandardError.ReadToEndAsync();
        using var limit = new CancellationTokenSource(LimitMs);
        try
        {
            await process.WaitForExitAsync(limit.Token);
        }
        catch (OperationCanceledException)
        {
            process.Kill(entireProcessTree: true);
            Assert.Fail($"The command did not end within {LimitMs} ms.");
        }
        return new Outcome(process.ExitCode, await output, await error);
    }

    /// <summary>Calls the command within the test; paths start from the test's own folder.</summary>
    public static Task<Outcome> Call(params string[] arguments) => Call(default, arguments);

    /// <summary>Calls the command within the test, under a token that interrupts it.</summary>
    public static async Task<Outcome> Call(CancellationToken cancellation, params string[] arguments)
    {
        var output = new StringWriter { NewLine = "\n" };
        var error = new StringWriter { NewLine = "\n" };
        int exitCode = await BarbuleProgram.RunAsync(arguments, output, error, cancellation: cancellation);
        return new Outcome(exitCode, output.ToString(), error.ToString());
    }
}
