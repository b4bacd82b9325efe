using System.Text.Json;
using BarbuleOptics.Anatomy;
using BarbuleOptics.Ensembles;

namespace BarbuleOptics.Files.Results;

/// <summary>What is not known, and the factors that correct lengths, as blocks of a prediction.</summary>
internal static class UnknownsJson
{
    /// <summary>Writes <c>unknowns</c>; null where everything is known.</summary>
    public static void Write(Utf8JsonWriter json, UnknownReach? reach)
    {
        if (reach is null)
        {
            json.WriteNull("unknowns");
            return;
        }
        json.WriteStartObject("unknowns");
        json.WriteNumber("combinations", reach.Points);
        json.WriteStartArray("views");
        foreach (UnknownView view in reach.Views)
        {
            json.WriteStartObject();
            json.WriteNumber("incidence_deg", view.Incidence.Degrees);
            json.WriteStartArray("reachable_hue_terms");
            foreach (TermShare term in view.ReachableTerms)
                json.WriteStringValue(term.Term);
            json.WriteEndArray();
            json.WriteStartArray("sweeps");
            foreach (UnknownSweep sweep in view.Sweeps)
                WriteSweep(json, sweep);
            json.WriteEndArray();
            json.WriteEndObject();
        }
        json.WriteEndArray();
        json.WriteEndObject();
    }

    /// <summary>Writes <c>corrections</c>, the central value of each factor; null where there are none.</summary>
    public static void WriteCorrections(Utf8JsonWriter json, Barbule barbule)
    {
        (string Key, MeasuredFactor Factor, string Unit)[] factors = [.. MeasuredFactors.Of(barbule)];
        if (factors.Length == 0)
        {
            json.WriteNull("corrections");
            return;
        }
        json.WriteStartObject("corrections");
        foreach ((string key, MeasuredFactor factor, _) in factors)
            json.WriteNumber(key, factor.Central);
        json.WriteEndObject();
    }

    private static void WriteSweep(Utf8JsonWriter json, UnknownSweep sweep)
    {
        json.WriteStartObject();
        json.WriteString("key", sweep.Key);
        json.WriteString("unit", sweep.Unit);
        json.WriteStartArray("points");
        foreach (UnknownPoint point in sweep.Points)
        {
            json.WriteStartObject();
            json.WriteNumber("value", point.Value);
            PredictionJson.WriteOptional(json, "peak_nm", point.PeakNm);
            PredictionJson.WriteOptional(json, "h_deg", point.HueDegrees);
            PredictionJson.WriteOptional(json, "C", point.Chroma);
            json.WriteString("term", point.Term);
            json.WriteEndObject();
        }
        json.WriteEndArray();
        json.WriteEndObject();
    }
}
