namespace BarbuleOptics.Spectra.Instruments;

/// <summary>A direction at which a structure is solved.</summary>
/// <param name="SineSquared">Square of the sine of its angle of incidence.</param>
/// <param name="AcrossShare">Square of the cosine of its azimuth from across the rods: 1 across, 0 along; 1 at normal incidence.</param>
/// <param name="Weight">Weight in the signal; may be negative.</param>
internal readonly record struct GridDirection(double SineSquared, double AcrossShare, double Weight);
