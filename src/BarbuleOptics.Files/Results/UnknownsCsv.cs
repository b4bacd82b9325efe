using System.Globalization;
using BarbuleOptics.Ensembles;

namespace BarbuleOptics.Files.Results;

/// <summary>Peak and hue against each thing that is not known, as comma-separated values in long form; a cell is empty where there is no value.</summary>
public static class UnknownsCsv
{
    /// <summary>Name of the file in an output folder.</summary>
    public const string FileName = "unknowns.csv";

    /// <summary>The header line.</summary>
    public const string Header = "key,unit,value,incidence_deg,peak_nm,h_deg,C,term";

    /// <summary>Writes the table: UTF-8 without byte-order mark, lines ended by a line feed.</summary>
    public static void Write(UnknownReach reach, Stream stream)
    {
        ArgumentNullException.ThrowIfNull(reach);
        using StreamWriter text = LongTable.Begin(stream, Header);
        foreach (UnknownView view in reach.Views)
        {
            foreach (UnknownSweep sweep in view.Sweeps)
            {
                foreach (UnknownPoint point in sweep.Points)
                    text.Write(string.Create(CultureInfo.InvariantCulture, $"{sweep.Key},{sweep.Unit},{point.Value},{view.Incidence.Degrees},{point.PeakNm},{point.HueDegrees},{point.Chroma},{point.Term}\n"));
            }
        }
    }
}
