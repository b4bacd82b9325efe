using System.Numerics;
using BarbuleOptics.Materials;

namespace BarbuleOptics.Layering;

/// <summary>Permittivities of everything in a section at the wavelengths of a grid.</summary>
public sealed class SectionPermittivities
{
    private readonly Complex[] _inside;
    private readonly double[] _surroundIndex;
    private readonly Complex[] _backing;
    private readonly Complex[]? _behind;
    private readonly SampledMaterials _materials;

    /// <summary>Looks every material of <paramref name="section"/> up at every wavelength.</summary>
    /// <exception cref="ArgumentException">A material is not in the catalog, the surround absorbs, or a table does not reach a wavelength.</exception>
    public SectionPermittivities(Section section, IMaterialCatalog catalog, ReadOnlySpan<double> wavelengthsNm)
        : this(section, new SampledMaterials(catalog, wavelengthsNm))
    {
    }

    /// <summary>The same from materials that were looked up before: for many sections of the same materials.</summary>
    internal SectionPermittivities(Section section, SampledMaterials materials)
    {
        ArgumentNullException.ThrowIfNull(section);
        Section = section;
        _materials = materials;
        MaterialCount = section.Materials.Count;
        _inside = new Complex[materials.WavelengthsNm.Length * MaterialCount];
        for (int m = 0; m < MaterialCount; m++)
        {
            ReadOnlySpan<Complex> values = materials.Of(section.Materials[m]);
            for (int w = 0; w < values.Length; w++)
                _inside[w * MaterialCount + m] = values[w];
        }
        _surroundIndex = materials.LosslessIndexOf(section.Surround);
        _backing = materials.Of(section.Backing);
        _behind = section.Back is null ? null : materials.Of(section.Back.Behind);
    }

    /// <summary>The section.</summary>
    public Section Section { get; }

    /// <summary>Number of materials inside.</summary>
    public int MaterialCount { get; }

    /// <summary>Vacuum wavelengths, in nm.</summary>
    public ReadOnlySpan<double> WavelengthsNm => _materials.WavelengthsNm;

    /// <summary>Real index of the surround at each wavelength.</summary>
    public ReadOnlySpan<double> SurroundIndex => _surroundIndex;

    /// <summary>Permittivity of the backing at each wavelength.</summary>
    public ReadOnlySpan<Complex> Backing => _backing;

    /// <summary>Permittivity behind a finite barbule at each wavelength; empty for a half-space.</summary>
    public ReadOnlySpan<Complex> Behind => _behind;

    /// <summary>Permittivities of all materials inside at one wavelength, by their number.</summary>
    public ReadOnlySpan<Complex> Inside(int wavelength) => _inside.AsSpan(wavelength * MaterialCount, MaterialCount);
}
