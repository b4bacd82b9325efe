using System.Globalization;
using BarbuleOptics.Ensembles;
using BarbuleOptics.Files;
using BarbuleOptics.Files.Results;

namespace BarbuleOptics.Cli;

/// <summary>Variance shares as a table for a person.</summary>
internal static class SensitivityTable
{
    private static readonly Dictionary<string, string> Names = new() { ["peak_nm"] = "peak wavelength", ["h_deg"] = "hue angle", ["C"] = "chroma" };

    public static void Write(AnalyzedStructure analyzed, IReadOnlyList<FileNote> notes, IReadOnlyList<string> written, string? folder, TextWriter output)
    {
        SensitivityResult result = analyzed.Result;
        output.WriteLine($"{analyzed.Barbule.Name}  ({analyzed.File})");
        output.WriteLine(string.Create(CultureInfo.InvariantCulture, $"{result.Solver} solver, spread {SpreadNames.Of(result.Options.Spread)}, {result.Points} points of {InputCount(result) + 2} draws, seed {result.Options.Seed}"));
        foreach (SensitivityView view in result.Views)
        {
            foreach (OutcomeShares outcome in view.Outcomes)
                Write(view, outcome, output);
        }
        output.WriteLine();
        foreach (string line in Remarks(result).Concat(notes.Select(note => $"Warning {note.Code}: {note}.")).Concat(WarningLines.Of(result.Warnings)))
            PredictionTable.Wrap(line, output);
        if (folder is not null)
            PredictionTable.Wrap($"Written into {OneLine.Escape(Path.TrimEndingDirectorySeparator(folder))}{Path.DirectorySeparatorChar}: {string.Join(", ", written)}.", output);
        output.WriteLine();
    }

    private static void Write(SensitivityView view, OutcomeShares outcome, TextWriter output)
    {
        int width = Math.Max(12, outcome.Inputs.Max(input => input.Key.Length));
        string unit = outcome.Name == "peak_nm" ? " nm" : outcome.Name == "h_deg" ? " deg" : "";
        output.WriteLine();
        output.WriteLine($"{Names[outcome.Name]} at {Text(view.Incidence.Degrees, "0.##")} degrees, standard deviation {Text(outcome.StandardDeviation, "0.##")}{unit}");
        output.WriteLine($"  {"measurement".PadRight(width)}   alone        with others");
        foreach (InputShare input in outcome.Inputs)
            output.WriteLine($"  {input.Key.PadRight(width)}{Share(input.First, input.FirstError)}{Share(input.Total, input.TotalError)}");
    }

    private static IEnumerable<string> Remarks(SensitivityResult result)
    {
        yield return "'alone' is the share of the variance that would go were the measurement known exactly (first order), 'with others' the share that would stay were all others known (total), in percent, with standard errors.";
        if (result.Views[0].Outcomes.FirstOrDefault(outcome => outcome.Name == "h_deg") is { Inputs.Count: > 1 } hue)
            yield return $"For the hue, measure {hue.Inputs[0].Key} better; {hue.Inputs[^1].Key} matters least.";
        if (result.Views.Any(view => view.KeptShare < 1))
            yield return string.Create(CultureInfo.InvariantCulture, $"The peak is followed from the mean geometry; {100 * (1 - result.Views.Min(view => view.KeptShare)):0.#} % of the points, in which a draw loses it, are left out of its shares.");
    }

    private static int InputCount(SensitivityResult result) => result.Views.SelectMany(view => view.Outcomes).Select(outcome => outcome.Inputs.Count).DefaultIfEmpty(0).Max();

    private static string Share(double share, double error) => string.Create(CultureInfo.InvariantCulture, $"{100 * share,8:0.0} +- {100 * error,-4:0.0}");

    private static string Text(double value, string format) => value.ToString(format, CultureInfo.InvariantCulture);
}
