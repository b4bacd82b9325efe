using System.Text.Json;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra;
using BarbuleOptics.Vision;

namespace BarbuleOptics.Files.Results;

/// <summary>The parts of a prediction that concern birds: the eyes, the color to each, and the statement of hue.</summary>
internal static class BirdJson
{
    /// <summary>What every output says of daylight.</summary>
    private const string UltravioletNote = "the ultraviolet of real daylight varies more than the rest of it, with sky, sun height and shade; where a result rests on the shortest cone, try other lights";

    /// <summary>Writes <c>bird_vision</c>: light, background and eyes with their sources; null where no eye was asked for.</summary>
    public static void WriteEyes(Utf8JsonWriter json, StructurePrediction prediction)
    {
        PredictionConditions conditions = prediction.Conditions;
        if (conditions.Eyes.Count == 0)
        {
            json.WriteNull("bird_vision");
            return;
        }
        json.WriteStartObject("bird_vision");
        json.WriteString("illuminant", conditions.Illuminant.Name);
        json.WriteString("illuminant_note", UltravioletNote);
        json.WriteString("background", conditions.Background?.Name ?? "flat, a perfect mirror");
        json.WriteString("adaptation", "von Kries, to the background");
        json.WriteString("space", "tetrahedral, Endler & Mielke 2005; z towards the shortest cone, azimuths of the others: short 210, medium 90, long 330 degrees");
        json.WriteString("contrast", "against the background, receptor noise, Vorobyev & Osorio 1998; achromatic by the double cones");
        json.WriteStartArray("eyes");
        foreach (VisualSystem eye in conditions.Eyes)
            WriteEye(json, eye);
        json.WriteEndArray();
        json.WriteEndObject();
    }

    /// <summary>Writes <c>bird</c>, one entry an eye; null where the wavelengths leave out what birds see.</summary>
    public static void WriteView(Utf8JsonWriter json, View view)
    {
        if (view.Birds.Count == 0)
        {
            json.WriteNull("bird");
            return;
        }
        json.WriteStartObject("bird");
        foreach (BirdColor color in view.Birds)
        {
            json.WriteStartObject(color.System.Name);
            WriteCones(json, "catches", color.Catches);
            PredictionJson.WriteOptional(json, "double_catch", color.DoubleCatch);
            WriteCones(json, "relative_catches", color.RelativeCatches);
            PredictionJson.WriteNumbers(json, "xyz", color.Place.X, color.Place.Y, color.Place.Z);
            json.WriteNumber("azimuth_deg", color.Place.AzimuthDegrees);
            json.WriteNumber("elevation_deg", color.Place.ElevationDegrees);
            json.WriteNumber("chroma", color.Place.Chroma);
            json.WriteNumber("chroma_share", color.Place.ChromaShare);
            PredictionJson.WriteOptional(json, "chromatic_contrast", color.ChromaticContrast);
            PredictionJson.WriteOptional(json, "achromatic_contrast", color.AchromaticContrast);
            json.WriteBoolean("dark", color.IsDark);
            json.WriteEndObject();
        }
        json.WriteEndObject();
    }

    /// <summary>Writes <c>hue</c>: of the spectrum, to people, to birds.</summary>
    public static void WriteHue(Utf8JsonWriter json, View view)
    {
        json.WriteStartObject("hue");
        json.WriteString("term", view.Color?.HueTerm);
        PredictionJson.WriteOptional(json, "peak_wavelength_nm", view.Features.MainPeak?.WavelengthNm);
        SpectralPeak? ultraviolet = view.UltravioletPeak;
        json.WriteBoolean("ultraviolet_peak", ultraviolet is not null);
        PredictionJson.WriteOptional(json, "ultraviolet_peak_nm", ultraviolet?.WavelengthNm);
        PredictionJson.WriteOptional(json, "ultraviolet_peak_prominence", ultraviolet?.Prominence);
        if (view.Birds.Count == 0)
        {
            json.WriteNull("bird");
        }
        else
        {
            json.WriteStartObject("bird");
            foreach (BirdColor color in view.Birds)
            {
                json.WriteStartObject(color.System.Name);
                json.WriteString("term", color.Hue.Term);
                json.WriteNumber("shortest_relative_catch", color.RelativeCatches[0]);
                json.WriteBoolean("nonspectral", color.Hue.IsNonspectral);
                json.WriteEndObject();
            }
            json.WriteEndObject();
        }
        json.WriteEndObject();
    }

    private static void WriteEye(Utf8JsonWriter json, VisualSystem eye)
    {
        json.WriteStartObject();
        json.WriteString("name", eye.Name);
        json.WriteString("source", eye.Source);
        json.WriteString("obtained", eye.Obtained);
        json.WriteStartArray("cones");
        for (int i = 0; i < VisualSystem.SingleCount; i++)
            WriteCone(json, VisualSystem.Ranks[i], eye.SingleCones[i], eye, eye.Noise(i));
        if (eye.DoubleCone is Cone cone)
            WriteCone(json, "double", cone, eye, eye.DoubleWeberFraction);
        json.WriteEndArray();
        json.WriteNumber("media_half_nm", eye.Media.HalfNm);
        json.WriteNumber("media_width_nm", eye.Media.WidthNm);
        json.WriteEndObject();
    }

    private static void WriteCone(Utf8JsonWriter json, string rank, Cone cone, VisualSystem eye, double noise)
    {
        json.WriteStartObject();
        json.WriteString("cone", rank);
        json.WriteNumber("pigment_nm", cone.PigmentNm);
        PredictionJson.WriteOptional(json, "droplet_cut_nm", cone.Droplet?.CutNm);
        PredictionJson.WriteOptional(json, "droplet_mid_nm", cone.Droplet?.MidNm);
        json.WriteNumber("peak_nm", cone.PeakNm(eye.Media));
        PredictionJson.WriteOptional(json, "number", rank == "double" ? null : cone.Abundance);
        json.WriteNumber("weber_fraction", noise);
        json.WriteEndObject();
    }

    private static void WriteCones(Utf8JsonWriter json, string name, ValueList<double> values)
    {
        json.WriteStartObject(name);
        for (int i = 0; i < values.Count; i++)
            json.WriteNumber(VisualSystem.Ranks[i], values[i]);
        json.WriteEndObject();
    }
}
