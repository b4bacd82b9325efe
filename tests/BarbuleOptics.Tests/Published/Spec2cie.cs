using System.Globalization;
using System.Text;
using BarbuleOptics.Color;

namespace BarbuleOptics.Tests.Published;

/// <summary>The program spec2cie (Argyll): XYZ of a spectrum at 1 nm, to six digits, from its own observers and illuminants.</summary>
internal sealed class Spec2cie : IDisposable
{
    private static readonly string[] TristimulusFields = ["XYZ_X", "XYZ_Y", "XYZ_Z"];

    private readonly string _program = OutsideProgram.Find("spec2cie", "argyll");
    private readonly DirectoryInfo _folder = Directory.CreateTempSubdirectory("barbule-spec2cie-");

    /// <summary>Tristimulus values of the fractions <paramref name="reflectance"/> at <paramref name="startNm"/>, one nanometre apart.</summary>
    /// <remarks>Beyond the last value the program holds it to 830 nm.</remarks>
    public double[] Measure(int startNm, IReadOnlyList<double> reflectance, string illuminant, StandardObserver observer)
    {
        WriteSpectrum("sample.sp", startNm, [.. reflectance.Select(static value => 100 * value)], "REFLECTIVE", "100.000000");
        string light = illuminant == "E" ? "equal-energy.sp" : illuminant;
        if (illuminant == "E")
            WriteSpectrum(light, 300, [.. Enumerable.Repeat(100.0, 531)], "EMISSION", "1.000000");
        string eye = observer == StandardObserver.Cie1931TwoDegree ? "1931_2" : "1964_10";
        OutsideProgram.Run(_program, _folder.FullName, "-i", light, "-o", eye, "-n", "sample.sp", "result.sp");
        return ReadTristimulus(File.ReadAllText(Path.Combine(_folder.FullName, "result.sp")));
    }

    public void Dispose() => _folder.Delete(recursive: true);

    private void WriteSpectrum(string file, int startNm, double[] values, string kind, string norm)
    {
        string[] fields = [.. values.Select((_, i) => $"SPEC_{startNm + i}")];
        var text = new StringBuilder("SPECT  \n\nDESCRIPTOR \"test\"\nORIGINATOR \"test\"\nCREATED \"test\"\n");
        AddKeyword(text, "MEAS_TYPE", kind);
        AddKeyword(text, "SPECTRAL_BANDS", $"{values.Length}");
        AddKeyword(text, "SPECTRAL_START_NM", $"{startNm}.000000");
        AddKeyword(text, "SPECTRAL_END_NM", $"{startNm + values.Length - 1}.000000");
        AddKeyword(text, "SPECTRAL_NORM", norm);
        foreach (string field in fields)
            text.Append(CultureInfo.InvariantCulture, $"KEYWORD \"{field}\"\n");
        text.Append(CultureInfo.InvariantCulture, $"NUMBER_OF_FIELDS {fields.Length}\nBEGIN_DATA_FORMAT\n{string.Join(' ', fields)}\nEND_DATA_FORMAT\n\n");
        string data = string.Join(' ', values.Select(static value => value.ToString("F8", CultureInfo.InvariantCulture)));
        text.Append(CultureInfo.InvariantCulture, $"NUMBER_OF_SETS 1\nBEGIN_DATA\n{data}\nEND_DATA\n");
        File.WriteAllText(Path.Combine(_folder.FullName, file), text.ToString());
    }

    private static void AddKeyword(StringBuilder text, string name, string value)
        => text.Append(CultureInfo.InvariantCulture, $"KEYWORD \"{name}\"\n{name} \"{value}\"\n");

    private static double[] ReadTristimulus(string text)
    {
        string[] fields = Words(text, "BEGIN_DATA_FORMAT", "END_DATA_FORMAT");
        string[] data = Words(text, "BEGIN_DATA\n", "END_DATA\n");
        return [.. TristimulusFields.Select(name => double.Parse(data[Array.IndexOf(fields, name)], CultureInfo.InvariantCulture))];
    }

    private static string[] Words(string text, string from, string to)
    {
        int start = text.IndexOf(from, StringComparison.Ordinal) + from.Length;
        int end = text.IndexOf(to, start, StringComparison.Ordinal);
        return text[start..end].Split((char[]?)null, StringSplitOptions.RemoveEmptyEntries);
    }
}
