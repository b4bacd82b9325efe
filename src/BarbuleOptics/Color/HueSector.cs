namespace BarbuleOptics.Color;

/// <summary>A hue term and the half-open span of CIELAB hue angles it covers.</summary>
/// <param name="Term">The word.</param>
/// <param name="FromDegrees">First hue angle that belongs to it, 0 to 360.</param>
/// <param name="ToDegrees">First hue angle that no longer does; smaller than the first where the span runs through 0.</param>
public sealed record HueSector(string Term, double FromDegrees, double ToDegrees)
{
    /// <summary>Whether <paramref name="hueDegrees"/>, at least 0 and below 360, lies in the span.</summary>
    public bool Contains(double hueDegrees) => FromDegrees < ToDegrees
        ? hueDegrees >= FromDegrees && hueDegrees < ToDegrees
        : hueDegrees >= FromDegrees || hueDegrees < ToDegrees;
}
