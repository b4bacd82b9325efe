using System.Globalization;
using System.Text;

namespace BarbuleOptics.Benchmarks.MixingRules;

/// <summary>Random structures as feather barbules have them, as structure files. Lengths are uniform in the stated ranges, in nm.</summary>
/// <remarks>The ranges are the project's own choice after what the literature reports of melanosomes (common practice, no source):
/// they say what the evidence covers and no more.</remarks>
internal sealed class PlausibleStructures(int seed)
{
    private readonly Random _random = new(seed);

    /// <summary>The forms, in the order in which they are drawn.</summary>
    public static readonly string[] Forms = ["solid rod", "hollow rod", "flattened rod", "hollow flattened rod", "platelet", "porous platelet"];

    /// <summary>The ranges in words, for the documentation.</summary>
    public const string Ranges =
        "cortex 40-400 nm; 1-6 rows, aligned or staggered; rods 80-180 nm, lumen 0.3-0.75 of the diameter; flattened rods 50-110 nm high, 1.5-3 times as wide, "
        + "lumen 0.3-0.7 of both axes; platelets 50-120 nm thick, 1.5-3 times as wide, wall 0.15-0.35 of the thickness, core 30-100 % air; "
        + "0.02-0.5 of the width between neighbors, 15-150 nm between rows; eumelanin and air in keratin, air above, keratin below";

    /// <summary>The next structure.</summary>
    public (string Form, string Text) Next(int number)
    {
        string form = Forms[number % Forms.Length];
        var text = new StringBuilder("format = 1\n[cortex]\n");
        Line(text, "thickness", In(40, 400));
        text.Append("[[layer]]\n");
        double width = form switch
        {
            "solid rod" => Rod(text, hollow: false),
            "hollow rod" => Rod(text, hollow: true),
            "flattened rod" => FlattenedRod(text, hollow: false),
            "hollow flattened rod" => FlattenedRod(text, hollow: true),
            "platelet" => Platelet(text, porous: false),
            _ => Platelet(text, porous: true),
        };
        Line(text, "separation", width * In(0.02, 0.5));
        int rows = _random.Next(1, 7);
        text.Append(CultureInfo.InvariantCulture, $"rows = {rows}\n");
        double between = In(15, 150);
        if (rows > 1)
        {
            Line(text, "row_separation", between);
            text.Append(_random.Next(2) == 0 ? "stacking = \"aligned\"\n" : "stacking = \"staggered\"\n");
        }
        Line(text, "gap", In(20, 150));
        return (form, text.ToString());
    }

    private double Rod(StringBuilder text, bool hollow)
    {
        double diameter = In(80, 180);
        text.Append("form = \"rod\"\n");
        Line(text, "diameter", diameter);
        if (hollow)
            Line(text, "lumen", diameter * In(0.3, 0.75));
        return diameter;
    }

    private double FlattenedRod(StringBuilder text, bool hollow)
    {
        double height = In(50, 110), width = height * In(1.5, 3);
        text.Append("form = \"flattened-rod\"\n");
        Line(text, "height", height);
        Line(text, "width", width);
        if (hollow)
        {
            double share = In(0.3, 0.7);
            Line(text, "lumen_height", height * share);
            Line(text, "lumen_width", width * share);
        }
        return width;
    }

    private double Platelet(StringBuilder text, bool porous)
    {
        double thickness = In(50, 120), width = thickness * In(1.5, 3);
        text.Append("form = \"platelet\"\n");
        Line(text, "thickness", thickness);
        Line(text, "width", width);
        if (porous)
        {
            Line(text, "wall", thickness * In(0.15, 0.35));
            Line(text, "core_air", In(0.3, 1));
        }
        return width;
    }

    private double In(double least, double most) => least + (most - least) * _random.NextDouble();

    private static void Line(StringBuilder text, string key, double value)
        => text.Append(CultureInfo.InvariantCulture, $"{key} = {value:0.###}\n");
}
