using System.Globalization;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Tests.Grating.Reference;

/// <summary>One line of hollow-ellipses.csv: rows of hollow elliptical rods and what they reflect and transmit, computed by an
/// independent method (spectral_elements.py).</summary>
internal sealed class EllipseValue
{
    private readonly Dictionary<string, string> _cells;

    private EllipseValue(IEnumerable<string> names, string line)
        => _cells = names.Zip(line.Split(',')).ToDictionary(pair => pair.First, pair => pair.Second);

    public static IReadOnlyList<EllipseValue> All { get; } = Read();

    public PlainLight Light => new(this["wavelength"], this["incidence"], _cells["polarization"] == "p", this["axis"]);

    public double Reflectance => this["reflectance"];

    public double Diffracted => this["diffracted"];

    public double Transmittance => this["transmittance"];

    /// <summary>How far two resolutions of the independent method differ.</summary>
    public double Change => this["change"];

    /// <summary>Whether the wall is thinner than a tenth of the rod.</summary>
    public bool HasThinShell => this["height"] - this["lumen_height"] < .2 * this["height"];

    /// <summary>Harmonics that resolve the period for a start.</summary>
    public int Harmonics => this["spacing"] > 300 ? 9 : 5;

    private double this[string name] => double.Parse(_cells[name], CultureInfo.InvariantCulture);

    public SectionPermittivities Section() => SectionText.Load(Text(), Light.WavelengthNm);

    public override string ToString() => string.Join(' ', _cells.Values);

    private string Text()
    {
        double cortexNm = this["cortex"];
        return FormattableString.Invariant($"""
            [barbule]
            surround = {SectionText.Index(this["surround_n"])}
            matrix = {SectionText.Index(1.55)}
            backing = {SectionText.Index(this["backing_n"], this["backing_k"])}
            axis = {this["axis"]}
            [cortex]
            thickness = {cortexNm}
            [[layer]]
            form = "flattened-rod"
            material = {SectionText.Index(this["rod_n"], this["rod_k"])}
            lumen_material = {SectionText.Index(1)}
            height = {this["height"]}
            width = {this["width"]}
            lumen_height = {this["lumen_height"]}
            lumen_width = {this["lumen_width"]}
            spacing = {this["spacing"]}
            rows = {this["rows"]}
            {(this["rows"] > 1 ? FormattableString.Invariant($"pitch = {this["pitch"]}") : "")}
            stacking = "staggered"
            gap = {this["gap"]}
            """);
    }

    private static EllipseValue[] Read()
    {
        string path = Path.Combine(Repository.Root, "tests", "BarbuleOptics.Tests", "Grating", "Reference", "hollow-ellipses.csv");
        string[] lines = [.. File.ReadLines(path).Where(line => !line.StartsWith('#'))];
        string[] names = lines[0].Split(',');
        return [.. lines[1..].Select(line => new EllipseValue(names, line))];
    }
}
