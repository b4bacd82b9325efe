using System.Globalization;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Prediction;

namespace BarbuleOptics.Files.Results;

/// <summary>The efficiency of each order as comma-separated values in long form; only orders that propagate, at full precision.</summary>
public static class OrdersCsv
{
    /// <summary>Name of the file in an output folder.</summary>
    public const string FileName = "orders.csv";

    /// <summary>The header line.</summary>
    public const string Header = "wavelength_nm,incidence_deg,polarization,side,order,period_nm,efficiency";

    /// <summary>Writes the table: UTF-8 without byte-order mark, lines ended by a line feed.</summary>
    public static void Write(StructurePrediction prediction, Stream stream)
    {
        ArgumentNullException.ThrowIfNull(prediction);
        using StreamWriter text = LongTable.Begin(stream, Header);
        foreach (DiffractionOrder order in prediction.Orders)
            Write(order, text);
    }

    /// <summary>How a side is written.</summary>
    internal static string NameOf(OrderSide side) => side == OrderSide.Reflected ? "reflected" : "transmitted";

    private static void Write(DiffractionOrder order, StreamWriter text)
    {
        string beam = string.Create(CultureInfo.InvariantCulture, $",{order.Incidence.Degrees},{PolarizationNames.Of(order.Polarization)},{NameOf(order.Side)},{order.Order},{order.PeriodNm},");
        ReadOnlySpan<double> wavelengthsNm = order.Efficiency.Grid.Nanometres;
        Span<char> line = stackalloc char[256];
        for (int i = 0; i < wavelengthsNm.Length; i++)
        {
            if (!order.Propagates[i])
                continue;
            line.TryWrite(CultureInfo.InvariantCulture, $"{wavelengthsNm[i]}{beam}{order.Efficiency[i]}\n", out int length);
            text.Write(line[..length]);
        }
    }
}
