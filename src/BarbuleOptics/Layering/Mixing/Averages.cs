using System.Numerics;

namespace BarbuleOptics.Layering.Mixing;

/// <summary>Averages over the shares of a cut that several rules need.</summary>
internal static class Averages
{
    /// <summary>sum f e.</summary>
    public static Complex Permittivity(SectionCut cut, ReadOnlySpan<Complex> permittivities)
    {
        Complex sum = Complex.Zero;
        for (int m = 0; m < permittivities.Length; m++)
            sum += cut.Fractions[m] * permittivities[m];
        return sum;
    }

    /// <summary>1 / sum(f / e).</summary>
    public static Complex SeriesPermittivity(SectionCut cut, ReadOnlySpan<Complex> permittivities)
    {
        Complex sum = Complex.Zero;
        for (int m = 0; m < permittivities.Length; m++)
        {
            if (cut.Fractions[m] > 0)
                sum += cut.Fractions[m] / permittivities[m];
        }
        return PassiveRoot.Passive(Complex.Reciprocal(sum));
    }
}
