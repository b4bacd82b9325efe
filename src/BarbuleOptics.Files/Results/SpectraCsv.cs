using System.Globalization;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Prediction;

namespace BarbuleOptics.Files.Results;

/// <summary>Spectra as comma-separated values in long form: one line a wavelength, angle and polarization, at full precision.</summary>
public static class SpectraCsv
{
    /// <summary>Name of the file in an output folder.</summary>
    public const string FileName = "spectra.csv";

    /// <summary>The header line.</summary>
    public const string Header = "wavelength_nm,incidence_deg,polarization,reflectance,transmittance,absorptance,diffracted_reflectance";

    /// <summary>Writes the table: UTF-8 without byte-order mark, lines ended by a line feed.</summary>
    public static void Write(StructurePrediction prediction, Stream stream)
    {
        ArgumentNullException.ThrowIfNull(prediction);
        using StreamWriter text = LongTable.Begin(stream, Header);
        foreach (SpectralResponse response in prediction.Responses)
            Write(response, text);
    }

    private static void Write(SpectralResponse response, StreamWriter text)
    {
        string beam = string.Create(CultureInfo.InvariantCulture, $",{response.Incidence.Degrees},{PolarizationNames.Of(response.Polarization)},");
        ReadOnlySpan<double> wavelengthsNm = response.Reflectance.Grid.Nanometres;
        Span<char> line = stackalloc char[256];
        for (int i = 0; i < wavelengthsNm.Length; i++)
        {
            line.TryWrite(CultureInfo.InvariantCulture, $"{wavelengthsNm[i]}{beam}{response.Reflectance[i]},{response.Transmittance[i]},{response.Absorptance[i]},{response.DiffractedReflectance[i]}\n", out int length);
            text.Write(line[..length]);
        }
    }
}
