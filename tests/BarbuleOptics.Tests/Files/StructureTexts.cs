using System.Text;
using BarbuleOptics.Files;
using Xunit;

namespace BarbuleOptics.Tests.Files;

/// <summary>Structure files for tests (invented), a small catalog, and a short way to read them.</summary>
internal static class StructureTexts
{
    /// <summary>The structure of the format's description, line for line.</summary>
    public const string Rods = """
        format = 1
        name   = "Sallow Fen reedling, throat barbule"

        [barbule]
        surround = "air"          # where the light comes from: lossless
        matrix   = "keratin"      # the cortex and what embeds the melanosomes
        backing  = "keratin"      # half-space under the last row
        axis     = "across"

        [cortex]
        thickness = { mean = 182, sd = 9, n = 14 }

        [[layer]]
        form     = "rod"
        material = "eumelanin"
        diameter = [118, 121, 116, 120]
        lumen    = 0
        spacing  = 160
        rows     = 4
        pitch    = 150
        stacking = "staggered"
        gap      = 40
        """;

    /// <summary>Three layers: hollow flattened rods, hollow platelets, films; a finite barbule in water.</summary>
    public const string Mixed = """
        format = 1
        [barbule]
        surround = "water"
        matrix = { n = 1.55 }
        backing = "unknown"
        axis = 37.5
        [cortex]
        thickness = { min = 5, max = 250.5 }
        [[layer]]
        form = "flattened-rod"
        height = { mean = 90.5, sd = 4, n = 6, sd_between = 2.5 }
        width = [[210, 205.5], [198], [220, 221, 219]]
        lumen_height = 40
        lumen_width = 100
        lumen_material = { n = 1.5, k = 1e-4 }
        separation = 0
        rows = [3, 4, 4]
        row_separation = { mean = 12, sd = 3 }
        shift = 0.25
        gap = -10
        [[layer]]
        form = "platelet"
        thickness = 60
        width = 400
        wall = 12
        core_air = 0.8
        spacing = 400
        [[layer]]
        form = "film"
        thickness = 75
        rows = 2
        pitch = 180
        [back]
        thickness = { mean = 2500, sd = 300, n = 3 }
        behind = "air"
        coherent = true
        """;

    /// <summary>Two bodies in a cell.</summary>
    public const string Bodies = """
        format = 1
        [cortex]
        thickness = 120
        [[layer]]
        spacing = 300
        rows = 3
        pitch = 200
        [[layer.body]]
        form = "rod"
        diameter = 130
        lumen = 60
        [[layer.body]]
        form = "platelet"
        material = "keratin"
        thickness = 40
        width = 90
        x = 0.5
        z = -25
        [[layer]]
        form = "rod"
        diameter = 80
        separation = 15
        """;

    /// <summary>A plain multilayer of films.</summary>
    public const string Films = """
        format = 1
        name = "films"
        layer = [ { form = "film", thickness = 80 }, { form = "film", thickness = 100, material = "keratin", gap = 20 } ]
        """;

    /// <summary>A cortex alone.</summary>
    public const string Cortex = """
        format = 1
        cortex.thickness = 350
        [barbule]
        backing = "eumelanin"
        """;

    /// <summary>Every sample.</summary>
    public static readonly string[] All = [Rods, Mixed, Bodies, Films, Cortex];

    /// <summary>Materials enough for the samples.</summary>
    public static readonly MaterialCatalog Catalog = MaterialCatalog.Of(
    [
        Table("air", "kind = \"constant\"\nvalue = 1", "kind = \"constant\"\nvalue = 0"),
        Table("keratin", "kind = \"cauchy\"\na = 1.532\nb = 5890", "kind = \"constant\"\nvalue = 0"),
        Table("eumelanin", "kind = \"cauchy\"\na = 1.648\nb = 23700", "kind = \"exponential-absorption\"\na = 0.56\nb = 270"),
        Table("water", "kind = \"constant\"\nvalue = 1.33", "kind = \"table\"\nwavelengths = [300, 800]\nvalues = [1e-8, 1e-7]"),
    ]);

    /// <summary>Text of a material table in nm over 300 to 800 nm.</summary>
    public static string TableText(string name, string n, string k) => $"""
        format = 1
        name = "{name}"
        unit = "nm"
        range_nm = [300, 800]
        source = "invented"
        obtained = "for a test"
        [n]
        {n}
        [k]
        {k}
        """;

    /// <summary>Reads a text as the file throat.toml without a folder.</summary>
    public static FileResult<LoadedStructure> Read(string text, params string[] sets)
        => StructureFile.Parse(Encoding.UTF8.GetBytes(text), "throat.toml", null, Catalog, sets);

    /// <summary>Reads a text that must be free of problems.</summary>
    public static LoadedStructure Good(string text, params string[] sets) => Good(text, Catalog, sets);

    /// <summary>Reads a text that must be free of problems.</summary>
    public static LoadedStructure Good(string text, MaterialCatalog catalog, params string[] sets)
    {
        FileResult<LoadedStructure> result = StructureFile.Parse(Encoding.UTF8.GetBytes(text), "throat.toml", null, catalog, sets);
        Assert.True(result.Succeeded, string.Join('\n', result.Problems));
        return result.Value;
    }

    private static MaterialTable Table(string name, string n, string k)
    {
        FileResult<MaterialTable> table = MaterialTableFile.Parse(Encoding.UTF8.GetBytes(TableText(name, n, k)), name + ".toml");
        Assert.True(table.Succeeded, string.Join('\n', table.Problems));
        return table.Value;
    }
}
