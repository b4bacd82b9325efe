using System.Security.Cryptography;
using System.Text;
using BarbuleOptics.Ensembles;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Prediction;

namespace BarbuleOptics.Files.Specimens;

/// <summary>All that the results of a table take from one specimen, as it waits on the disk until every one is done.</summary>
/// <param name="Name">The specimen.</param>
/// <param name="Predictions">Its lines of <see cref="PredictionsCsv"/>; empty when it failed.</param>
/// <param name="Failures">Its lines of <see cref="FailedCsv"/>; empty when it did not.</param>
/// <param name="Problems">The same for a person, a line each.</param>
/// <param name="Spectra">Its spectra.</param>
/// <param name="Swatches">Its colors, one an angle.</param>
public sealed record SpecimenPart(
    string Name, string Predictions, string Failures, IReadOnlyList<string> Problems, IReadOnlyList<SpecimenSpectrum> Spectra, IReadOnlyList<SpecimenSwatch> Swatches)
{
    /// <summary>First bytes of a part file; another layout gets another number.</summary>
    private const string Mark = "barbule part 1";

    /// <summary>The part of a specimen that failed.</summary>
    public static SpecimenPart Failed(SpecimenRow row, IReadOnlyList<FileProblem> problems)
    {
        ArgumentNullException.ThrowIfNull(row);
        return new SpecimenPart(row.Name, "", FailedCsv.Lines(row, problems), [.. problems.Select(problem => problem.ToString())], [], []);
    }

    /// <summary>The part of a specimen that was predicted.</summary>
    public static SpecimenPart Of(string name, StructurePrediction prediction, EnsemblePrediction? ensemble)
    {
        ArgumentNullException.ThrowIfNull(prediction);
        return new SpecimenPart(
            name, PredictionsCsv.Lines(name, prediction, ensemble), "", [],
            [.. prediction.Responses.Select(response => new SpecimenSpectrum(
                response.Incidence.Degrees, PolarizationNames.Of(response.Polarization), response.Reflectance.Grid.Nanometres.ToArray(), response.Reflectance.Values.ToArray(),
                response.Transmittance.Values.ToArray(), response.Absorptance.Values.ToArray(), response.DiffractedReflectance.Values.ToArray()))],
            [.. prediction.Views.Select(view => new SpecimenSwatch(
                view.Incidence.Degrees, view.Color?.Srgb.ToString() ?? "", view.Color?.SrgbBrightened.ToString() ?? "", view.Color?.HueTerm ?? ""))]);
    }

    /// <summary>The bytes of a part file: its content, then its SHA-256.</summary>
    internal byte[] ToBytes(string key)
    {
        using var memory = new MemoryStream();
        using (var writer = new BinaryWriter(memory, Encoding.UTF8, leaveOpen: true))
        {
            foreach (string text in (string[])[Mark, key, Name, Predictions, Failures])
                writer.Write(text);
            writer.Write(Problems.Count);
            foreach (string problem in Problems)
                writer.Write(problem);
            writer.Write(Spectra.Count);
            foreach (SpecimenSpectrum spectrum in Spectra)
                Write(writer, spectrum);
            writer.Write(Swatches.Count);
            foreach (SpecimenSwatch swatch in Swatches)
            {
                writer.Write(swatch.IncidenceDegrees);
                foreach (string text in (string[])[swatch.Srgb, swatch.SrgbBrightened, swatch.HueTerm])
                    writer.Write(text);
            }
        }
        byte[] content = memory.ToArray();
        return [.. content, .. SHA256.HashData(content)];
    }

    /// <summary>The part in the bytes of a file; null where it is damaged or of another key.</summary>
    internal static SpecimenPart? FromBytes(byte[] bytes, string key)
    {
        int length = bytes.Length - SHA256.HashSizeInBytes;
        if (length < 0 || !SHA256.HashData(bytes.AsSpan(0, length)).AsSpan().SequenceEqual(bytes.AsSpan(length)))
            return null;
        using var reader = new BinaryReader(new MemoryStream(bytes, 0, length), Encoding.UTF8);
        if (reader.ReadString() != Mark || reader.ReadString() != key)
            return null;
        string name = reader.ReadString(), predictions = reader.ReadString(), failures = reader.ReadString();
        string[] problems = new string[reader.ReadInt32()];
        for (int i = 0; i < problems.Length; i++)
            problems[i] = reader.ReadString();
        var spectra = new SpecimenSpectrum[reader.ReadInt32()];
        for (int i = 0; i < spectra.Length; i++)
            spectra[i] = new SpecimenSpectrum(reader.ReadDouble(), reader.ReadString(), Read(reader), Read(reader), Read(reader), Read(reader), Read(reader));
        var swatches = new SpecimenSwatch[reader.ReadInt32()];
        for (int i = 0; i < swatches.Length; i++)
            swatches[i] = new SpecimenSwatch(reader.ReadDouble(), reader.ReadString(), reader.ReadString(), reader.ReadString());
        return new SpecimenPart(name, predictions, failures, problems, spectra, swatches);
    }

    private static void Write(BinaryWriter writer, SpecimenSpectrum spectrum)
    {
        writer.Write(spectrum.IncidenceDegrees);
        writer.Write(spectrum.Polarization);
        foreach (double[] values in (double[][])[spectrum.WavelengthsNm, spectrum.Reflectance, spectrum.Transmittance, spectrum.Absorptance, spectrum.DiffractedReflectance])
        {
            writer.Write(values.Length);
            foreach (double value in values)
                writer.Write(value);
        }
    }

    private static double[] Read(BinaryReader reader)
    {
        double[] values = new double[reader.ReadInt32()];
        for (int i = 0; i < values.Length; i++)
            values[i] = reader.ReadDouble();
        return values;
    }
}
