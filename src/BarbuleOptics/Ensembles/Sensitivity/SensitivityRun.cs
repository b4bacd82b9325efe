using System.Collections.Concurrent;
using BarbuleOptics.Ensembles.Draws;
using BarbuleOptics.Ensembles.Sequences;
using BarbuleOptics.Prediction;

namespace BarbuleOptics.Ensembles.Sensitivity;

/// <summary>Solves the points that variance shares need: A, B and A with one input of B, for every input.</summary>
/// <remarks>A and B are the halves of one scrambled point of twice the dimensions. Points are solved in any order and taken in by their numbers.</remarks>
internal sealed class SensitivityRun
{
    /// <summary>Points solved before they are taken in.</summary>
    private const int RoundLength = 64;

    private const int MostReplicates = 8;
    private const int LeastOfReplicate = 8;

    private readonly DrawSetup _setup;
    private readonly PredictionConditions _conditions;
    private readonly int[][] _inputs;
    private readonly ScrambledNet[] _nets;

    /// <param name="setup">The structure, ready to be drawn.</param>
    /// <param name="conditions">How it is looked at.</param>
    /// <param name="inputs">Dimensions of each input.</param>
    /// <param name="points">Number of base points.</param>
    /// <param name="seed">Names the scramblings.</param>
    public SensitivityRun(DrawSetup setup, PredictionConditions conditions, int[][] inputs, int points, ulong seed)
    {
        (_setup, _conditions, _inputs, Points) = (setup, conditions, inputs, points);
        int replicates = Math.Clamp(points / LeastOfReplicate, 1, MostReplicates);
        _nets = [.. Enumerable.Range(0, replicates).Select(replicate => new ScrambledNet(2 * setup.Plan.Dimensions, (points + replicates - 1) / replicates, Bits.Key(seed, (ulong)replicate)))];
        Shares = [.. Enumerable.Range(0, conditions.Incidences.Count).Select(_ => OutcomeKinds.All.Select(kind => Enumerable.Range(0, replicates + 1).Select(_ => new VarianceShares(inputs.Length, kind.Components)).ToArray()).ToArray())];
    }

    /// <summary>Number of base points.</summary>
    public int Points { get; }

    /// <summary>Number of independent scramblings.</summary>
    public int Replicates => _nets.Length;

    /// <summary>Of each angle and outcome the shares of each replicate, those of all points last.</summary>
    public VarianceShares[][][] Shares { get; }

    /// <summary>Solves them all.</summary>
    public void Run(IProgress<double>? progress, CancellationToken cancellation)
    {
        int angles = _conditions.Incidences.Count, draws = _inputs.Length + 2, wavelengths = _conditions.Wavelengths.Count;
        var rounds = Enumerable.Range(0, RoundLength).Select(_ => new DrawRound(draws, angles, wavelengths, _setup.Reader.Outcomes.Count, _setup.Plan.Slots.Length)).ToArray();
        var workers = new ConcurrentBag<(DrawWorker Worker, double[] Both, double[] One)>();
        var options = new ParallelOptions { MaxDegreeOfParallelism = _conditions.Threads, CancellationToken = cancellation };
        int done = 0;
        for (int first = 0; first < Points; first += RoundLength)
        {
            int count = Math.Min(RoundLength, Points - first), start = first;
            Parallel.ForEach(Partitioner.Create(Enumerable.Range(0, count), EnumerablePartitionerOptions.NoBuffering), options, place =>
            {
                if (!workers.TryTake(out (DrawWorker Worker, double[] Both, double[] One) scratch))
                {
                    scratch = (new DrawWorker(_setup.Plan, _setup.Solver, _setup.Reader, _setup.Followers, _conditions.Wavelengths),
                        new double[2 * _setup.Plan.Dimensions], new double[_setup.Plan.Dimensions]);
                }
                _nets[(start + place) % _nets.Length].Point((start + place) / _nets.Length, scratch.Both);
                Solve(scratch.Worker, scratch.Both, scratch.One, rounds[place], cancellation);
                workers.Add(scratch);
                progress?.Report((double)Interlocked.Increment(ref done) / Points);
            });
            for (int place = 0; place < count; place++)
                TakeIn(rounds[place], (start + place) % _nets.Length);
        }
        foreach (VarianceShares shares in Shares.SelectMany(outcomes => outcomes).SelectMany(replicates => replicates))
            shares.Close();
    }

    private void Solve(DrawWorker worker, double[] both, double[] one, DrawRound round, CancellationToken cancellation)
    {
        ReadOnlySpan<double> a = both.AsSpan(0, one.Length), b = both.AsSpan(one.Length);
        worker.Draw(a, round, 0);
        worker.Draw(b, round, 1);
        for (int input = 0; input < _inputs.Length; input++)
        {
            cancellation.ThrowIfCancellationRequested();
            a.CopyTo(one);
            foreach (int dimension in _inputs[input])
                one[dimension] = b[dimension];
            worker.Draw(one, round, 2 + input);
        }
    }

    private void TakeIn(DrawRound round, int replicate)
    {
        for (int angle = 0; angle < Shares.Length; angle++)
        {
            for (int outcome = 0; outcome < OutcomeKinds.All.Count; outcome++)
            {
                OutcomeKind kind = OutcomeKinds.All[outcome];
                var values = new double[(_inputs.Length + 2) * kind.Components];
                for (int draw = 0; draw < _inputs.Length + 2; draw++)
                    kind.Fill(round.OutcomeAt(draw, angle, kind.Place), values.AsSpan(draw * kind.Components, kind.Components));
                Shares[angle][outcome][replicate].Add(values);
                Shares[angle][outcome][^1].Add(values);
            }
        }
    }
}
