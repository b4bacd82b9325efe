using System.Globalization;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Prediction;

namespace BarbuleOptics.Files.Results;

/// <summary>The power that each material takes as comma-separated values in long form, at full precision.</summary>
public static class AbsorptionCsv
{
    /// <summary>Name of the file in an output folder.</summary>
    public const string FileName = "absorption.csv";

    /// <summary>The header line.</summary>
    public const string Header = "wavelength_nm,incidence_deg,polarization,material,absorptance";

    /// <summary>Writes the table: UTF-8 without byte-order mark, lines ended by a line feed.</summary>
    public static void Write(StructurePrediction prediction, Stream stream)
    {
        ArgumentNullException.ThrowIfNull(prediction);
        using StreamWriter text = LongTable.Begin(stream, Header);
        foreach (MaterialLoss loss in prediction.Losses)
        {
            string beam = string.Create(CultureInfo.InvariantCulture, $",{loss.Incidence.Degrees},{PolarizationNames.Of(loss.Polarization)},{Quoted(loss.Material)},");
            ReadOnlySpan<double> wavelengthsNm = loss.Absorptance.Grid.Nanometres;
            for (int i = 0; i < wavelengthsNm.Length; i++)
                text.Write(string.Create(CultureInfo.InvariantCulture, $"{wavelengthsNm[i]}{beam}{loss.Absorptance[i]}\n"));
        }
    }

    // RFC 4180, section 2, rules 5 to 7.
    private static string Quoted(string name)
        => name.AsSpan().ContainsAny("\",\r\n") ? $"\"{name.Replace("\"", "\"\"", StringComparison.Ordinal)}\"" : name;
}
