using System.Globalization;

namespace BarbuleOptics.Benchmarks.Coverage;

/// <summary>Prints how often the 95 % interval of the mean covers the truth: the table of DEVELOPERS.md.</summary>
internal static class CoverageProgram
{
    private static readonly int[] Units = [4, 8, 20];

    public static int Run(string[] words)
    {
        int studies = words.Length > 0 && int.TryParse(words[0], NumberStyles.None, CultureInfo.InvariantCulture, out int asked) ? asked : 2000;
        var study = new CoverageStudy();
        Console.WriteLine(string.Create(CultureInfo.InvariantCulture, $"Share of {studies} studies whose 95 % interval covers the truth, in percent (standard error {100 * Math.Sqrt(0.95 * 0.05 / studies):0.0}):"));
        Console.WriteLine();
        Console.WriteLine($"| n | {string.Join(" | ", CoverageStudy.Outcomes.Select(name => $"`{name}`"))} |");
        Console.WriteLine($"|---|{string.Concat(CoverageStudy.Outcomes.Select(_ => "---|"))}");
        foreach (int units in Units)
        {
            var covered = new int[CoverageStudy.Outcomes.Count];
            var gate = new Lock();
            Parallel.For(0, studies, number =>
            {
                bool[] covers = study.Covers(units, 100_000 * units + number);
                lock (gate)
                {
                    for (int i = 0; i < covers.Length; i++)
                        covered[i] += covers[i] ? 1 : 0;
                }
            });
            Console.WriteLine($"| {units} | {string.Join(" | ", covered.Select(count => (100.0 * count / studies).ToString("0.0", CultureInfo.InvariantCulture)))} |");
        }
        return 0;
    }
}
