using BarbuleOptics.Color;

namespace BarbuleOptics.Figures.Drawing;

/// <summary>An outline filled with a color; where parts lie within others, by their winding.</summary>
internal sealed record FilledShape(Shape Shape, SrgbColor Color) : PageElement;
