using System.Text.Json;
using BarbuleOptics.Ensembles;

namespace BarbuleOptics.Files.Results;

/// <summary>A sensitivity analysis as JSON, without anything that differs from run to run.</summary>
public static class SensitivityJson
{
    /// <summary>Name of the file in an output folder.</summary>
    public const string FileName = "sensitivity.json";

    /// <summary>The analysis as one document, UTF-8.</summary>
    public static byte[] Write(AnalyzedStructure analyzed)
    {
        ArgumentNullException.ThrowIfNull(analyzed);
        return PredictionJson.Document(json => WriteAll(json, analyzed));
    }

    private static void WriteAll(Utf8JsonWriter json, AnalyzedStructure analyzed)
    {
        SensitivityResult result = analyzed.Result;
        json.WriteStartObject();
        PredictionJson.WriteProgram(json);
        PredictionJson.WriteFile(json, analyzed.Barbule.Name, analyzed.File, analyzed.Sha256, analyzed.Changes);
        json.WriteEndObject();
        json.WriteString("solver", result.Solver);
        json.WriteString("spread", SpreadNames.Of(result.Options.Spread));
        json.WriteNumber("seed", result.Options.Seed);
        json.WriteNumber("points", result.Points);
        json.WriteNumber("replicates", result.Replicates);
        json.WriteString("estimators", "first order: Saltelli et al. 2010, 10.1016/j.cpc.2009.09.018; total: Jansen 1999, 10.1016/S0010-4655(98)00154-4; hue by its unit vector");
        json.WriteStartArray("lengths");
        foreach (DrawnLength length in result.Lengths)
            DrawsJson.WriteLength(json, length);
        json.WriteEndArray();
        json.WriteStartArray("views");
        foreach (SensitivityView view in result.Views)
            WriteView(json, view);
        json.WriteEndArray();
        PredictionJson.WriteWarnings(json, result.Warnings);
        json.WriteEndObject();
    }

    private static void WriteView(Utf8JsonWriter json, SensitivityView view)
    {
        json.WriteStartObject();
        json.WriteNumber("incidence_deg", view.Incidence.Degrees);
        json.WriteNumber("peak_kept_share", view.KeptShare);
        json.WriteStartObject("outcomes");
        foreach (OutcomeShares outcome in view.Outcomes)
        {
            json.WriteStartObject(outcome.Name);
            json.WriteNumber("standard_deviation", outcome.StandardDeviation);
            json.WriteStartArray("inputs");
            foreach (InputShare input in outcome.Inputs)
            {
                json.WriteStartObject();
                json.WriteString("key", input.Key);
                json.WriteNumber("first_order", input.First);
                json.WriteNumber("first_order_error", input.FirstError);
                json.WriteNumber("total", input.Total);
                json.WriteNumber("total_error", input.TotalError);
                json.WriteEndObject();
            }
            json.WriteEndArray();
            json.WriteEndObject();
        }
        json.WriteEndObject();
        json.WriteEndObject();
    }
}
