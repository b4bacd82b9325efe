using System.Globalization;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Tests.Grating.Reference;

/// <summary>One line of hollow-ellipses.csv or platelets.csv: rows of hollow bodies and what they reflect and transmit, computed by an
/// independent method (spectral_elements.py, platelets.py).</summary>
internal sealed class ReferenceValue
{
    private readonly Dictionary<string, string> _cells;

    private ReferenceValue(IEnumerable<string> names, string line)
        => _cells = names.Zip(line.Split(',')).ToDictionary(pair => pair.First, pair => pair.Second);

    public static IReadOnlyList<ReferenceValue> Ellipses { get; } = Read("hollow-ellipses.csv");

    public static IReadOnlyList<ReferenceValue> Platelets { get; } = Read("platelets.csv");

    public PlainLight Light => new(this["wavelength"], this["incidence"], _cells["polarization"] == "p", this["axis"]);

    public double Reflectance => this["reflectance"];

    public double Diffracted => this["diffracted"];

    public double Transmittance => this["transmittance"];

    /// <summary>How far two resolutions of the independent method differ.</summary>
    public double Change => this["change"];

    /// <summary>Whether the wall is thinner than a tenth of the body.</summary>
    public bool HasThinShell => !IsPlatelet && this["height"] - this["lumen_height"] < .2 * this["height"];

    /// <summary>Whether the bodies are round rods.</summary>
    public bool IsRound => !IsPlatelet && this["height"] == this["width"];

    /// <summary>Harmonics that resolve the period for a start.</summary>
    public int Harmonics => this["spacing"] > 300 ? 9 : 5;

    private bool IsPlatelet => _cells.ContainsKey("wall");

    private double this[string name] => double.Parse(_cells[name], CultureInfo.InvariantCulture);

    public SectionPermittivities Section() => SectionText.Load(Text(), Light.WavelengthNm);

    public override string ToString() => string.Join(' ', _cells.Values);

    private string Text() => string.Create(CultureInfo.InvariantCulture, $"""
        [barbule]
        surround = {SectionText.Index(this["surround_n"])}
        matrix = {SectionText.Index(1.55)}
        backing = {SectionText.Index(this["backing_n"], this["backing_k"])}
        axis = {this["axis"]}
        [cortex]
        thickness = {this["cortex"]}
        [[layer]]
        material = {SectionText.Index(this["body_n"], this["body_k"])}
        lumen_material = {SectionText.Index(1)}
        {(IsPlatelet ? Keys("platelet", "thickness", "width", "wall") : Keys("flattened-rod", "height", "width", "lumen_height", "lumen_width"))}
        spacing = {this["spacing"]}
        rows = {this["rows"]}
        {(this["rows"] > 1 ? Keys(null, "pitch") : "")}
        stacking = "staggered"
        gap = {this["gap"]}
        """);

    private string Keys(string? form, params string[] names)
        => (form is null ? "" : $"form = \"{form}\"\n") + string.Join('\n', names.Select(name => $"{name} = {_cells[name]}"));

    private static ReferenceValue[] Read(string file)
    {
        string path = Path.Combine(Repository.Root, "tests", "BarbuleOptics.Tests", "Grating", "Reference", file);
        string[] lines = [.. File.ReadLines(path).Where(line => !line.StartsWith('#'))];
        string[] names = lines[0].Split(',');
        return [.. lines[1..].Select(line => new ReferenceValue(names, line))];
    }
}
