using BarbuleOptics.Benchmarks.Coverage;
using BarbuleOptics.Benchmarks.Kernels;
using BarbuleOptics.Benchmarks.MixingRules;
using BarbuleOptics.Benchmarks.Parts;
using BarbuleOptics.Benchmarks.Rows;

namespace BarbuleOptics.Benchmarks;

/// <summary>Programs that take minutes and so are no tests: what they print goes into the documentation.</summary>
internal static class Program
{
    private static readonly Dictionary<string, (string About, Func<string[], int> Run)> Programs = new()
    {
        ["coverage"] = ("how often the 95 % interval of the mean covers the truth; prints the table of DEVELOPERS.md", CoverageProgram.Run),
        ["rules"] = ("how far each mixing rule is from the rigorous solution; prints the README's tables", RuleProgram.Run),
        ["rows"] = ("what a solve of five staggered rows of rods costs and how far it is from a far finer run", RowsProgram.Run),
        ["kernels"] = ("points and solves a second of the kernels as a whole, and their share of the processor's peak", KernelProgram.Run),
        ["parts"] = ("the kernels' parts by BenchmarkDotNet, with its options", PartProgram.Run),
    };

    private static int Main(string[] words)
    {
        if (words.Length > 0 && Programs.TryGetValue(words[0], out var program))
            return program.Run(words[1..]);
        Console.Error.WriteLine("Which program?");
        foreach ((string name, (string about, _)) in Programs)
            Console.Error.WriteLine($"  {name,-8} {about}");
        return 2;
    }
}
