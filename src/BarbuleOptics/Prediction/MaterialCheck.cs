using BarbuleOptics.Anatomy;
using BarbuleOptics.Materials;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Prediction;

/// <summary>Whether the materials of a structure have constants at the wavelengths asked for.</summary>
internal static class MaterialCheck
{
    /// <summary>Least index, far below any metal's: a mixing rule divides by sums of permittivities, which losses keep from zero.</summary>
    private const double LeastIndex = 1e-6;

    /// <summary>Beyond this no extended formula is believed: transparent solids end near 4.</summary>
    private const double MostExtrapolatedIndex = 5;

    /// <summary>Every use of a material that has none, one problem each.</summary>
    public static IEnumerable<AnatomyProblem> Find(IEnumerable<MaterialUse> uses, WavelengthGrid grid, IMaterialCatalog catalog)
    {
        bool surround = true;
        foreach (MaterialUse use in uses)
        {
            string? fault = catalog.TryFind(use.Reference, out Material? material) ? Fault(material, grid, surround) : $"no material '{use.Reference}'";
            if (fault is not null)
                yield return new AnatomyProblem(use.Key, fault);
            surround = false;
        }
    }

    private static string? Fault(Material material, WavelengthGrid grid, bool mustBeLossless)
    {
        if (!material.Extrapolates && !material.Covers(grid))
        {
            return FormattableString.Invariant(
                $"found wavelengths {grid.StartNm}-{grid.StopNm} nm; {material.Name} is a table that allows {material.LeastNm}-{material.MostNm} nm, narrow --wavelengths");
        }
        if (ResonanceBetween(material, grid) is double resonanceNm)
        {
            return FormattableString.Invariant(
                $"found wavelengths {grid.StartNm}-{grid.StopNm} nm; {material.Name} has a resonance at {resonanceNm:0.#} nm, beyond which its formula, published for {material.LeastNm}-{material.MostNm} nm, means nothing, narrow --wavelengths");
        }
        foreach (double wavelengthNm in grid.Nanometres)
        {
            double n = material.N.At(wavelengthNm), k = material.K.At(wavelengthNm);
            if (!double.IsFinite(n) || n < LeastIndex)
                return FormattableString.Invariant($"{material.Name} has n = {n} at {wavelengthNm} nm; allowed {LeastIndex} or above{Published(material, wavelengthNm)}");
            if (n > MostExtrapolatedIndex && Published(material, wavelengthNm) is { Length: > 0 } published)
                return FormattableString.Invariant($"{material.Name} has n = {n:G4} at {wavelengthNm} nm; allowed {MostExtrapolatedIndex} or below where a formula is extended{published}");
            if (!double.IsFinite(k) || k < 0)
                return FormattableString.Invariant($"{material.Name} has k = {k} at {wavelengthNm} nm; allowed 0 or above{Published(material, wavelengthNm)}");
            if (mustBeLossless && k > 0)
                return FormattableString.Invariant($"{material.Name} absorbs (k = {k:G4} at {wavelengthNm} nm); allowed a lossless surround, k = 0");
        }
        return null;
    }

    private static string Published(Material material, double wavelengthNm)
        => wavelengthNm >= material.LeastNm && wavelengthNm <= material.MostNm
            ? "" : FormattableString.Invariant($" (its formula was published for {material.LeastNm}-{material.MostNm} nm)");

    /// <summary>A resonance of Sellmeier's equation, in nm, that parts some of the grid from the published range; null when none does.</summary>
    /// <remarks>The equation stands for frequencies between two resonances; on the far side of one it gives a number that is no index.</remarks>
    private static double? ResonanceBetween(Material material, WavelengthGrid grid)
    {
        if (material.N is not SellmeierDispersion sellmeier)
            return null;
        foreach (double squareUm2 in sellmeier.ResonancesUm2)
        {
            double resonanceNm = 1000 * Math.Sqrt(Math.Max(0, squareUm2));
            if ((grid.StartNm <= resonanceNm && resonanceNm < material.LeastNm) || (material.MostNm < resonanceNm && resonanceNm <= grid.StopNm))
                return resonanceNm;
        }
        return null;
    }
}
