using BarbuleOptics.Quantities;

namespace BarbuleOptics.Vision;

/// <summary>One kind of cone.</summary>
/// <param name="PigmentNm">Wavelength in nm at which its visual pigment absorbs most, within the range of <see cref="PigmentTemplate"/>.</param>
/// <param name="Droplet">Its oil droplet; null for a transparent one.</param>
/// <param name="Abundance">How many there are, relative to the other single cones; above 0. Without meaning for a double cone.</param>
/// <exception cref="ArgumentOutOfRangeException">The pigment lies outside its range, or the abundance is not above 0.</exception>
public sealed record Cone(double PigmentNm, OilDroplet? Droplet, double Abundance = 1)
{
    /// <summary>Peak of the pigment, in nm.</summary>
    public double PigmentNm { get; } = Guard.Within(PigmentNm, PigmentTemplate.LeastPeakNm, PigmentTemplate.MostPeakNm);

    /// <summary>Relative number of such cones.</summary>
    public double Abundance { get; } = Guard.Positive(Abundance);

    /// <summary>Sensitivity to photons behind <paramref name="media"/>, relative to the pigment's own peak.</summary>
    public double Sensitivity(OcularMedia media, double wavelengthNm)
    {
        ArgumentNullException.ThrowIfNull(media);
        return PigmentTemplate.Absorbance(PigmentNm, wavelengthNm) * (Droplet?.Transmittance(wavelengthNm) ?? 1) * media.Transmittance(wavelengthNm);
    }

    /// <summary>The wavelength in nm, to 0.1 nm, within 300 to 700 nm at which the cone behind <paramref name="media"/> is most sensitive.</summary>
    public double PeakNm(OcularMedia media)
    {
        const int StepsPerNm = 10;
        double bestNm = VisualSystem.StartNm, best = 0;
        for (int i = 0; i <= (VisualSystem.StopNm - VisualSystem.StartNm) * StepsPerNm; i++)
        {
            double wavelengthNm = VisualSystem.StartNm + (double)i / StepsPerNm, sensitivity = Sensitivity(media, wavelengthNm);
            if (sensitivity > best)
                (best, bestNm) = (sensitivity, wavelengthNm);
        }
        return bestNm;
    }
}
