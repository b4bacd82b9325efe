using System.Globalization;
using System.Text;

namespace BarbuleOptics.Tests.Files;

/// <summary>Makes wrong and odd files out of good ones, the same for the same seed.</summary>
internal sealed class StructureMutator(int seed)
{
    private static readonly string[] Values =
    [
        "0", "-1", "1e308", "1e-308", "1e999", "nan", "inf", "-inf", "0x10", "99999999999999999999", "1000001", "true", "\"\"", "'rod'", "'film'", "'platelet'",
        "[]", "[[]]", "[1, 2]", "[[1], [2, 3]]", "[1, 'x']", "{}", "{ mean = 1, sd = 0 }", "{ mean = 100, sd = 5, n = 3 }", "{ min = 2, max = 1 }", "{ min = 0, max = 1e6 }",
        "{ n = 1.5 }", "{ n = 1.5, k = 0.1 }", "{ n = 0 }", "'own.toml'", "'a/b'", "'unknown'", "1979-05-27", "07:32:00", "1.", "1,5", "\"\\u0000\"", "\"\"\"\n\"\"\"",
    ];

    private static readonly string[] Keys =
    [
        "format", "name", "surround", "matrix", "backing", "axis", "thickness", "form", "material", "lumen_material", "diameter", "lumen", "height", "width", "lumen_height",
        "lumen_width", "wall", "core_air", "spacing", "separation", "rows", "pitch", "row_separation", "stacking", "shift", "gap", "x", "z", "behind", "coherent", "body", "layer", "mean", "sd",
    ];

    private static readonly string[] Headers = ["[barbule]", "[cortex]", "[back]", "[[layer]]", "[[layer.body]]", "[layer]", "[layer.body]", "[a.b]", "[[cortex]]"];

    private readonly Random _random = new(seed);

    /// <summary>One to three changes of bytes, numbers, words, keys, lines or nesting.</summary>
    public byte[] Mutate(string text)
    {
        for (int i = _random.Next(1, 4); i > 0; i--)
            text = ChangeText(text);
        byte[] bytes = Encoding.UTF8.GetBytes(text);
        return _random.Next(4) == 0 ? ChangeBytes(bytes) : bytes;
    }

    private string ChangeText(string text)
    {
        List<string> lines = [.. text.Split('\n')];
        int line = _random.Next(lines.Count);
        switch (_random.Next(10))
        {
            case 0:
                lines.RemoveAt(line);
                break;
            case 1:
                lines.Insert(_random.Next(lines.Count + 1), lines[line]);
                break;
            case 2:
                (lines[line], lines[^1]) = (lines[^1], lines[line]);
                break;
            case 3:
                lines.Insert(line, Pick(Headers));
                break;
            case 4:
                lines.Insert(line, $"{Pick(Keys)} = {Pick(Values)}");
                break;
            case 5 or 6:
                lines[line] = WithValue(lines[line], Pick(Values));
                break;
            case 7:
                lines[line] = WithNumber(lines[line]);
                break;
            case 8:
                lines[line] = WithKey(lines[line], Pick(Keys));
                break;
            default:
                string bracket = _random.Next(2) == 0 ? "[" : "{ a = ";
                lines[line] = WithValue(lines[line], string.Concat(Enumerable.Repeat(bracket, _random.Next(1, 200))) + Pick(Values));
                break;
        }
        return string.Join('\n', lines);
    }

    private byte[] ChangeBytes(byte[] bytes)
    {
        if (bytes.Length == 0)
            return bytes;
        int place = _random.Next(bytes.Length);
        switch (_random.Next(3))
        {
            case 0:
                bytes[place] = (byte)_random.Next(256);
                return bytes;
            case 1:
                return bytes[..place];
            default:
                return [.. bytes[..place], (byte)_random.Next(256), .. bytes[place..]];
        }
    }

    // A number of the line, scaled far or a little, or of the other sign.
    private string WithNumber(string line)
    {
        int start = line.AsSpan().IndexOfAnyInRange('0', '9');
        if (start < 0)
            return line;
        int end = start;
        while (end < line.Length && (char.IsAsciiDigit(line[end]) || line[end] == '.'))
            end++;
        if (!double.TryParse(line[start..end], CultureInfo.InvariantCulture, out double number))
            return line;
        double[] factors = [-1, 0, 0.5, 0.99, 1.01, 2, 1000, 1e-9, 1e300];
        return line[..start] + (number * factors[_random.Next(factors.Length)]).ToString("R", CultureInfo.InvariantCulture) + line[end..];
    }

    private static string WithValue(string line, string value)
        => line.IndexOf('=', StringComparison.Ordinal) is var equals and >= 0 ? line[..(equals + 1)] + " " + value : line + value;

    private static string WithKey(string line, string key)
        => line.IndexOf('=', StringComparison.Ordinal) is var equals and >= 0 ? key + " " + line[equals..] : line;

    private string Pick(string[] choices) => choices[_random.Next(choices.Length)];
}
