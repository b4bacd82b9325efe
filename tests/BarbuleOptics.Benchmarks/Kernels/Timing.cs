using System.Diagnostics;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Benchmarks.Kernels;

/// <summary>What one workload reached at one width on some threads: medians over the runs.</summary>
/// <param name="Workload">The workload.</param>
/// <param name="Threads">Number of threads, each with a pass of its own.</param>
/// <param name="Width">Vector width.</param>
/// <param name="IsForced">Whether that is not the processor's own.</param>
/// <param name="PerSecond">Points or solves a second, of all threads together.</param>
/// <param name="PeakShare">Share of the peak of all threads; null where operations are not counted.</param>
/// <param name="LargestError">Largest error of the answers.</param>
internal sealed record Timing(Workload Workload, int Threads, LaneWidth Width, bool IsForced, double PerSecond, double? PeakShare, double LargestError)
{
    /// <summary>Runs until code is compiled for good and caches are warm, and least length of a run, in seconds.</summary>
    private const double WarmSeconds = 0.6, RunSeconds = 0.03;

    /// <summary>Times a workload.</summary>
    public static Timing Of(Workload workload, LaneWidth width, bool isForced, int threads, int runs)
    {
        Action[] passes = [.. Enumerable.Range(0, threads).Select(_ => workload.CreatePass(width))];
        long start = Stopwatch.GetTimestamp();
        int done = 0;
        for (; Stopwatch.GetElapsedTime(start).TotalSeconds < WarmSeconds || done < 2; done++)
            Run(passes, 1);
        start = Stopwatch.GetTimestamp();
        Run(passes, 1);
        int repeats = (int)Math.Ceiling(RunSeconds / Stopwatch.GetElapsedTime(start).TotalSeconds);
        var rates = new List<double>();
        var shares = new List<double>();
        for (int run = 0; run < runs; run++)
        {
            // The peak of just before, for a shared processor changes its pace.
            double peak = FmaPeak.Measure();
            start = Stopwatch.GetTimestamp();
            Run(passes, repeats);
            rates.Add(repeats * threads * workload.CountOfPass / Stopwatch.GetElapsedTime(start).TotalSeconds);
            shares.Add(rates[^1] * (workload.OperationsOfPoint ?? 0) / (threads * peak));
        }
        return new Timing(
            workload, threads, width, isForced, Median(rates), workload.OperationsOfPoint is null ? null : Median(shares), workload.LargestError(width));
    }

    private static void Run(Action[] passes, int repeats)
    {
        if (passes.Length == 1)
        {
            Repeat(passes[0], repeats);
            return;
        }
        Thread[] threads = [.. passes.Select(pass => new Thread(() => Repeat(pass, repeats)))];
        foreach (Thread thread in threads)
            thread.Start();
        foreach (Thread thread in threads)
            thread.Join();
    }

    private static void Repeat(Action pass, int repeats)
    {
        for (int i = 0; i < repeats; i++)
            pass();
    }

    private static double Median(List<double> values)
    {
        values.Sort();
        return values[values.Count / 2];
    }
}
