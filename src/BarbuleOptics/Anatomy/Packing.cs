namespace BarbuleOptics.Anatomy;

/// <summary>A distance between neighbors.</summary>
/// <param name="Distance">The length as measured.</param>
/// <param name="BetweenSurfaces">True: from surface to surface, 0 = touching. False: from center to center.</param>
public sealed record Packing(MeasuredLength Distance, bool BetweenSurfaces);
