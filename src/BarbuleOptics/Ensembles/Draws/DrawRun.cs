using System.Collections.Concurrent;
using BarbuleOptics.Ensembles.Sequences;
using BarbuleOptics.Ensembles.Spreads;
using BarbuleOptics.Layering;
using BarbuleOptics.Prediction;

namespace BarbuleOptics.Ensembles.Draws;

/// <summary>All draws of one structure: solved in rounds on several threads, taken in column by column in their order.</summary>
/// <remarks>Draw d is point d / R of replicate d mod R, R independent scramblings. Which thread solved a draw leaves no trace: every column takes draws in by their
/// numbers, and the ranges of histograms come from the first round.</remarks>
internal sealed class DrawRun
{
    /// <summary>Draws of a round.</summary>
    private const int RoundLength = 1024;

    /// <summary>Draws that a thread takes at once.</summary>
    private const int BlockLength = 8;

    /// <summary>Numbers a round may hold: 64 MB.</summary>
    private const int MostInRound = 8_000_000;

    /// <summary>Bins that all histograms of reflectance may have: 64 MB.</summary>
    private const int MostBins = 16_000_000;

    private const int MostReplicates = 16;
    private const int LeastOfReplicate = 8;

    private readonly DrawPlan _plan;
    private readonly DrawSolver _solver;
    private readonly OutcomeReader _reader;
    private readonly PeakFollower[] _followers;
    private readonly PredictionConditions _conditions;
    private readonly ScrambledNet[] _nets;
    private readonly DrawRound _round;
    private readonly int _roundLength;
    private readonly long[] _movedCounts;
    private readonly double[] _movedSums;

    public DrawRun(DrawPlan plan, DrawSolver solver, OutcomeReader reader, PeakFollower[] followers, PredictionConditions conditions, long draws, ulong seed)
    {
        (_plan, _solver, _reader, _followers, _conditions, Draws) = (plan, solver, reader, followers, conditions, draws);
        int replicates = ReplicatesOf(draws), angles = conditions.Incidences.Count, wavelengths = conditions.Wavelengths.Count;
        _nets = [.. Enumerable.Range(0, replicates).Select(replicate => new ScrambledNet(plan.Dimensions, (draws + replicates - 1) / replicates, Bits.Key(seed, (ulong)replicate)))];
        _roundLength = (int)Math.Clamp(Math.Min(MostInRound / ((long)angles * wavelengths), draws), 1, RoundLength);
        _round = new DrawRound(_roundLength, angles, wavelengths, reader.Outcomes.Count, plan.Slots.Length);
        (_movedCounts, _movedSums) = (new long[plan.Slots.Length], new double[plan.Slots.Length]);
        int bins = Math.Clamp(MostBins / (replicates * angles * wavelengths), 32, 256);
        Views = [.. Enumerable.Range(0, angles).Select(angle => new ViewColumns(angle, replicates, wavelengths, reader.Outcomes, bins))];
    }

    /// <summary>Number of draws.</summary>
    public long Draws { get; }

    /// <summary>Number of independent scramblings.</summary>
    public int Replicates => _nets.Length;

    /// <summary>What was taken in, angle by angle.</summary>
    public IReadOnlyList<ViewColumns> Views { get; }

    /// <summary>Largest error estimate of the draws that were solved.</summary>
    public double LargestError { get; private set; }

    /// <summary>Number of replicates for a number of draws.</summary>
    public static int ReplicatesOf(long draws) => (int)Math.Clamp(draws / LeastOfReplicate, 1, MostReplicates);

    /// <summary>For a length, how many draws of it had to be moved, and the mean change of all draws, in nm.</summary>
    public (long Count, double BiasNm) Moved(int slot) => (_movedCounts[slot], _movedSums[slot] / Draws);

    /// <summary>Draws them all.</summary>
    /// <param name="progress">Told the share done; null for nobody.</param>
    /// <param name="cancellation">Ends the work early.</param>
    public void Run(IProgress<double>? progress, CancellationToken cancellation)
    {
        var options = new ParallelOptions { MaxDegreeOfParallelism = _conditions.Threads, CancellationToken = cancellation };
        var workers = new ConcurrentBag<DrawWorker>();
        long done = 0;
        for (long first = 0; first < Draws; first += _roundLength)
        {
            int count = (int)Math.Min(_roundLength, Draws - first), blocks = (count + BlockLength - 1) / BlockLength;
            long start = first;
            Parallel.ForEach(Partitioner.Create(Enumerable.Range(0, blocks), EnumerablePartitionerOptions.NoBuffering), options, block =>
            {
                if (!workers.TryTake(out DrawWorker? worker))
                    worker = new DrawWorker(_plan, _solver, _reader, _followers, _conditions.Wavelengths);
                int end = Math.Min(count, (block + 1) * BlockLength);
                for (int place = block * BlockLength; place < end; place++)
                {
                    cancellation.ThrowIfCancellationRequested();
                    worker.Draw(_nets[(start + place) % _nets.Length], (start + place) / _nets.Length, _round, place);
                }
                workers.Add(worker);
                progress?.Report((double)Interlocked.Add(ref done, end - block * BlockLength) / Draws);
            });
            Fold(options, start, count);
        }
    }

    private void Fold(ParallelOptions options, long first, int count)
    {
        int columns = Views[0].Count;
        Parallel.For(0, Views.Count * columns, options, column => Views[column / columns].Fold(column % columns, _round, first, count));
        for (int place = 0; place < count; place++)
        {
            if (_round.Errors[place] <= GratingResponses.MostError)
                LargestError = Math.Max(LargestError, _round.Errors[place]);
            ReadOnlySpan<double> moved = _round.Moved(place);
            for (int slot = 0; slot < moved.Length; slot++)
            {
                _movedSums[slot] += moved[slot];
                if (Math.Abs(moved[slot]) > SectionBuilder.TouchingNm)
                    _movedCounts[slot]++;
            }
        }
    }
}
