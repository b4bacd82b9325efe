using System.Numerics;

namespace BarbuleOptics.Layering.Mixing;

/// <summary>Form birefringence with the terms of second order in period / wavelength, for any number of lamellae a period.</summary>
/// <remarks>
/// With averages &lt;&gt; over one period and e0 = 1 / &lt;1/e&gt;:
/// along, &lt;e&gt; + k0^2 (&lt;g^2&gt; - &lt;g&gt;^2) with g' = e - &lt;e&gt;;
/// across, e0 + e0 k0^2 (&lt;e g^2&gt; - &lt;e g&gt;^2 / &lt;e&gt;) with g' = e0 / e - 1; in depth &lt;e&gt;.
/// For two lamellae both are the second order of Rytov 1956, Sov. Phys. JETP 2:466. An imaginary part that the expansion,
/// used beyond its range, pushes below zero is set to zero.
/// </remarks>
public sealed class SecondOrderFormBirefringence : IMixingRule
{
    /// <inheritdoc/>
    public string Name => "form-birefringence-2";

    /// <inheritdoc/>
    public string Description => "form birefringence of lamellae, second order in period over wavelength (Rytov 1956)";

    /// <inheritdoc/>
    public DiagonalPermittivity Mix(SectionCut cut, ReadOnlySpan<Complex> permittivities, double wavelengthNm)
    {
        Complex mean = Averages.Permittivity(cut, permittivities);
        Complex series = Averages.SeriesPermittivity(cut, permittivities);
        Complex across = series + series * Scale(cut, wavelengthNm) * WeightedVariance(cut, permittivities, mean, series);
        return new(PassiveRoot.Passive(across), Along(cut, permittivities, wavelengthNm), mean);
    }

    /// <summary>The permittivity along the rods.</summary>
    internal static Complex Along(SectionCut cut, ReadOnlySpan<Complex> permittivities, double wavelengthNm)
    {
        Complex mean = Averages.Permittivity(cut, permittivities);
        return PassiveRoot.Passive(mean + Scale(cut, wavelengthNm) * Variance(cut, permittivities, mean));
    }

    /// <summary>g is kept in units of the period, so k0 enters with it: (k0 P)^2.</summary>
    private static double Scale(SectionCut cut, double wavelengthNm)
    {
        double k0P = 2 * Math.PI * cut.PeriodNm / wavelengthNm;
        return k0P * k0P;
    }

    /// <summary>&lt;g^2&gt; - &lt;g&gt;^2 with g' = e - &lt;e&gt;; g is piecewise linear, so both integrals are exact.</summary>
    private static Complex Variance(SectionCut cut, ReadOnlySpan<Complex> permittivities, Complex mean)
    {
        Complex g = Complex.Zero, first = Complex.Zero, second = Complex.Zero;
        foreach (Lamella lamella in cut.Lamellae)
        {
            Complex rise = (permittivities[lamella.Material] - mean) * lamella.Share;
            first += lamella.Share * (g + rise / 2);
            second += lamella.Share * (g * g + g * rise + rise * rise / 3);
            g += rise;
        }
        return second - first * first;
    }

    /// <summary>&lt;e g^2&gt; - &lt;e g&gt;^2 / &lt;e&gt; with g' = e0 / e - 1.</summary>
    private static Complex WeightedVariance(SectionCut cut, ReadOnlySpan<Complex> permittivities, Complex mean, Complex series)
    {
        Complex g = Complex.Zero, first = Complex.Zero, second = Complex.Zero;
        foreach (Lamella lamella in cut.Lamellae)
        {
            Complex e = permittivities[lamella.Material];
            Complex rise = (series / e - 1) * lamella.Share;
            first += lamella.Share * e * (g + rise / 2);
            second += lamella.Share * e * (g * g + g * rise + rise * rise / 3);
            g += rise;
        }
        return second - first * first / mean;
    }
}
