using System.Text.Encodings.Web;
using System.Text.Json;
using BarbuleOptics.Anatomy;
using BarbuleOptics.Color;
using BarbuleOptics.Grating;
using BarbuleOptics.Layering;
using BarbuleOptics.Materials;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Prediction;
using BarbuleOptics.Spectra;

namespace BarbuleOptics.Files.Results;

/// <summary>Predictions as JSON, without anything that differs from run to run: no time, host, thread count or output path.</summary>
public static class PredictionJson
{
    /// <summary>Name of the file in an output folder.</summary>
    public const string FileName = "prediction.json";

    private static readonly JsonWriterOptions Options = new() { Indented = true, Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping, NewLine = "\n" };

    /// <summary>One prediction as one document, UTF-8.</summary>
    public static byte[] Write(PredictedStructure predicted)
    {
        ArgumentNullException.ThrowIfNull(predicted);
        return Document(json => WritePrediction(json, predicted));
    }

    /// <summary>Several predictions as one document, <c>{ "predictions": [ … ] }</c>.</summary>
    public static byte[] Write(IReadOnlyList<PredictedStructure> predicted)
    {
        ArgumentNullException.ThrowIfNull(predicted);
        return Document(json =>
        {
            json.WriteStartObject();
            json.WriteStartArray("predictions");
            foreach (PredictedStructure one in predicted)
                WritePrediction(json, one);
            json.WriteEndArray();
            json.WriteEndObject();
        });
    }

    internal static byte[] Document(Action<Utf8JsonWriter> content)
    {
        using var stream = new MemoryStream();
        using (var json = new Utf8JsonWriter(stream, Options))
            content(json);
        stream.WriteByte((byte)'\n');
        return stream.ToArray();
    }

    private static void WritePrediction(Utf8JsonWriter json, PredictedStructure predicted)
    {
        StructurePrediction prediction = predicted.Prediction;
        json.WriteStartObject();
        WriteProgram(json);
        WriteStructure(json, predicted);
        json.WriteString("solver", prediction.Solver);
        json.WriteString("picture", prediction.Picture);
        json.WriteString("mixing", prediction.Mixing);
        json.WriteString("core_mixing", prediction.CoreMixing);
        WriteOptional(json, "films", prediction.FilmCount);
        json.WriteNumber("accuracy_asked", prediction.Conditions.Accuracy);
        json.WriteNumber("error_estimate", prediction.ErrorEstimate);
        SignalJson.WriteInstrument(json, prediction.Conditions.Instrument);
        json.WriteString("scope", StructurePrediction.Scope);
        WriteMaterials(json, prediction.Materials);
        BirdJson.WriteEyes(json, prediction);
        json.WriteStartObject("wavelengths_nm");
        json.WriteNumber("start", prediction.Conditions.Wavelengths.StartNm);
        json.WriteNumber("stop", prediction.Conditions.Wavelengths.StopNm);
        json.WriteNumber("step", prediction.Conditions.Wavelengths.StepNm);
        json.WriteEndObject();
        json.WriteNumber("summation_nm", SummationSteps.NanometresOf(prediction.Conditions.Summation));
        json.WriteStartArray("views");
        foreach (View view in prediction.Views)
            WriteView(json, view, prediction);
        json.WriteEndArray();
        WriteTrack(json, prediction.Track);
        UnknownsJson.WriteCorrections(json, prediction.Barbule);
        UnknownsJson.Write(json, predicted.Unknowns);
        DrawsJson.Write(json, predicted.Draws);
        WriteWarnings(json, prediction.Warnings);
        json.WriteEndObject();
    }

    /// <summary>What the program is.</summary>
    internal static void WriteProgram(Utf8JsonWriter json)
    {
        json.WriteStartObject("program");
        json.WriteString("name", ProgramIdentity.Name);
        json.WriteString("version", ProgramIdentity.Version);
        json.WriteEndObject();
    }

    /// <summary>Opens the block of a structure with where it came from; the caller closes it.</summary>
    internal static void WriteFile(Utf8JsonWriter json, string name, string file, string sha256, IReadOnlyList<string> changes)
    {
        json.WriteStartObject("structure");
        json.WriteString("name", name);
        json.WriteString("file", file);
        json.WriteString("sha256", sha256);
        json.WriteStartArray("set");
        foreach (string change in changes)
            json.WriteStringValue(change);
        json.WriteEndArray();
    }

    private static void WriteStructure(Utf8JsonWriter json, PredictedStructure predicted)
    {
        WriteFile(json, predicted.Prediction.Barbule.Name, predicted.File, predicted.Sha256, predicted.Changes);
        WriteGeometry(json, predicted.Prediction);
        json.WriteEndObject();
    }

    /// <summary>The geometry that was solved: the central value of every length as measured, and what follows from it.</summary>
    private static void WriteGeometry(Utf8JsonWriter json, StructurePrediction prediction)
    {
        json.WriteStartObject("solved_as_nm");
        foreach ((string key, MeasuredLength length) in MeasuredLengths.Of(prediction.Barbule))
            json.WriteNumber(key, length.CentralNm);
        json.WriteEndObject();
        json.WriteStartArray("solved_rows");
        foreach (SectionRun run in prediction.Section.Runs)
        {
            json.WriteStartObject();
            json.WriteNumber("layer", run.LayerNumber);
            json.WriteNumber("rows", run.Rows.Count);
            json.WriteNumber("spacing_nm", run.SpacingNm);
            json.WriteNumber("pitch_nm", run.PitchNm);
            foreach (SpacingMove move in prediction.MovedSpacings.Where(move => move.LayerNumber == run.LayerNumber))
            {
                json.WriteNumber("moved_spacing_nm", move.ToNm);
                json.WriteNumber("moved_up_to_nm", prediction.MovedUpToNm!.Value);
            }
            json.WriteEndObject();
        }
        json.WriteEndArray();
        json.WriteNumber("depth_nm", prediction.Section.DepthNm);
    }

    private static void WriteMaterials(Utf8JsonWriter json, IReadOnlyList<Material> materials)
    {
        json.WriteStartArray("materials");
        foreach (Material material in materials)
        {
            json.WriteStartObject();
            json.WriteString("name", material.Name);
            json.WriteString("source", material.Source);
            json.WriteString("obtained", material.Obtained);
            json.WriteString("note", material.Note);
            WriteNumbers(json, "range_nm", material.LeastNm, material.MostNm);
            json.WriteEndObject();
        }
        json.WriteEndArray();
    }

    private static void WriteView(Utf8JsonWriter json, View view, StructurePrediction prediction)
    {
        json.WriteStartObject();
        json.WriteNumber("incidence_deg", view.Incidence.Degrees);
        json.WriteString("polarization", PolarizationNames.Of(view.Polarization));
        WriteFeatures(json, view.Features);
        if (view.Color is CieColor color)
            WriteColor(json, color);
        else
            json.WriteNull("cie");
        BirdJson.WriteHue(json, view);
        BirdJson.WriteView(json, view);
        SignalJson.WriteSignal(json, view.Signal);
        WriteLayerModelError(json, view.LayerModelError);
        PowerJson.Write(json, view, prediction);
        json.WriteEndObject();
    }

    private static void WriteLayerModelError(Utf8JsonWriter json, LayerModelError? error)
    {
        if (error is null)
        {
            json.WriteNull("layer_model_error");
            return;
        }
        json.WriteStartObject("layer_model_error");
        json.WriteString("mixing", error.Mixing);
        WriteOptional(json, "peak_shift_nm", error.PeakShiftNm);
        json.WriteNumber("largest_change", error.LargestChange);
        json.WriteNumber("largest_change_at_nm", error.LargestChangeAtNm);
        WriteOptional(json, "ciede2000", error.Ciede2000);
        json.WriteEndObject();
    }

    private static void WriteFeatures(Utf8JsonWriter json, SpectrumFeatures features)
    {
        json.WriteStartObject("spectrum");
        json.WriteStartArray("peaks");
        foreach (SpectralPeak peak in features.Peaks)
        {
            json.WriteStartObject();
            json.WriteNumber("wavelength_nm", peak.WavelengthNm);
            json.WriteNumber("reflectance", peak.Reflectance);
            json.WriteNumber("prominence", peak.Prominence);
            WriteOptional(json, "half_height_width_nm", peak.HalfHeightWidthNm);
            WriteOptional(json, "half_prominence_width_nm", peak.HalfProminenceWidthNm);
            json.WriteEndObject();
        }
        json.WriteEndArray();
        json.WriteBoolean("at_edge", features.AtEdge);
        WriteOptional(json, "mean_reflectance", features.MeanReflectance);
        WriteOptional(json, "contrast", features.Contrast);
        WriteOptional(json, "ultraviolet_share", features.UltravioletShare);
        json.WriteEndObject();
    }

    private static void WriteColor(Utf8JsonWriter json, CieColor color)
    {
        json.WriteStartObject("cie");
        json.WriteString("observer", StandardObservers.NameOf(color.Observer));
        json.WriteString("illuminant", color.Illuminant.Name);
        WriteNumbers(json, "XYZ", color.Tristimulus.X, color.Tristimulus.Y, color.Tristimulus.Z);
        WriteNumbers(json, "xy", color.Chromaticity.X, color.Chromaticity.Y);
        WriteNumbers(json, "u_v_prime", color.UniformChromaticity.U, color.UniformChromaticity.V);
        WriteNumbers(json, "Lab", color.Lab.L, color.Lab.A, color.Lab.B);
        WriteNumbers(json, "LCh", color.Lab.L, color.Lab.Chroma, color.Lab.HueDegrees);
        WriteNumbers(json, "Luv", color.Luv.L, color.Luv.U, color.Luv.V);
        json.WriteNumber("saturation_uv", color.Luv.Saturation);
        WriteOptional(json, "dominant_wavelength_nm", color.DominantWavelengthNm);
        json.WriteNumber("excitation_purity", color.ExcitationPurity);
        json.WriteString("sRGB_adaptation", ChromaticAdaptation.BradfordName);
        json.WriteString("sRGB", color.Srgb.Hex);
        json.WriteString("sRGB_brightened", color.SrgbBrightened.Hex);
        json.WriteBoolean("in_sRGB_gamut", color.InSrgbGamut);
        json.WriteEndObject();
    }

    private static void WriteTrack(Utf8JsonWriter json, PeakTrack track)
    {
        json.WriteStartObject("main_peak_over_angle");
        json.WriteStartArray("incidence_deg");
        foreach (PeakSighting sighting in track.Sightings)
            json.WriteNumberValue(sighting.Incidence.Degrees);
        json.WriteEndArray();
        json.WriteStartArray("wavelength_nm");
        foreach (PeakSighting sighting in track.Sightings)
        {
            if (sighting.Peak is null)
                json.WriteNullValue();
            else
                json.WriteNumberValue(sighting.Peak.WavelengthNm);
        }
        json.WriteEndArray();
        WriteOptional(json, "effective_index", track.EffectiveIndex);
        WriteOptional(json, "normal_wavelength_nm", track.Shift?.NormalWavelengthNm);
        WriteOptional(json, "residual_nm", track.Shift?.ResidualNm);
        json.WriteEndObject();
    }

    internal static void WriteWarnings(Utf8JsonWriter json, IReadOnlyList<PredictionWarning> warnings)
    {
        json.WriteStartArray("warnings");
        foreach (PredictionWarning warning in warnings)
        {
            json.WriteStartObject();
            json.WriteString("code", warning.Code);
            json.WriteString("message", warning.Message);
            WriteOptional(json, "incidence_deg", warning.Incidence?.Degrees);
            json.WriteEndObject();
        }
        json.WriteEndArray();
    }

    /// <summary>A list of numbers.</summary>
    internal static void WriteNumbers(Utf8JsonWriter json, string name, params ReadOnlySpan<double> values)
    {
        json.WriteStartArray(name);
        foreach (double value in values)
            json.WriteNumberValue(value);
        json.WriteEndArray();
    }

    /// <summary>A number, or null.</summary>
    internal static void WriteOptional(Utf8JsonWriter json, string name, double? value)
    {
        if (value is double number)
            json.WriteNumber(name, number);
        else
            json.WriteNull(name);
    }
}
