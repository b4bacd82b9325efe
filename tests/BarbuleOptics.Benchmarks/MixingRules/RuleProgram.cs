namespace BarbuleOptics.Benchmarks.MixingRules;

/// <summary>The program that judges the mixing rules.</summary>
internal static class RuleProgram
{
    public static int Run(string[] words)
    {
        var structures = new PlausibleStructures(1);
        Console.WriteLine(structures.Next(0).Text);
        return words.Length == 0 ? 0 : 2;
    }
}
