using System.Globalization;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Prediction;

namespace BarbuleOptics.Files.Results;

/// <summary>Signals of an instrument as comma-separated values in long form: one line a wavelength and angle.</summary>
public static class SignalCsv
{
    /// <summary>Name of the file in an output folder.</summary>
    public const string FileName = "signal.csv";

    /// <summary>The header line.</summary>
    public const string Header = "wavelength_nm,angle_deg,polarization,signal";

    /// <summary>Writes the table: UTF-8 without byte-order mark, lines ended by a line feed.</summary>
    public static void Write(StructurePrediction prediction, Stream stream)
    {
        ArgumentNullException.ThrowIfNull(prediction);
        using StreamWriter text = LongTable.Begin(stream, Header);
        foreach (View view in prediction.Views)
        {
            for (int i = 0; i < view.Reflectance.Grid.Count; i++)
            {
                text.Write(string.Create(
                    CultureInfo.InvariantCulture, $"{view.Reflectance.Grid.Nanometres[i]},{view.Incidence.Degrees},{PolarizationNames.Of(view.Polarization)},{view.Reflectance[i]}\n"));
            }
        }
    }
}
