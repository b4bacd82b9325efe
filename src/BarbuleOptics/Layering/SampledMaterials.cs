using System.Collections.Concurrent;
using System.Numerics;
using BarbuleOptics.Materials;

namespace BarbuleOptics.Layering;

/// <summary>Permittivities of materials at the wavelengths of a grid, each looked up once, however many sections ask for it. Safe to share between threads.</summary>
internal sealed class SampledMaterials
{
    private readonly IMaterialCatalog _catalog;
    private readonly double[] _wavelengthsNm;
    private readonly ConcurrentDictionary<MaterialReference, Complex[]> _plain = new();
    private readonly ConcurrentDictionary<SectionMaterial, Complex[]> _averaged = new();
    private readonly ConcurrentDictionary<MaterialReference, double[]> _lossless = new();

    /// <summary>Nothing is looked up yet.</summary>
    public SampledMaterials(IMaterialCatalog catalog, ReadOnlySpan<double> wavelengthsNm)
    {
        ArgumentNullException.ThrowIfNull(catalog);
        _catalog = catalog;
        _wavelengthsNm = wavelengthsNm.ToArray();
    }

    /// <summary>Vacuum wavelengths, in nm.</summary>
    public ReadOnlySpan<double> WavelengthsNm => _wavelengthsNm;

    /// <summary>A material as it is; not to be changed.</summary>
    /// <exception cref="ArgumentException">It is not in the catalog, or a table does not reach a wavelength.</exception>
    public Complex[] Of(MaterialReference reference)
    {
        // Constants may be another in every draw: they are made anew, or memory would grow with the draws.
        return reference is MaterialReference.Inline ? Sample(this, reference) : _plain.GetOrAdd(reference, static (key, all) => Sample(all, key), this);

        static Complex[] Sample(SampledMaterials all, MaterialReference key)
        {
            Material material = all.Find(key);
            return Array.ConvertAll(all._wavelengthsNm, wavelength => At(material, wavelength));
        }
    }

    /// <summary>A material of a section, which may be an average of two; not to be changed.</summary>
    /// <exception cref="ArgumentException">One is not in the catalog, or a table does not reach a wavelength.</exception>
    public Complex[] Of(SectionMaterial material)
    {
        ArgumentNullException.ThrowIfNull(material);
        if (material.Filler is null)
            return Of(material.Main);
        return material.Main is MaterialReference.Inline || material.Filler is MaterialReference.Inline
            ? Average(this, material) : _averaged.GetOrAdd(material, static (key, all) => Average(all, key), this);

        static Complex[] Average(SampledMaterials all, SectionMaterial key)
        {
            Complex[] main = all.Of(key.Main), filler = all.Of(key.Filler!);
            return [.. main.Zip(filler, (one, other) => PorousCore.Average(one, other, key.FillerShare))];
        }
    }

    /// <summary>The real index of a surround; not to be changed.</summary>
    /// <exception cref="ArgumentException">It is not in the catalog, absorbs, or a table does not reach a wavelength.</exception>
    public double[] LosslessIndexOf(MaterialReference reference)
    {
        return reference is MaterialReference.Inline ? Sample(this, reference) : _lossless.GetOrAdd(reference, static (key, all) => Sample(all, key), this);

        static double[] Sample(SampledMaterials all, MaterialReference key)
        {
            Material material = all.Find(key);
            return Array.ConvertAll(all._wavelengthsNm, wavelength => LosslessIndex(material, wavelength));
        }
    }

    private Material Find(MaterialReference reference)
        => _catalog.TryFind(reference, out Material? material)
            ? material
            : throw new ArgumentException($"No material '{reference}' in the catalog.", nameof(reference));

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
