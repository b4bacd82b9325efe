using System.Text.Json;
using BarbuleOptics.Ensembles;
using BarbuleOptics.Ensembles.Statistics;
using BarbuleOptics.Multilayer;

namespace BarbuleOptics.Files.Results;

/// <summary>Draws as the block <c>draws</c> of a prediction.</summary>
internal static class DrawsJson
{
    /// <summary>Writes the block; null where none were made.</summary>
    public static void Write(Utf8JsonWriter json, EnsemblePrediction? ensemble)
    {
        if (ensemble is null)
        {
            json.WriteNull("draws");
            return;
        }
        json.WriteStartObject("draws");
        json.WriteNumber("count", ensemble.Options.Draws);
        json.WriteString("spread", SpreadNames.Of(ensemble.Options.Spread));
        json.WriteNumber("seed", ensemble.Options.Seed);
        json.WriteNumber("replicates", ensemble.Replicates);
        json.WriteNumber("solved", ensemble.Solved);
        json.WriteNumber("error_estimate", ensemble.ErrorEstimate);
        PredictionJson.WriteOptional(json, "effective_degrees_of_freedom", ensemble.EffectiveDegrees);
        json.WriteStartArray("lengths");
        foreach (DrawnLength length in ensemble.Lengths)
            WriteLength(json, length);
        json.WriteEndArray();
        json.WriteStartArray("views");
        foreach (DrawnView view in ensemble.Views)
            WriteView(json, view);
        json.WriteEndArray();
        PredictionJson.WriteWarnings(json, ensemble.Warnings);
        json.WriteEndObject();
    }

    internal static void WriteLength(Utf8JsonWriter json, DrawnLength length)
    {
        json.WriteStartObject();
        json.WriteString("key", length.Key);
        json.WriteString("unit", length.Unit);
        json.WriteNumber("center", length.Center);
        json.WriteNumber("deviation", length.Deviation);
        json.WriteString("law", length.Law);
        json.WriteNumber("truncated_share", length.TruncatedShare);
        json.WriteNumber("bias", length.Bias);
        json.WriteEndObject();
    }

    private static void WriteView(Utf8JsonWriter json, DrawnView view)
    {
        json.WriteStartObject();
        json.WriteNumber("incidence_deg", view.Incidence.Degrees);
        json.WriteString("polarization", PolarizationNames.Of(view.Polarization));
        PredictionJson.WriteOptional(json, "followed_peak_nm", view.FollowedPeakNm);
        json.WriteNumber("peak_lost_share", view.PeakLostShare);
        json.WriteNumber("other_peak_highest_share", view.OtherPeakShare);
        json.WriteStartObject("values");
        foreach ((string name, DrawnValue value) in view.Values)
            WriteValue(json, name, value);
        json.WriteEndObject();
        WriteTerms(json, "hue_terms", view.Terms);
        json.WriteStartArray("melanin_constants");
        foreach (MelaninTerms melanin in view.Melanins)
        {
            json.WriteStartObject();
            json.WriteString("material", melanin.Material);
            json.WriteNumber("count", melanin.Draws);
            PredictionJson.WriteOptional(json, "h_deg", melanin.HueDegrees);
            WriteTerms(json, "hue_terms", melanin.Terms);
            json.WriteEndObject();
        }
        json.WriteEndArray();
        PredictionJson.WriteOptional(json, "largest_disagreement", view.LargestDisagreement);
        WriteMean(json, view);
        json.WriteNumber("band_median_error", view.Bands.MedianError);
        json.WriteNumber("band_end_error", view.Bands.EndError);
        json.WriteEndObject();
    }

    private static void WriteValue(Utf8JsonWriter json, string name, DrawnValue value)
    {
        json.WriteStartObject(name);
        json.WriteNumber("median", value.Median);
        PredictionJson.WriteNumbers(json, "interval_50", value.From50, value.To50);
        PredictionJson.WriteNumbers(json, "interval_95", value.From95, value.To95);
        json.WriteNumber("mean", value.Mean);
        json.WriteNumber("standard_deviation", value.StandardDeviation);
        json.WriteNumber("share", value.Share);
        json.WriteNumber("median_error", value.MedianError);
        PredictionJson.WriteNumbers(json, "interval_95_error", value.From95Error, value.To95Error);
        json.WriteNumber("mean_error", value.MeanError);
        json.WriteEndObject();
    }

    private static void WriteTerms(Utf8JsonWriter json, string name, IEnumerable<TermShare> terms)
    {
        json.WriteStartArray(name);
        foreach (TermShare term in terms)
        {
            json.WriteStartObject();
            json.WriteString("term", term.Term);
            json.WriteNumber("probability", term.Share);
            json.WriteNumber("error", term.Error);
            json.WriteEndObject();
        }
        json.WriteEndArray();
    }

    /// <summary>What an instrument sees that takes in all draws at once.</summary>
    private static void WriteMean(Utf8JsonWriter json, DrawnView view)
    {
        json.WriteStartObject("mean_spectrum");
        PredictionJson.WriteOptional(json, "peak_nm", view.MeanFeatures.MainPeak?.WavelengthNm);
        PredictionJson.WriteOptional(json, "peak_reflectance", view.MeanFeatures.MainPeak?.Reflectance);
        PredictionJson.WriteOptional(json, "half_prominence_width_nm", view.MeanFeatures.MainPeak?.HalfProminenceWidthNm);
        if (view.MeanColor is { } color)
            PredictionJson.WriteNumbers(json, "LCh", color.Lab.L, color.Lab.Chroma, color.Lab.HueDegrees);
        else
            json.WriteNull("LCh");
        json.WriteString("hue_term", view.MeanColor?.HueTerm);
        json.WriteEndObject();
    }
}
