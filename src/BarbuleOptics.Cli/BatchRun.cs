using System.Collections.Concurrent;
using System.Text;
using BarbuleOptics.Anatomy;
using BarbuleOptics.Ensembles;
using BarbuleOptics.Files;
using BarbuleOptics.Files.Specimens;
using BarbuleOptics.Prediction;

namespace BarbuleOptics.Cli;

/// <summary>Carries out <c>barbule batch</c>: specimens side by side on all processors, each into a part file, then all parts into the results.</summary>
internal sealed class BatchRun(BatchRequest request, TextWriter output, TextWriter error, ProgressLine progress)
{
    private static readonly string[] ResultNames = [PredictionsCsv.FileName, SpectraParquet.FileName, FailedCsv.FileName, BatchJson.FileName];

    private readonly PartFolder _parts = new(request.OutputFolder);
    private PredictionConditions _conditions = request.Conditions;

    public int Execute(CancellationToken cancellation)
    {
        FileResult<MaterialCatalog> catalog = EmbeddedMaterials.WithFolder(request.MaterialFolder);
        if (!catalog.Succeeded)
            return Refuse(catalog.Problems);
        if (!request.SeenBy.TryApply(request.Conditions, out PredictionConditions? conditions, out IReadOnlyList<FileProblem> problems))
            return Refuse(problems);
        _conditions = conditions;
        FileResult<SpecimenTable> table = SpecimenTable.Read(request.Table, catalog.Value, request.Sets);
        if (!table.Succeeded)
            return Refuse(table.Problems);
        try
        {
            return Run(table.Value, cancellation);
        }
        catch (OutputException fault)
        {
            error.WriteLine(fault.Message);
            return ExitCode.OutputFailed;
        }
    }

    private int Run(SpecimenTable table, CancellationToken cancellation)
    {
        string common = BatchKeys.Common(request);
        string[] keys = [.. table.Rows.Select(row => BatchKeys.Of(common, request.Table, row))];
        string key = BatchKeys.Hash(string.Join('\n', [common, table.Sha256, .. keys]));
        bool continues = request.Resume && _parts.Exists;
        if (request.Resume && !continues && FinishedFailures(table, key) is int failures)
        {
            output.WriteLine($"Nothing is left to do: {OneLine.Escape(request.OutputFolder)} holds the results of this table and these options.");
            return failures > 0 ? ExitCode.SomeFailed : ExitCode.Done;
        }
        if (!request.Resume && _parts.Exists && !request.Force)
            throw new OutputException(OutputFault.Exists, $"{OneLine.Escape(_parts.Location)}: exists, of a run that was interrupted; --resume continues it, --force starts afresh");
        OutputFolder.Check(request.OutputFolder, ResultNames, request.Force || continues);
        if (!request.Resume)
            RemoveParts();
        _parts.Make();
        if (!TrySolve(table, keys, cancellation))
            return ExitCode.Interrupted;
        int failed = Write(table, keys, key, continues);
        RemoveParts();
        Print(table, failed);
        return failed > 0 ? ExitCode.SomeFailed : ExitCode.Done;
    }

    /// <summary>Number of failed specimens where the folder holds the finished results of this very run; null where it does not.</summary>
    private int? FinishedFailures(SpecimenTable table, string key)
    {
        if (!ResultNames.All(name => File.Exists(Path.Combine(request.OutputFolder, name))))
            return null;
        return Enumerable.Range(0, table.Rows.Count + 1).Select(failed => (int?)failed).FirstOrDefault(failed => Document(table, failed!.Value, key).StandsIn(request.OutputFolder));
    }

    private BatchJson Document(SpecimenTable table, int failed, string key) => new(request.Table, table.Sha256, request.Options, table.Rows.Count, failed, key);

    /// <summary>Solves what no earlier run left; what is in flight when the work is interrupted is finished and kept.</summary>
    private bool TrySolve(SpecimenTable table, string[] keys, CancellationToken cancellation)
    {
        int[] open = [.. Enumerable.Range(0, keys.Length).Where(i => _parts.TryRead(keys[i]) is null)];
        int threads = Math.Max(1, Math.Min(_conditions.Threads, open.Length)), done = 0;
        PredictionConditions own = _conditions with { Threads = Math.Max(1, _conditions.Threads / threads) };
        Exception? fault = null;
        progress.Begin($"{request.Table}, {open.Length} specimens");
        try
        {
            var options = new ParallelOptions { MaxDegreeOfParallelism = threads };
            Parallel.ForEach(Partitioner.Create(open, EnumerablePartitionerOptions.NoBuffering), options, (i, loop) =>
            {
                if (cancellation.IsCancellationRequested)
                {
                    loop.Stop();
                    return;
                }
                try
                {
                    _parts.Keep(keys[i], Solve(table.Rows[i], own));
                }
                catch (OutputException full)
                {
                    fault = full;
                    loop.Stop();
                }
                progress.Report((double)Interlocked.Increment(ref done) / open.Length);
            });
        }
        finally
        {
            progress.End();
        }
        if (fault is not null)
            throw fault;
        int kept = keys.Length - open.Length + done;
        if (!cancellation.IsCancellationRequested || kept == keys.Length)
            return true;
        error.WriteLine($"barbule: interrupted; {kept} of {keys.Length} specimens are done and kept; the same command with --resume continues");
        return false;
    }

    /// <summary>One specimen; whatever goes wrong in it does not stop the others.</summary>
    private SpecimenPart Solve(SpecimenRow row, PredictionConditions conditions)
    {
        if (row.Structure.Value is not LoadedStructure loaded)
            return SpecimenPart.Failed(row, row.Structure.Problems);
        try
        {
            EnsemblePrediction? ensemble = null;
            bool succeeds = Predictor.TryPredict(loaded.Barbule, conditions, loaded.Catalog, out StructurePrediction? prediction, out IReadOnlyList<AnatomyProblem> problems)
                && (request.Draws is null || EnsemblePredictor.TryPredict(loaded.Barbule, conditions, request.Draws, loaded.Catalog, out ensemble, out problems));
            return succeeds ? SpecimenPart.Of(row.Name, prediction!, ensemble) : SpecimenPart.Failed(row, [.. problems.Select(loaded.Locate)]);
        }
#pragma warning disable CA1031 // Whatever goes wrong in one specimen, the user gets the others.
        catch (Exception fault)
#pragma warning restore CA1031
        {
            return SpecimenPart.Failed(row, [new FileProblem(new SourceLocation(request.Table, row.Number, 1), null, BarbuleProgram.Describe(fault))]);
        }
    }

    /// <summary>Puts the parts together in the order of the table; returns the number that failed.</summary>
    private int Write(SpecimenTable table, string[] keys, string key, bool continues)
    {
        string[][] problems = [.. keys.Select(one => Part(one).Problems.ToArray()).Where(lines => lines.Length > 0)];
        foreach (string line in problems.SelectMany(lines => lines))
            error.WriteLine(line);
        int failed = problems.Length;
        OutputFile[] files =
        [
            new(PredictionsCsv.FileName, stream => WriteText(stream, PredictionsCsv.Header(_conditions, request.Draws is not null), keys.Select(one => Part(one).Predictions))),
            new(SpectraParquet.FileName, stream => SpectraParquet.Write(keys.Select(Part), stream)),
            new(FailedCsv.FileName, stream => WriteText(stream, FailedCsv.Header, keys.Select(one => Part(one).Failures))),
            OutputFile.FromBytes(BatchJson.FileName, Document(table, failed, key).Write()),
        ];
        OutputFolder.Write(request.OutputFolder, files, request.Force || continues, [], CancellationToken.None);
        return failed;
    }

    private SpecimenPart Part(string key)
        => _parts.TryRead(key) ?? throw new OutputException(OutputFault.NotWritable, $"{OneLine.Escape(_parts.Location)}: a part is gone that was written; the same command with --resume makes it again");

    private static void WriteText(Stream stream, string header, IEnumerable<string> texts)
    {
        foreach (string text in texts.Prepend(header))
            stream.Write(Encoding.UTF8.GetBytes(text));
    }

    private void RemoveParts()
    {
        if (Directory.Exists(request.OutputFolder))
            _parts.Remove(ResultNames);
    }

    private void Print(SpecimenTable table, int failed)
    {
        output.WriteLine($"Written into {OneLine.Escape(Path.TrimEndingDirectorySeparator(request.OutputFolder))}{Path.DirectorySeparatorChar}: {string.Join(", ", ResultNames)}.");
        output.WriteLine($"{table.Rows.Count - failed} of {table.Rows.Count} specimens were predicted{(failed > 0 ? $"; {failed} failed, {FailedCsv.FileName} says why" : "")}.");
    }

    private int Refuse(IReadOnlyList<FileProblem> problems)
    {
        foreach (FileProblem problem in problems)
            error.WriteLine(problem);
        return ExitCode.WrongInput;
    }
}
