using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Prediction;

/// <summary>Where the power of one incident beam goes; at every wavelength the four parts add up to 1.</summary>
/// <param name="Incidence">Angle of incidence in the surround.</param>
/// <param name="Polarization">Polarization of the incident light.</param>
/// <param name="Reflectance">Specular reflectance.</param>
/// <param name="Transmittance">Through the last face, all orders.</param>
/// <param name="Absorptance">Lost inside.</param>
/// <param name="DiffractedReflectance">Reflected into other orders; zero for films.</param>
public sealed record SpectralResponse(
    Angle Incidence, Polarizations Polarization, Spectrum Reflectance, Spectrum Transmittance, Spectrum Absorptance, Spectrum DiffractedReflectance);
