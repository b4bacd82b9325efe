using BarbuleOptics.Quantities;

namespace BarbuleOptics.Spectra;

/// <summary>The top of a maximum.</summary>
/// <param name="First">First of its equal highest samples.</param>
/// <param name="Last">Last of them; the same where one sample is the highest.</param>
/// <param name="WavelengthNm">Where the top lies, in nm.</param>
/// <param name="Height">Its height.</param>
internal sealed record Summit(int First, int Last, double WavelengthNm, double Height)
{
    /// <summary>The vertex of the parabola through three samples; the middle of a flat top of three or more.</summary>
    /// <remarks>Two equal samples are a smooth top that lies halfway between them; the same parabola finds it.</remarks>
    public static Summit Over(int first, int last, Spectrum spectrum)
    {
        ReadOnlySpan<double> wavelengthsNm = spectrum.Grid.Nanometres;
        double top = spectrum[first];
        if (last > first + 1)
            return new Summit(first, last, (wavelengthsNm[first] + wavelengthsNm[last]) / 2, top);

        // y(t) = top + (after - before) t / 2 + (before - 2 top + after) t^2 / 2, t in steps from the sample.
        double before = spectrum[first - 1], after = spectrum[first + 1];
        double offset = (before - after) / (2 * (before - 2 * top + after));
        double height = top - (before - after) * offset / 4;
        // A sharp resonance may lift the vertex over 1; what was sampled as a fraction is reported as one.
        if (top <= 1)
            height = Math.Min(height, 1);
        return new Summit(first, last, wavelengthsNm[first] + offset * spectrum.Grid.StepNm, height);
    }
}
