using BarbuleOptics.Color;

namespace BarbuleOptics.Figures.Drawing;

/// <summary>How a line is drawn.</summary>
/// <param name="Color">Its color.</param>
/// <param name="WidthPt">Its width, in points.</param>
/// <param name="Dash">Lengths of strokes and gaps in turn, in points, of even number; null for a solid line.</param>
internal sealed record Stroke(SrgbColor Color, double WidthPt, IReadOnlyList<double>? Dash = null);
