using System.Text.Json;
using Xunit;

namespace BarbuleOptics.Tests.Cli;

/// <summary>What a run of the command left behind.</summary>
internal sealed record Outcome(int ExitCode, string Output, string Error)
{
    /// <summary>Lines on standard error.</summary>
    public string[] ErrorLines => Error.Split('\n', StringSplitOptions.RemoveEmptyEntries);

    /// <summary>This, when the run ended well; fails the test otherwise.</summary>
    public Outcome Good()
    {
        Assert.True(ExitCode == 0 && Error.Length == 0, $"exit {ExitCode}: {Error}");
        return this;
    }

    /// <summary>The one line of a refusal: nothing on standard output, no exception's text.</summary>
    public string Refusal(int exitCode)
    {
        Assert.True(ExitCode == exitCode, $"exit {ExitCode} in place of {exitCode}: {Error}{Output}");
        Assert.Equal("", Output);
        string line = Assert.Single(ErrorLines);
        Assert.DoesNotContain("Exception", line, StringComparison.Ordinal);
        Assert.DoesNotContain("   at ", line, StringComparison.Ordinal);
        return line;
    }

    /// <summary>Standard output as one JSON document.</summary>
    public JsonElement Json() => JsonDocument.Parse(Good().Output).RootElement;
}
