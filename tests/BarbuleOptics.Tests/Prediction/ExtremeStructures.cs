using System.Globalization;
using System.Text;

namespace BarbuleOptics.Tests.Prediction;

/// <summary>Structure files with values from one end of what is allowed to the other, the same for the same seed.</summary>
internal sealed class ExtremeStructures(int seed)
{
    private static readonly string[] Indices = ["1e-300", "1e-6", "1e-3", "0.05", "0.999", "1", "1", "1.5", "2.7", "10", "100"];
    private static readonly string[] Losses = ["0", "1e-300", "1e-12", "0.3", "1", "5", "100"];
    private static readonly string[] Names = ["'air'", "'keratin'", "'eumelanin'", "'silver'", "'water'", "'resin'"];

    private readonly Random _random = new(seed);

    public string Next()
    {
        var text = new StringBuilder("format = 1\n[barbule]\n");
        Line(text, "surround", _random.Next(3) > 0 ? "'air'" : $"{{ n = {Pick(Indices)} }}");
        Line(text, "matrix", Material());
        Line(text, "backing", Material());
        Line(text, "axis", Pick(["'across'", "'along'"]));
        if (_random.Next(2) == 0)
            text.Append("[cortex]\n").Append(CultureInfo.InvariantCulture, $"thickness = {Size()}\n");
        if (_random.Next(3) == 0)
            text.Append(CultureInfo.InvariantCulture, $"[back]\nthickness = {Size()}\nbehind = {Material()}\ncoherent = {Pick(["true", "false"])}\n");
        for (int layers = _random.Next(1, 4); layers > 0; layers--)
            AddLayer(text);
        return text.ToString();
    }

    private void AddLayer(StringBuilder text)
    {
        text.Append("[[layer]]\n");
        double width = Scale(), height = Scale();
        switch (_random.Next(4))
        {
            case 0:
                Line(text, "form", "'film'");
                Line(text, "thickness", Number(height));
                break;
            case 1:
                Line(text, "form", "'rod'");
                Line(text, "diameter", Number(width));
                Line(text, "lumen", Number(width * Share()));
                Line(text, "separation", Number(width * Share()));
                break;
            case 2:
                Line(text, "form", "'flattened-rod'");
                Line(text, "height", Number(height));
                Line(text, "width", Number(width));
                Line(text, "lumen_height", Number(height * Share()));
                Line(text, "lumen_width", Number(width * Share()));
                Line(text, "separation", Number(width * Share()));
                break;
            default:
                Line(text, "form", "'platelet'");
                Line(text, "thickness", Number(height));
                Line(text, "width", Number(width));
                Line(text, "wall", Number(Math.Min(height, width) / 2 * Share()));
                Line(text, "core_air", Pick(["0", "1e-9", "0.5", "1"]));
                Line(text, "separation", Pick(["0", "1", "1e-9"]));
                break;
        }
        Line(text, "material", Material());
        if (_random.Next(2) == 0)
        {
            Line(text, "rows", Pick(["2", "7", "40"]));
            Line(text, "row_separation", Pick(["0", "1e-9", "3", "200"]));
        }
        if (_random.Next(2) == 0)
            Line(text, "gap", Pick(["0", "1e-9", "1e6", "-1e-7", "25"]));
    }

    private string Material() => _random.Next(3) == 0 ? Pick(Names) : $"{{ n = {Pick(Indices)}, k = {Pick(Losses)} }}";

    private string Size() => Number(Scale());

    // From 1e-9 nm to 1 mm, half of the time as in a barbule.
    private double Scale() => _random.Next(2) == 0 ? 20 + 300 * _random.NextDouble() : Math.Pow(10, -9 + 15 * _random.NextDouble());

    private double Share() => _random.Next(5) switch { 0 => 0, 1 => 1e-12, 2 => 1 - 1e-12, _ => _random.NextDouble() };

    private static string Number(double value) => value.ToString("R", CultureInfo.InvariantCulture);

    private static void Line(StringBuilder text, string key, string value) => text.Append(CultureInfo.InvariantCulture, $"{key} = {value}\n");

    private string Pick(string[] choices) => choices[_random.Next(choices.Length)];
}
