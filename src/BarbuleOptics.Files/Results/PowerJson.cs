using System.Text.Json;
using BarbuleOptics.Prediction;

namespace BarbuleOptics.Files.Results;

/// <summary>The block of a view that says where the power goes: the four parts, what each material takes, and the orders besides the mirror's.</summary>
internal static class PowerJson
{
    /// <summary>Writes the block <c>powers</c>; what films do not have is null.</summary>
    public static void Write(Utf8JsonWriter json, View view, StructurePrediction prediction)
    {
        json.WriteStartObject("powers");
        PredictionJson.WriteOptional(json, "mean_reflectance", view.Powers.MeanReflectance);
        PredictionJson.WriteOptional(json, "mean_diffracted_reflectance", view.Powers.MeanDiffractedReflectance);
        PredictionJson.WriteOptional(json, "mean_transmittance", view.Powers.MeanTransmittance);
        PredictionJson.WriteOptional(json, "mean_absorptance", view.Powers.MeanAbsorptance);
        if (prediction.IsRigorous)
        {
            WriteLosses(json, prediction.Losses.Where(loss => loss.Incidence == view.Incidence && loss.Polarization == view.Polarization));
            WriteOrders(json, prediction.Orders.Where(order => order.Incidence == view.Incidence && order.Polarization == view.Polarization && order.Order != 0));
        }
        else
        {
            json.WriteNull("absorbed_by");
            json.WriteNull("orders");
        }
        json.WriteEndObject();
    }

    private static void WriteLosses(Utf8JsonWriter json, IEnumerable<MaterialLoss> losses)
    {
        json.WriteStartArray("absorbed_by");
        foreach (MaterialLoss loss in losses)
        {
            json.WriteStartObject();
            json.WriteString("material", loss.Material);
            PredictionJson.WriteOptional(json, "mean_absorptance", loss.MeanAbsorptance);
            json.WriteEndObject();
        }
        json.WriteEndArray();
    }

    private static void WriteOrders(Utf8JsonWriter json, IEnumerable<DiffractionOrder> orders)
    {
        json.WriteStartArray("orders");
        foreach (DiffractionOrder order in orders)
        {
            int strongest = order.Efficiency.Values.IndexOf(Greatest(order.Efficiency.Values));
            ReadOnlySpan<double> wavelengthsNm = order.Efficiency.Grid.Nanometres;
            json.WriteStartObject();
            json.WriteString("side", OrdersCsv.NameOf(order.Side));
            json.WriteNumber("order", order.Order);
            json.WriteNumber("period_nm", order.PeriodNm);
            json.WriteNumber("longest_nm", wavelengthsNm[order.Propagates.AsSpan().LastIndexOf(true)]);
            json.WriteNumber("largest_efficiency", order.Efficiency[strongest]);
            json.WriteNumber("largest_at_nm", wavelengthsNm[strongest]);
            json.WriteEndObject();
        }
        json.WriteEndArray();
    }

    private static double Greatest(ReadOnlySpan<double> values)
    {
        double greatest = values[0];
        foreach (double value in values)
            greatest = Math.Max(greatest, value);
        return greatest;
    }
}
