using System.Text.RegularExpressions;

namespace BarbuleOptics.Files.Specimens;

/// <summary>The keys of a structure file that a table of specimens has columns for, and what those are called.</summary>
internal static partial class SpecimenKeys
{
    /// <summary>The column of names.</summary>
    public const string Specimen = "specimen";

    /// <summary>Most layers, and most bodies of one.</summary>
    public const int MostItems = 99;

    private static readonly Dictionary<string, string> Short = new(StringComparer.Ordinal)
    {
        ["cortex"] = "cortex.thickness", ["surround"] = "barbule.surround", ["matrix"] = "barbule.matrix", ["backing"] = "barbule.backing", ["axis"] = "barbule.axis",
    };

    private static readonly Dictionary<string, CellKind> Fixed = new(StringComparer.Ordinal)
    {
        ["cortex.thickness"] = CellKind.Length, ["barbule.surround"] = CellKind.Text, ["barbule.matrix"] = CellKind.Text, ["barbule.backing"] = CellKind.Text,
        ["barbule.axis"] = CellKind.TextOrNumber, ["back.thickness"] = CellKind.Length, ["back.behind"] = CellKind.Text, ["back.coherent"] = CellKind.Flag,
        ["preparation.obliquity"] = CellKind.Factor, ["preparation.keratin_scale"] = CellKind.Factor, ["preparation.melanin_scale"] = CellKind.Factor,
        ["preservation.melanosome_shrinkage"] = CellKind.Factor, ["preservation.cortex_shrinkage"] = CellKind.Factor,
    };

    private static readonly Dictionary<string, CellKind> OfBody = new(StringComparer.Ordinal)
    {
        ["form"] = CellKind.Text, ["material"] = CellKind.Text, ["lumen_material"] = CellKind.Text, ["diameter"] = CellKind.Length, ["lumen"] = CellKind.Length,
        ["height"] = CellKind.Length, ["width"] = CellKind.Length, ["lumen_height"] = CellKind.Length, ["lumen_width"] = CellKind.Length,
        ["thickness"] = CellKind.Length, ["wall"] = CellKind.Length, ["core_air"] = CellKind.Number,
    };

    private static readonly Dictionary<string, CellKind> OfLayer = new(OfBody, StringComparer.Ordinal)
    {
        ["spacing"] = CellKind.Length, ["separation"] = CellKind.Length, ["rows"] = CellKind.Number, ["pitch"] = CellKind.Length, ["row_separation"] = CellKind.Length,
        ["stacking"] = CellKind.Text, ["shift"] = CellKind.Number, ["gap"] = CellKind.Length,
    };

    private static readonly Dictionary<string, CellKind> OfPlacedBody = new(OfBody, StringComparer.Ordinal) { ["x"] = CellKind.Number, ["z"] = CellKind.Number };

    /// <summary>The path in a structure file of what a column is called, without part and unit.</summary>
    public static string PathOf(string name) => Short.GetValueOrDefault(name, name);

    /// <summary>What a path is called in a table.</summary>
    public static string NameOf(string path) => Short.FirstOrDefault(pair => pair.Value == path).Key ?? path;

    /// <summary>What a path holds; null where a structure file has no such key.</summary>
    public static CellKind? KindOf(string path)
    {
        if (Fixed.TryGetValue(path, out CellKind kind))
            return kind;
        Match match = Item().Match(path);
        if (!match.Success)
            return null;
        Dictionary<string, CellKind> keys = match.Groups["body"].Success ? OfPlacedBody : OfLayer;
        return keys.TryGetValue(match.Groups["key"].Value, out kind) ? kind : null;
    }

    /// <summary>Names near to a wrong one, to suggest from.</summary>
    public static IEnumerable<string> Candidates(string wrong)
    {
        int dot = wrong.LastIndexOf('.');
        IEnumerable<string> keys = OfLayer.Keys.Concat(["x", "z"]);
        string prefix = dot > 0 && wrong.StartsWith("layer", StringComparison.Ordinal) ? wrong[..(dot + 1)] : "layer1.";
        return [Specimen, .. Short.Keys, .. Fixed.Keys, .. keys.Select(key => prefix + key)];
    }

    [GeneratedRegex(@"^layer[1-9][0-9]?(?<body>\.body[1-9][0-9]?)?\.(?<key>[a-z_]+)$")]
    private static partial Regex Item();
}
