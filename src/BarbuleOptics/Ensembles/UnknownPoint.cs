namespace BarbuleOptics.Ensembles;

/// <summary>What is seen at one value of something that is not known.</summary>
/// <param name="Value">The value, in the unit of the sweep.</param>
/// <param name="PeakNm">Wavelength of the highest peak, in nm; null where there is none.</param>
/// <param name="HueDegrees">CIELAB hue angle, in degrees; null without color.</param>
/// <param name="Chroma">CIELAB chroma; null without color.</param>
/// <param name="Term">Hue term; null without color.</param>
public sealed record UnknownPoint(double Value, double? PeakNm, double? HueDegrees, double? Chroma, string? Term);
