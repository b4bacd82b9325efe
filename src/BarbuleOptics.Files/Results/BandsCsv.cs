using System.Globalization;
using BarbuleOptics.Ensembles;
using BarbuleOptics.Multilayer;

namespace BarbuleOptics.Files.Results;

/// <summary>How the reflectance of draws scatters, as comma-separated values in long form: one line a wavelength and angle, at full precision.</summary>
public static class BandsCsv
{
    /// <summary>Name of the file in an output folder.</summary>
    public const string FileName = "bands.csv";

    /// <summary>The header line.</summary>
    public const string Header = "wavelength_nm,incidence_deg,polarization,median,from_50,to_50,from_95,to_95,mean";

    /// <summary>Writes the table: UTF-8 without byte-order mark, lines ended by a line feed.</summary>
    public static void Write(EnsemblePrediction ensemble, Stream stream)
    {
        ArgumentNullException.ThrowIfNull(ensemble);
        using StreamWriter text = LongTable.Begin(stream, Header);
        Span<char> line = stackalloc char[320];
        foreach (DrawnView view in ensemble.Views)
        {
            string beam = string.Create(CultureInfo.InvariantCulture, $",{view.Incidence.Degrees},{PolarizationNames.Of(view.Polarization)},");
            ReflectanceBands bands = view.Bands;
            ReadOnlySpan<double> wavelengthsNm = bands.Median.Grid.Nanometres;
            for (int i = 0; i < wavelengthsNm.Length; i++)
            {
                line.TryWrite(CultureInfo.InvariantCulture, $"{wavelengthsNm[i]}{beam}{bands.Median[i]},{bands.From50[i]},{bands.To50[i]},{bands.From95[i]},{bands.To95[i]},{bands.Mean[i]}\n", out int length);
                text.Write(line[..length]);
            }
        }
    }
}
