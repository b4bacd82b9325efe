using System.Globalization;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Benchmarks.Kernels;

/// <summary>Times the kernels as a whole and prints a table, or a JSON object a line.</summary>
internal static class KernelProgram
{
    /// <summary>Runs of which the median counts.</summary>
    private const int Runs = 9;

    private const string Usage = "kernels [--list | --json] [NAME...]: NAME is a workload; all of them where none is named";

    /// <summary>Runs it.</summary>
    /// <param name="words">--json, and the workloads wanted.</param>
    public static int Run(string[] words)
    {
        if (words.Contains("--list"))
        {
            foreach (Workload workload in Workload.All)
                Console.WriteLine(workload.Name);
            return 0;
        }
        bool json = words.Contains("--json");
        string[] names = [.. words.Where(word => word != "--json")];
        if (names.FirstOrDefault(name => Workload.All.All(workload => workload.Name != name)) is string unknown)
        {
            Console.Error.WriteLine($"No workload '{unknown}'. {Usage}; there are {string.Join(", ", Workload.All.Select(workload => workload.Name))}.");
            return 2;
        }
        if (!json)
            Console.WriteLine($"{"workload",-26}{"threads",8}{"width",7}{"points/s",12}{"us/solve",10}{"error",9}{"of peak",9}");
        foreach (Workload workload in Workload.All.Where(workload => names.Length == 0 || names.Contains(workload.Name)))
        {
            foreach (Timing timing in Timings(workload))
                Console.WriteLine(json ? Json(timing) : Line(timing));
        }
        return 0;
    }

    private static IEnumerable<Timing> Timings(Workload workload)
    {
        yield return Timing.Of(workload, LaneWidth.Default, isForced: false, threads: 1, Runs);
        if (Environment.ProcessorCount > 1)
            yield return Timing.Of(workload, LaneWidth.Default, isForced: false, threads: 2, Runs);
        foreach (LaneWidth width in LaneWidth.All.Where(width => workload.TakesWidth && width != LaneWidth.Default))
            yield return Timing.Of(workload, width, isForced: true, threads: 1, Runs);
    }

    private static string Json(Timing timing) => string.Create(CultureInfo.InvariantCulture,
        $$"""{"workload": "{{timing.Workload.Name}}", "threads": {{timing.Threads}}, "points_per_second": {{Number(Points(timing), "0.000e0")}}, "microseconds_per_solve": {{Number(Solve(timing), "0.###")}}, "max_error": {{Number(timing.LargestError, "0.0e0")}}, "width": {{timing.Width.Bits}}, "forced": {{(timing.IsForced ? "true" : "false")}}, "fma_peak_share": {{Number(timing.PeakShare, "0.000")}}}""");

    private static string Line(Timing timing) => string.Create(CultureInfo.InvariantCulture,
        $"{timing.Workload.Name,-26}{timing.Threads,8}{timing.Width.Bits,7}{Number(Points(timing), "0.00e0", "-"),12}{Number(Solve(timing), "0.00", "-"),10}{Number(timing.LargestError, "0.0e0"),9}{Number(timing.PeakShare, "0.00", "-"),9}");

    private static double? Points(Timing timing) => timing.Workload.CountsPoints ? timing.PerSecond : null;

    private static double? Solve(Timing timing) => timing.Workload.CountsPoints ? null : 1e6 * timing.Threads / timing.PerSecond;

    private static string Number(double? value, string format, string otherwise = "null") => value?.ToString(format, CultureInfo.InvariantCulture) ?? otherwise;
}
