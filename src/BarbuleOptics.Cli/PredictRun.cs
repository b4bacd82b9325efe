using System.Text;
using BarbuleOptics.Anatomy;
using BarbuleOptics.Ensembles;
using BarbuleOptics.Figures;
using BarbuleOptics.Files;
using BarbuleOptics.Files.Results;
using BarbuleOptics.Prediction;

namespace BarbuleOptics.Cli;

/// <summary>Carries out <c>barbule predict</c>, file after file: each is read and solved before any of its results is written.</summary>
internal sealed class PredictRun(PredictRequest request, TextWriter output, TextWriter error, TerminalColors colors, ProgressLine progress)
{
    /// <summary>Most wavelengths times angles of one file: 2 million are a table of 0.6 GB.</summary>
    private const int MostPoints = 2_000_000;

    /// <summary>Most wavelengths times angles of draws, each of which has a histogram.</summary>
    private const int MostDrawnPoints = 50_000;

    /// <summary>Files that only draws fill.</summary>
    private static readonly string[] DrawNames = [BandsCsv.FileName, .. EnsembleFigures.FileNames];

    /// <summary>Files that only the grating solver fills.</summary>
    private static readonly string[] GratingNames = [OrdersCsv.FileName, AbsorptionCsv.FileName];

    /// <summary>Files that belong to one way of solving or looking, and are no results of another.</summary>
    private static readonly string[] OptionalNames = [.. GratingNames, SignalCsv.FileName, .. DrawNames, UnknownsCsv.FileName];

    private static readonly string[] ResultNames = [SpectraCsv.FileName, PredictionJson.FileName, .. PredictionFigures.FileNames];

    private PredictionConditions _conditions = request.Conditions;
    private bool _inputWrong;
    private bool _ourFault;
    private int _written;

    public int Execute(CancellationToken cancellation)
    {
        try
        {
            return Run(cancellation);
        }
        catch (OperationCanceledException)
        {
            error.WriteLine($"barbule: interrupted; {(_written == 0 ? "nothing was written" : $"the results of {_written} of {request.Files.Count} files were written")}");
            return ExitCode.Interrupted;
        }
    }

    private int Run(CancellationToken cancellation)
    {
        if (!HasRoom() || !TryFolders(out string[]? folders))
            return ExitCode.WrongCommandLine;
        FileResult<MaterialCatalog> catalog = EmbeddedMaterials.WithFolder(request.MaterialFolder);
        if (!catalog.Succeeded)
            return Refuse(catalog.Problems);
        if (!request.SeenBy.TryApply(request.Conditions, out PredictionConditions? conditions, out IReadOnlyList<FileProblem> problems))
            return Refuse(problems);
        _conditions = conditions;
        if (folders is not null && !TryReserve(folders))
            return ExitCode.OutputFailed;

        var done = new List<PredictedStructure>();
        for (int i = 0; i < request.Files.Count; i++)
        {
            if (TryFile(request.Files[i], catalog.Value, cancellation) is not (PredictedStructure predicted, LoadedStructure loaded))
                continue;
            if (request.Json)
                done.Add(predicted);
            if (folders is not null)
            {
                if (!TryWrite(folders[i], predicted, cancellation))
                    return ExitCode.OutputFailed;
                _written++;
            }
            if (!request.Json)
                Print(predicted, loaded, folders?[i]);
        }
        if (request.Json && done.Count > 0)
            PrintJson(done);
        return _ourFault ? ExitCode.OurFault : _inputWrong ? ExitCode.WrongInput : ExitCode.Done;
    }

    /// <summary>One file; a fault of ours in it does not stop the others.</summary>
    private (PredictedStructure Predicted, LoadedStructure Loaded)? TryFile(string file, MaterialCatalog catalog, CancellationToken cancellation)
    {
        try
        {
            return Predict(file, catalog, cancellation);
        }
#pragma warning disable CA1031 // Whatever goes wrong in one file, the user gets the others.
        catch (Exception fault) when (fault is not OperationCanceledException)
#pragma warning restore CA1031
        {
            error.WriteLine(OneLine.Escape($"{file}: {BarbuleProgram.Describe(fault)}"));
            _ourFault = true;
            return null;
        }
    }

    private (PredictedStructure Predicted, LoadedStructure Loaded)? Predict(string file, MaterialCatalog catalog, CancellationToken cancellation)
    {
        FileResult<LoadedStructure> read = StructureFile.Read(file, catalog, request.Sets);
        if (!read.Succeeded)
        {
            Refuse(read.Problems);
            return null;
        }
        LoadedStructure loaded = read.Value;
        StructurePrediction? prediction;
        IReadOnlyList<AnatomyProblem> problems;
        EnsemblePrediction? ensemble = null;
        UnknownReach? unknowns = null;
        try
        {
            progress.Begin(file);
            Predictor.TryPredict(loaded.Barbule, _conditions, loaded.Catalog, out prediction, out problems, progress, cancellation);
            if (prediction is not null)
                unknowns = UnknownReach.Of(loaded.Barbule, _conditions, loaded.Catalog, cancellation);
            if (prediction is not null && request.Draws is not null)
            {
                progress.End();
                progress.Begin($"{file}, {request.Draws.Draws} draws");
                EnsemblePredictor.TryPredict(loaded.Barbule, _conditions, request.Draws, loaded.Catalog, out ensemble, out problems, progress, cancellation);
            }
        }
        finally
        {
            progress.End();
        }
        if (prediction is null || (ensemble is null && request.Draws is not null))
        {
            Refuse([.. problems.Select(loaded.Locate)]);
            return null;
        }
        return (new PredictedStructure(file, loaded.Sha256, prediction, request.Sets) { Draws = ensemble, Unknowns = unknowns }, loaded);
    }

    private int Refuse(IReadOnlyList<FileProblem> problems)
    {
        foreach (FileProblem problem in problems)
            error.WriteLine(problem);
        _inputWrong = true;
        return ExitCode.WrongInput;
    }

    private void Print(PredictedStructure predicted, LoadedStructure loaded, string? folder)
    {
        PredictionTable.Write(predicted, loaded.Notes, output, colors);
        if (folder is not null)
            PredictionTable.Wrap($"Written into {OneLine.Escape(Path.TrimEndingDirectorySeparator(folder))}{Path.DirectorySeparatorChar}: {string.Join(", ", [.. ResultNames, .. Filled(predicted)])}.", output);
        output.WriteLine();
    }

    private void PrintJson(List<PredictedStructure> done)
    {
        byte[] document = request.Files.Count == 1 ? PredictionJson.Write(done[0]) : PredictionJson.Write(done);
        output.Write(Encoding.UTF8.GetString(document));
    }

    private bool HasRoom()
    {
        int wavelengths = request.Conditions.Wavelengths.Count, angles = request.Conditions.Incidences.Count;
        int most = request.Draws is null ? MostPoints : MostDrawnPoints;
        if ((long)wavelengths * angles <= most)
            return true;
        error.WriteLine($"barbule: --angles: found {angles} angles at {wavelengths} wavelengths each; allowed {most} in all{(request.Draws is null ? "" : " with --draws")}");
        return false;
    }

    /// <summary>One FILE writes into the folder itself, several into a folder each, named for the file.</summary>
    private bool TryFolders(out string[]? folders)
    {
        folders = null;
        if (request.OutputFolder is not string folder)
            return true;
        if (request.Files.Count == 1)
        {
            folders = [folder];
            return true;
        }
        string[] names = [.. request.Files.Select(file => Path.GetFileNameWithoutExtension(file))];
        IGrouping<string, string>? equal = names.GroupBy(name => name, StringComparer.OrdinalIgnoreCase).FirstOrDefault(group => group.Count() > 1);
        if (equal is not null)
        {
            error.WriteLine($"barbule: --out: found {equal.Count()} files named {OneLine.Quote(equal.Key)}; allowed one, since each file's results go into a folder of its name");
            return false;
        }
        folders = [.. names.Select(name => Path.Combine(folder, name))];
        return true;
    }

    /// <summary>Refuses before any work what could not be written after it.</summary>
    private bool TryReserve(string[] folders)
        => TryOutput(() =>
        {
            foreach (string folder in folders)
                OutputFolder.Check(folder, [.. ResultNames, .. OptionalNames], request.Force);
        });

    // Files of an earlier run that this one has nothing for are not left beside its own.
    private bool TryWrite(string folder, PredictedStructure predicted, CancellationToken cancellation)
        => TryOutput(() => OutputFolder.Write(folder, [.. Results(predicted, cancellation)], request.Force, [.. OptionalNames.Except(Filled(predicted))], cancellation));

    /// <summary>The optional files that this run fills.</summary>
    private static string[] Filled(PredictedStructure predicted) =>
    [
        .. predicted.Prediction.IsRigorous ? GratingNames : [], .. predicted.Prediction.Conditions.Instrument is null ? [] : (string[])[SignalCsv.FileName],
        .. predicted.Draws is null ? [] : DrawNames, .. predicted.Unknowns is null ? [] : (string[])[UnknownsCsv.FileName],
    ];


    private IEnumerable<OutputFile> Results(PredictedStructure predicted, CancellationToken cancellation)
    {
        yield return new OutputFile(SpectraCsv.FileName, stream => SpectraCsv.Write(predicted.Prediction, stream));
        yield return OutputFile.FromBytes(PredictionJson.FileName, PredictionJson.Write(predicted));
        if (predicted.Prediction.IsRigorous)
        {
            yield return new OutputFile(OrdersCsv.FileName, stream => OrdersCsv.Write(predicted.Prediction, stream));
            yield return new OutputFile(AbsorptionCsv.FileName, stream => AbsorptionCsv.Write(predicted.Prediction, stream));
        }
        if (predicted.Unknowns is UnknownReach unknowns)
            yield return new OutputFile(UnknownsCsv.FileName, stream => UnknownsCsv.Write(unknowns, stream));
        if (predicted.Draws is EnsemblePrediction ensemble)
        {
            yield return new OutputFile(BandsCsv.FileName, stream => BandsCsv.Write(ensemble, stream));
            foreach ((string name, byte[] bytes) in EnsembleFigures.Render(predicted.Prediction, ensemble, request.FigureSize))
                yield return OutputFile.FromBytes(name, bytes);
        }
        if (predicted.Prediction.Conditions.Instrument is not null)
            yield return new OutputFile(SignalCsv.FileName, stream => SignalCsv.Write(predicted.Prediction, stream));
        foreach ((string name, byte[] bytes) in PredictionFigures.Render(predicted.Prediction, request.FigureSize, request.Overlays, cancellation))
            yield return OutputFile.FromBytes(name, bytes);
    }

    private bool TryOutput(Action write)
    {
        try
        {
            write();
            return true;
        }
        catch (OutputException fault)
        {
            error.WriteLine(fault.Message);
            return false;
        }
    }
}
