using System.Text.Json;
using BarbuleOptics.Prediction;
using BarbuleOptics.Spectra.Instruments;

namespace BarbuleOptics.Files.Results;

/// <summary>The instrument and its signals in JSON.</summary>
internal static class SignalJson
{
    /// <summary>What signals are divided by, and the instrument, null without one.</summary>
    public static void WriteInstrument(Utf8JsonWriter json, Instrument? instrument)
    {
        json.WriteString("reference", ReferenceName(instrument));
        if (instrument is null)
        {
            json.WriteNull("instrument");
            return;
        }
        json.WriteStartObject("instrument");
        json.WriteString("geometry", GeometryName(instrument.Arms.Kind));
        PredictionJson.WriteOptional(json, "between_arms_deg", instrument.Arms.Kind == ArmGeometryKind.FixedArms ? instrument.Arms.Span.Degrees : null);
        json.WriteNumber("light_half_angle_deg", instrument.Light.Degrees);
        json.WriteNumber("collection_half_angle_deg", instrument.Collection.Degrees);
        json.WriteString("tilt", TiltName(instrument.Tilt.Kind));
        json.WriteNumber("tilt_deg", instrument.Tilt.Width.Degrees);
        json.WriteNumber("rod_spread_deg", instrument.RodSpread.Degrees);
        json.WriteEndObject();
    }

    /// <summary>The signal of a view, null without an instrument.</summary>
    public static void WriteSignal(Utf8JsonWriter json, InstrumentSignal? signal)
    {
        if (signal is null)
        {
            json.WriteNull("signal");
            return;
        }
        json.WriteStartObject("signal");
        json.WriteNumber("scale", signal.Scale);
        PredictionJson.WriteOptional(json, "facing_share", signal.FacingShare);
        json.WriteNumber("mean_incidence_deg", signal.MeanIncidence.Degrees);
        json.WriteNumber("error_estimate", signal.ErrorEstimate);
        json.WriteNumber("diffracted_share", signal.DiffractedShare);
        json.WriteEndObject();
    }

    private static string ReferenceName(Instrument? instrument) => instrument?.Reference == SignalReference.WhiteStandard ? "white-standard" : "mirror";

    private static string GeometryName(ArmGeometryKind kind) => kind switch
    {
        ArmGeometryKind.OneLine => "one-line",
        ArmGeometryKind.FixedArms => "fixed-arms",
        _ => "turning-arms",
    };

    private static string TiltName(FacetTiltKind kind) => kind switch
    {
        FacetTiltKind.Normal => "normal",
        FacetTiltKind.Arc => "arc",
        _ => "flat",
    };
}
