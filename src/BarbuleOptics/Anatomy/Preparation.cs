namespace BarbuleOptics.Anatomy;

/// <summary>What cutting, drying and embedding did to the lengths that were measured; null for nothing.</summary>
/// <param name="ObliquityDegrees">How far the section leans in depth from the plane across the rods, 0 to below 90 degrees: true depth = measured x cos. A round rod
/// looks longer in depth by it; its diameter is the short axis, which is not changed, and so are lengths along the surface.</param>
/// <param name="KeratinScale">True length of keratin over the measured one, above 0: over 1 after shrinkage by dehydration. Cortex, gaps and separations, and the keratin between
/// neighbors measured from center to center.</param>
/// <param name="MelaninScale">The same of melanosomes: their sizes, cores and walls.</param>
public sealed record Preparation(MeasuredFactor? ObliquityDegrees, MeasuredFactor? KeratinScale, MeasuredFactor? MelaninScale);
