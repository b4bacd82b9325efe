namespace BarbuleOptics.Ensembles.Draws;

/// <summary>One number that every draw yields at every angle.</summary>
/// <param name="Name">What it is called in files, unit included: <c>peak_nm</c>, <c>h_deg</c>, <c>avian-uv.chroma</c>.</param>
/// <param name="IsAngle">Whether it is an angle in degrees, whose mean and intervals run around a circle.</param>
public sealed record DrawOutcome(string Name, bool IsAngle);
