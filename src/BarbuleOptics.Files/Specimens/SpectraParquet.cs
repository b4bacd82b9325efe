using BarbuleOptics.Files.Results;
using BarbuleOptics.Files.Specimens.Columns;

namespace BarbuleOptics.Files.Specimens;

/// <summary>The spectra of all specimens in one Parquet file, a row group a specimen, a row a wavelength, angle and polarization.</summary>
public static class SpectraParquet
{
    /// <summary>Name of the file in an output folder.</summary>
    public const string FileName = "spectra.parquet";

    /// <summary>Writes the file; parts are asked for one after another, so that memory holds one.</summary>
    public static void Write(IEnumerable<SpecimenPart> parts, Stream stream)
    {
        ArgumentNullException.ThrowIfNull(parts);
        ArgumentNullException.ThrowIfNull(stream);
        var writer = new ParquetWriter(
            stream, ("specimen", true), ("incidence_deg", false), ("polarization", true), ("wavelength_nm", false), ("reflectance", false), ("transmittance", false),
            ("absorptance", false), ("diffracted_reflectance", false));
        foreach (SpecimenPart part in parts)
        {
            int rows = part.Spectra.Sum(Count);
            writer.Group(rows,
            [
                ParquetWriter.Texts([(part.Name, rows)]),
                ParquetWriter.Doubles([.. part.Spectra.SelectMany(spectrum => Enumerable.Repeat(spectrum.IncidenceDegrees, Count(spectrum)))]),
                ParquetWriter.Texts(part.Spectra.Select(spectrum => (spectrum.Polarization, Count(spectrum)))),
                Column(part, spectrum => spectrum.WavelengthsNm), Column(part, spectrum => spectrum.Reflectance), Column(part, spectrum => spectrum.Transmittance),
                Column(part, spectrum => spectrum.Absorptance), Column(part, spectrum => spectrum.DiffractedReflectance),
            ]);
        }
        writer.Finish($"{ProgramIdentity.Name} {ProgramIdentity.Version}");
    }

    private static int Count(SpecimenSpectrum spectrum) => spectrum.WavelengthsNm.Length;

    private static byte[] Column(SpecimenPart part, Func<SpecimenSpectrum, double[]> values) => ParquetWriter.Doubles([.. part.Spectra.SelectMany(values)]);
}
