namespace BarbuleOptics.Spectra.Instruments;

/// <summary>A direction of light as a facet sees it.</summary>
/// <param name="SineSquared">Square of the sine of the angle of incidence on the facet.</param>
/// <param name="AcrossShare">Square of the cosine of the azimuth from across the rods: 1 across, 0 along; 1 at normal incidence.</param>
/// <param name="Weight">Its share of the signal of a perfect mirror that faces the arms.</param>
internal readonly record struct LocalDirection(double SineSquared, double AcrossShare, double Weight);
