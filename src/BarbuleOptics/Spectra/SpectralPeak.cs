namespace BarbuleOptics.Spectra;

/// <summary>One maximum of a reflectance spectrum inside its grid.</summary>
/// <param name="WavelengthNm">Where it lies, in nm: the vertex of the parabola through the highest sample and its neighbors.</param>
/// <param name="Reflectance">Its height there, a fraction.</param>
/// <param name="Prominence">Its height above the higher of the two valleys that part it from higher ground or the grid's end.</param>
/// <param name="HalfHeightWidthNm">Width where the reflectance is half the peak's height, in nm; null where a valley lies above that.</param>
/// <param name="HalfProminenceWidthNm">Width half the prominence below the top, in nm; null where a valley lies above that.</param>
public sealed record SpectralPeak(
    double WavelengthNm, double Reflectance, double Prominence, double? HalfHeightWidthNm, double? HalfProminenceWidthNm);
