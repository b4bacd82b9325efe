using BarbuleOptics.Layering;
using BarbuleOptics.Tests.Layering;

namespace BarbuleOptics.Tests.Grating.Reference;

/// <summary>Sections from the text of a structure file, with their permittivities.</summary>
internal static class SectionText
{
    public static SectionPermittivities Load(string text, params double[] wavelengthsNm)
        => new(Structures.Section(text), Structures.Load(text).Catalog, wavelengthsNm);

    /// <summary>A material of constant index, as a structure file writes it.</summary>
    public static string Index(double n, double k = 0) => FormattableString.Invariant($"{{ n = {n}, k = {k} }}");
}
