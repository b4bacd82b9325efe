using BarbuleOptics.Quantities;

namespace BarbuleOptics.Spectra;

/// <summary>The followed peak at one angle of incidence.</summary>
/// <param name="Incidence">Angle of incidence in the surround.</param>
/// <param name="Peak">The peak; null where it was lost.</param>
public sealed record PeakSighting(Angle Incidence, SpectralPeak? Peak);
