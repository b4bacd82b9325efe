namespace BarbuleOptics.Color;

/// <summary>A term for colors without hue and the half-open span of L* it covers.</summary>
/// <param name="Term">The word.</param>
/// <param name="FromLightness">First L* that belongs to it; minus infinity for the darkest.</param>
/// <param name="ToLightness">First L* that no longer does; infinity for the lightest.</param>
public sealed record LightnessBand(string Term, double FromLightness, double ToLightness)
{
    /// <summary>Whether <paramref name="lightness"/> lies in the span.</summary>
    public bool Contains(double lightness) => lightness >= FromLightness && lightness < ToLightness;
}
