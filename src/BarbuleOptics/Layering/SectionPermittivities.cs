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
    private readonly double[] _wavelengthsNm;

    /// <summary>Looks every material of <paramref name="section"/> up at every wavelength.</summary>
    /// <exception cref="ArgumentException">A material is not in the catalog, the surround absorbs, or a table does not reach a wavelength.</exception>
    public SectionPermittivities(Section section, IMaterialCatalog catalog, ReadOnlySpan<double> wavelengthsNm)
    {
        ArgumentNullException.ThrowIfNull(section);
        ArgumentNullException.ThrowIfNull(catalog);
        Section = section;
        _wavelengthsNm = wavelengthsNm.ToArray();
        MaterialCount = section.Materials.Count;
        _inside = new Complex[_wavelengthsNm.Length * MaterialCount];
        for (int m = 0; m < MaterialCount; m++)
        {
            SectionMaterial material = section.Materials[m];
            Material main = Find(catalog, material.Main);
            Material? filler = material.Filler is null ? null : Find(catalog, material.Filler);
            for (int w = 0; w < _wavelengthsNm.Length; w++)
            {
                Complex permittivity = At(main, _wavelengthsNm[w]);
                _inside[w * MaterialCount + m] = filler is null
                    ? permittivity
                    : PorousCore.Average(permittivity, At(filler, _wavelengthsNm[w]), material.FillerShare);
            }
        }

        Material surround = Find(catalog, section.Surround);
        _surroundIndex = Array.ConvertAll(_wavelengthsNm, wavelength => LosslessIndex(surround, wavelength));
        Material backing = Find(catalog, section.Backing);
        _backing = Array.ConvertAll(_wavelengthsNm, wavelength => At(backing, wavelength));
        if (section.Back is not null)
        {
            Material behind = Find(catalog, section.Back.Behind);
            _behind = Array.ConvertAll(_wavelengthsNm, wavelength => At(behind, wavelength));
        }
    }

    /// <summary>The section.</summary>
    public Section Section { get; }

    /// <summary>Number of materials inside.</summary>
    public int MaterialCount { get; }

    /// <summary>Vacuum wavelengths, in nm.</summary>
    public ReadOnlySpan<double> WavelengthsNm => _wavelengthsNm;

    /// <summary>Real index of the surround at each wavelength.</summary>
    public ReadOnlySpan<double> SurroundIndex => _surroundIndex;

    /// <summary>Permittivity of the backing at each wavelength.</summary>
    public ReadOnlySpan<Complex> Backing => _backing;

    /// <summary>Permittivity behind a finite barbule at each wavelength; empty for a half-space.</summary>
    public ReadOnlySpan<Complex> Behind => _behind;

    /// <summary>Permittivities of all materials inside at one wavelength, by their number.</summary>
    public ReadOnlySpan<Complex> Inside(int wavelength) => _inside.AsSpan(wavelength * MaterialCount, MaterialCount);

    private static Material Find(IMaterialCatalog catalog, MaterialReference reference)
        => catalog.TryFind(reference, out Material? material)
            ? material
            : throw new ArgumentException($"No material '{reference}' in the catalog.", nameof(catalog));

    private static Complex At(Material material, double wavelengthNm)
    {
        CheckReach(material, wavelengthNm);
        double n = material.N.At(wavelengthNm), k = material.K.At(wavelengthNm);
        if (!(n > 0 && k >= 0 && double.IsFinite(n) && double.IsFinite(k)))
            throw new ArgumentException(FormattableString.Invariant($"Material '{material.Name}' has n = {n}, k = {k} at {wavelengthNm} nm; allowed n above 0, k 0 or above."));
        return material.PermittivityAt(wavelengthNm);
    }

    private static double LosslessIndex(Material surround, double wavelengthNm)
    {
        Complex permittivity = At(surround, wavelengthNm);
        return permittivity.Imaginary == 0
            ? Math.Sqrt(permittivity.Real)
            : throw new ArgumentException(FormattableString.Invariant($"The surround '{surround.Name}' absorbs at {wavelengthNm} nm; allowed k = 0."));
    }

    private static void CheckReach(Material material, double wavelengthNm)
    {
        if (!material.Extrapolates && (wavelengthNm < material.LeastNm || wavelengthNm > material.MostNm))
        {
            throw new ArgumentException(FormattableString.Invariant(
                $"Material '{material.Name}' is a table from {material.LeastNm} to {material.MostNm} nm and says nothing at {wavelengthNm} nm."));
        }
    }
}
