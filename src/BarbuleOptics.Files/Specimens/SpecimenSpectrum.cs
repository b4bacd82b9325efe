namespace BarbuleOptics.Files.Specimens;

/// <summary>One beam's spectra of one specimen, as results keep them.</summary>
/// <param name="IncidenceDegrees">Angle of incidence.</param>
/// <param name="Polarization">Polarization of the incident light.</param>
/// <param name="WavelengthsNm">Vacuum wavelengths.</param>
/// <param name="Reflectance">One fraction a wavelength; so below.</param>
/// <param name="Transmittance">Through the last face.</param>
/// <param name="Absorptance">Lost inside.</param>
/// <param name="DiffractedReflectance">Reflected into other orders.</param>
public sealed record SpecimenSpectrum(
    double IncidenceDegrees, string Polarization, double[] WavelengthsNm, double[] Reflectance, double[] Transmittance, double[] Absorptance, double[] DiffractedReflectance);
