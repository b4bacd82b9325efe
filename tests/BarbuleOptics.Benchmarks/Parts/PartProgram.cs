using BenchmarkDotNet.Running;

namespace BarbuleOptics.Benchmarks.Parts;

/// <summary>Times single parts of the kernels by BenchmarkDotNet.</summary>
internal static class PartProgram
{
    /// <summary>Runs it.</summary>
    /// <param name="words">Options of BenchmarkDotNet; a short job of everything where there are none.</param>
    public static int Run(string[] words)
    {
        BenchmarkSwitcher.FromTypes([typeof(FilmParts)]).Run(words.Length == 0 ? ["--filter", "*", "--job", "short"] : words);
        return 0;
    }
}
