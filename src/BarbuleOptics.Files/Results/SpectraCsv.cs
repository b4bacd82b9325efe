using System.Globalization;
using System.Text;
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

    /// <summary>The file's bytes: UTF-8 without byte-order mark, lines ended by a line feed.</summary>
    public static byte[] Write(StructurePrediction prediction)
    {
        ArgumentNullException.ThrowIfNull(prediction);
        var text = new StringBuilder(Header).Append('\n');
        foreach (SpectralResponse response in prediction.Responses)
        {
            string beam = string.Create(CultureInfo.InvariantCulture, $",{response.Incidence.Degrees},{PolarizationNames.Of(response.Polarization)},");
            ReadOnlySpan<double> wavelengthsNm = response.Reflectance.Grid.Nanometres;
            for (int i = 0; i < wavelengthsNm.Length; i++)
            {
                text.Append(CultureInfo.InvariantCulture, $"{wavelengthsNm[i]}").Append(beam);
                text.Append(CultureInfo.InvariantCulture, $"{response.Reflectance[i]},{response.Transmittance[i]},{response.Absorptance[i]},{response.DiffractedReflectance[i]}\n");
            }
        }
        return Encoding.UTF8.GetBytes(text.ToString());
    }
}
