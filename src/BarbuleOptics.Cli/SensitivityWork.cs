using System.Text;
using BarbuleOptics.Ensembles;
using BarbuleOptics.Figures;
using BarbuleOptics.Files;
using BarbuleOptics.Files.Results;
using BarbuleOptics.Prediction;

namespace BarbuleOptics.Cli;

/// <summary>Carries out <c>barbule sensitivity</c>.</summary>
internal sealed class SensitivityWork(SensitivityRequest request, TextWriter output, TextWriter error, ProgressLine progress)
{
    private static readonly string[] ResultNames = [SensitivityCsv.FileName, SensitivityJson.FileName, .. SensitivityFigures.FileNames];

    public int Execute(CancellationToken cancellation)
    {
        try
        {
            return Run(cancellation);
        }
        catch (OperationCanceledException)
        {
            error.WriteLine("barbule: interrupted; nothing was written");
            return ExitCode.Interrupted;
        }
        catch (OutputException fault)
        {
            error.WriteLine(fault.Message);
            return ExitCode.OutputFailed;
        }
    }

    private int Run(CancellationToken cancellation)
    {
        FileResult<MaterialCatalog> catalog = EmbeddedMaterials.WithFolder(request.MaterialFolder);
        if (!catalog.Succeeded)
            return Refuse(catalog.Problems);
        if (!request.SeenBy.TryApply(request.Conditions, out PredictionConditions? conditions, out IReadOnlyList<FileProblem> problems))
            return Refuse(problems);
        FileResult<LoadedStructure> read = StructureFile.Read(request.File, catalog.Value, request.Sets);
        if (!read.Succeeded)
            return Refuse(read.Problems);
        if (request.OutputFolder is not null)
            OutputFolder.Check(request.OutputFolder, ResultNames, request.Force);
        LoadedStructure loaded = read.Value;
        if (Analyze(loaded, conditions, cancellation) is not SensitivityResult result)
            return ExitCode.WrongInput;

        var analyzed = new AnalyzedStructure(request.File, loaded.Sha256, loaded.Barbule, result, request.Sets);
        if (request.OutputFolder is not null)
            OutputFolder.Write(request.OutputFolder, [.. Results(analyzed)], request.Force, [], cancellation);
        if (request.Json)
            output.Write(Encoding.UTF8.GetString(SensitivityJson.Write(analyzed)));
        else
            SensitivityTable.Write(analyzed, loaded.Notes, request.OutputFolder is null ? [] : ResultNames, request.OutputFolder, output);
        return ExitCode.Done;
    }

    private SensitivityResult? Analyze(LoadedStructure loaded, PredictionConditions conditions, CancellationToken cancellation)
    {
        progress.Begin(request.File);
        try
        {
            SensitivityAnalysis.TryAnalyze(loaded.Barbule, conditions, request.Draws, loaded.Catalog, out SensitivityResult? result, out var problems, progress, cancellation);
            if (result is null)
                Refuse([.. problems.Select(loaded.Locate)]);
            return result;
        }
        finally
        {
            progress.End();
        }
    }

    private IEnumerable<OutputFile> Results(AnalyzedStructure analyzed)
    {
        yield return new OutputFile(SensitivityCsv.FileName, stream => SensitivityCsv.Write(analyzed.Result, stream));
        yield return OutputFile.FromBytes(SensitivityJson.FileName, SensitivityJson.Write(analyzed));
        foreach ((string name, byte[] bytes) in SensitivityFigures.Render(analyzed.Result, analyzed.Barbule.Name, request.FigureSize))
            yield return OutputFile.FromBytes(name, bytes);
    }

    private int Refuse(IReadOnlyList<FileProblem> problems)
    {
        foreach (FileProblem problem in problems)
            error.WriteLine(problem);
        return ExitCode.WrongInput;
    }
}
