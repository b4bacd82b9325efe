namespace BarbuleOptics.Files.Specimens;

/// <summary>A color of one specimen.</summary>
/// <param name="IncidenceDegrees">Angle of incidence.</param>
/// <param name="Srgb">As computed, #rrggbb; empty without color.</param>
/// <param name="SrgbBrightened">Brightened, #rrggbb; empty without color.</param>
/// <param name="HueTerm">The word for it; empty without color.</param>
public sealed record SpecimenSwatch(double IncidenceDegrees, string Srgb, string SrgbBrightened, string HueTerm);
