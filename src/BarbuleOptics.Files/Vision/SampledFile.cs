using BarbuleOptics.Color;
using BarbuleOptics.Files.Toml;
using BarbuleOptics.Quantities;
using BarbuleOptics.Vision;

namespace BarbuleOptics.Files;

/// <summary>Reads a light or a background of a user's own (TOML 1.0): samples over wavelength, straight lines between.</summary>
/// <remarks>
/// Keys: <c>format = 1</c>, <c>name</c>, <c>rows = [[wavelength, value], ...]</c> with ascending wavelengths in nm; of a light also <c>unit</c>, <c>energy</c>
/// (the default; power per wavelength) or <c>photons</c>. A light must cover 300-780 nm, a background 300-700 nm; values may not lie below 0.
/// </remarks>
public static class SampledFile
{
    private const string Photons = "photons";

    private static readonly string[] Units = ["energy", Photons];
    private static readonly NumberRange Wavelength = new(WavelengthGrid.LeastNm, WavelengthGrid.MostNm);
    private static readonly NumberRange Value = new(0, 1e30);

    /// <summary>Reads a light.</summary>
    public static FileResult<Illuminant> ReadLight(string path) => Read(path, ParseLight);

    /// <summary>Reads the bytes of a light.</summary>
    public static FileResult<Illuminant> ParseLight(byte[] bytes, string displayName) => Parse(bytes, displayName, (reader, log) =>
    {
        reader.RefuseOthers(["format", "name", "unit", "rows"]);
        string? name = ReadName(reader), unit = reader.Word("unit", Units);
        if (name is not null && Illuminant.TryFind(name, out _))
            reader.Refuse("name", $"found {OneLine.Quote(name)}, which is the CIE's; allowed another name");
        (double[] Nm, double[] Values)? rows = ReadRows(reader, log, Illuminant.LeastNm, Illuminant.LeastStopNm);
        if (name is null || rows is not var (nm, values) || log.HasProblems)
            return null;
        // A photon of wavelength l carries energy in proportion to 1/l.
        double[] powers = unit == Photons ? [.. values.Select((value, i) => value / nm[i])] : values;
        double at560 = Between(nm, powers, 560);
        if (at560 > 0)
            return Illuminant.FromSamples(name, nm, powers);
        reader.Refuse("rows", "found no light at 560 nm; allowed above 0 there, which scales the rest");
        return null;
    });

    /// <summary>Reads a background.</summary>
    public static FileResult<AdaptingBackground> ReadBackground(string path) => Read(path, ParseBackground);

    /// <summary>Reads the bytes of a background.</summary>
    public static FileResult<AdaptingBackground> ParseBackground(byte[] bytes, string displayName) => Parse(bytes, displayName, (reader, log) =>
    {
        reader.RefuseOthers(["format", "name", "rows"]);
        string? name = ReadName(reader);
        (double[] Nm, double[] Values)? rows = ReadRows(reader, log, VisualSystem.StartNm, VisualSystem.StopNm);
        if (name is null || rows is not var (nm, values) || log.HasProblems)
            return null;
        WavelengthGrid grid = WavelengthGrid.FromRange(Length.FromNanometres(VisualSystem.StartNm), Length.FromNanometres(VisualSystem.StopNm), Length.FromNanometres(1));
        var samples = new double[grid.Count];
        for (int i = 0; i < samples.Length; i++)
            samples[i] = Between(nm, values, grid.Nanometres[i]);
        if (samples.Any(value => value > 0))
            return new AdaptingBackground(name, new Spectrum(grid, samples));
        reader.Refuse("rows", "found a black background; allowed one that reflects");
        return null;
    });

    private static FileResult<T> Read<T>(string path, Func<byte[], string, FileResult<T>> parse)
        where T : class
    {
        ArgumentNullException.ThrowIfNull(path);
        var log = new ReadingLog(path);
        return SourceText.ReadFile(path, log) is { } bytes ? parse(bytes, path) : FileResult.Failure<T>(log.Problems());
    }

    private static FileResult<T> Parse<T>(byte[] bytes, string displayName, Func<TableReader, ReadingLog, T?> read)
        where T : class
    {
        ArgumentNullException.ThrowIfNull(bytes);
        ArgumentNullException.ThrowIfNull(displayName);
        var log = new ReadingLog(displayName);
        T? value = null;
        if (TomlDocument.Parse(bytes, log) is { } root)
        {
            var reader = new TableReader(root, log);
            StructureReader.CheckFormat(reader, log);
            value = read(reader, log);
        }
        return value is null || log.HasProblems ? FileResult.Failure<T>(log.Problems()) : FileResult.Success(value);
    }

    private static string? ReadName(TableReader reader)
    {
        if (!reader.Has("name"))
            reader.RefuseMissing("name", "what output calls it");
        return reader.Text("name");
    }

    private static (double[] Nm, double[] Values)? ReadRows(TableReader reader, ReadingLog log, double leastNm, double mostNm)
    {
        string allowed = FormattableString.Invariant($"a list of [wavelength, value] from {leastNm} to {mostNm} nm or beyond, ascending, no value below 0");
        if (!reader.Has("rows"))
            reader.RefuseMissing("rows", allowed);
        if (!reader.TryGet("rows", out TomlNode? value))
            return null;
        if (value is not TomlArray list)
        {
            reader.Refuse("rows", $"found {value.Found}; allowed {allowed}");
            return null;
        }
        if (list.Items.FirstOrDefault(item => !IsRow(item)) is { } odd)
        {
            log.Refuse(odd.Location, "rows", $"found {odd.Found}; allowed {allowed}");
            return null;
        }
        double[][] rows = [.. list.Items.Cast<TomlArray>().Select(row => row.Items.Cast<TomlNumber>().Select(number => number.Value).ToArray())];
        int unordered = Enumerable.Range(1, Math.Max(0, rows.Length - 1)).FirstOrDefault(i => rows[i][0] <= rows[i - 1][0]);
        if (unordered > 0)
        {
            log.Refuse(list.Items[unordered].Location, "rows", $"found {OneLine.Number(rows[unordered][0])} after {OneLine.Number(rows[unordered - 1][0])}; allowed {allowed}");
            return null;
        }
        if (rows.Length >= 2 && rows[0][0] <= leastNm && rows[^1][0] >= mostNm)
            return ([.. rows.Select(row => row[0])], [.. rows.Select(row => row[1])]);
        string found = rows.Length == 0 ? "none" : $"{OneLine.Number(rows[0][0])} to {OneLine.Number(rows[^1][0])} nm";
        reader.Refuse("rows", $"found {found}; allowed {allowed}: what is missing is not guessed");
        return null;
    }

    private static bool IsRow(TomlNode node)
        => node is TomlArray { Items: [TomlNumber { Value: var nm }, TomlNumber { Value: var value }] } && Wavelength.Holds(nm) && Value.Holds(value);

    private static double Between(double[] wavelengthsNm, double[] values, double wavelengthNm)
    {
        int found = Array.BinarySearch(wavelengthsNm, wavelengthNm);
        int upper = found >= 0 ? found : ~found;
        return found >= 0 ? values[found] : double.Lerp(values[upper - 1], values[upper], (wavelengthNm - wavelengthsNm[upper - 1]) / (wavelengthsNm[upper] - wavelengthsNm[upper - 1]));
    }
}
