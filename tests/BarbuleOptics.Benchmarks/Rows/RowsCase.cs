using System.Globalization;
using System.Text;
using BarbuleOptics.Files;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Benchmarks.Rows;

/// <summary>Five staggered rows of rods, 120 nm, spacing 170, pitch 150 nm, eumelanin in keratin, air above and keratin below, lit from
/// one direction in one polarization.</summary>
/// <param name="LumenNm">Diameter of the lumen, in nm; 0 for solid rods.</param>
/// <param name="CortexNm">Thickness of the cortex, in nm.</param>
/// <param name="IncidenceDeg">Angle of incidence, in degrees.</param>
/// <param name="Polarization">S or P.</param>
internal sealed record RowsCase(int LumenNm, int CortexNm, int IncidenceDeg, Polarizations Polarization)
{
    /// <summary>All of them.</summary>
    public static IReadOnlyList<RowsCase> All { get; } =
    [
        .. from lumen in new[] { 0, 70 }
           from cortex in new[] { 0, 150 }
           from incidence in new[] { 0, 30 }
           from polarization in new[] { Polarizations.S, Polarizations.P }
           select new RowsCase(lumen, cortex, incidence, polarization),
    ];

    /// <summary>s or p.</summary>
    public string PolarizationName => Polarization == Polarizations.S ? "s" : "p";

    /// <summary>Angle of incidence.</summary>
    public Angle Incidence => Angle.FromDegrees(IncidenceDeg);

    /// <summary>The section at some wavelengths.</summary>
    /// <param name="wavelengthsNm">Vacuum wavelengths, in nm.</param>
    public SectionPermittivities Section(double[] wavelengthsNm)
    {
        string text = string.Create(CultureInfo.InvariantCulture, $"""
            format = 1
            [cortex]
            thickness = {CortexNm}
            [[layer]]
            form = "rod"
            diameter = 120
            lumen = {LumenNm}
            spacing = 170
            rows = 5
            pitch = 150
            stacking = "staggered"
            gap = 0
            """);
        FileResult<LoadedStructure> file = StructureFile.Parse(Encoding.UTF8.GetBytes(text), "rows.toml", null, EmbeddedMaterials.Catalog, []);
        if (!file.Succeeded)
            throw new InvalidOperationException(string.Join('\n', file.Problems));
        return SectionBuilder.TryBuild(file.Value.Barbule, out Section? section, out _)
            ? new SectionPermittivities(section, file.Value.Catalog, wavelengthsNm)
            : throw new InvalidOperationException("The rows cannot exist.");
    }
}
