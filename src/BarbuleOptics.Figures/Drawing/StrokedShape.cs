namespace BarbuleOptics.Figures.Drawing;

/// <summary>A line.</summary>
/// <param name="Shape">Where it runs.</param>
/// <param name="Stroke">How it is drawn.</param>
/// <param name="Role">What it stands for, kept in formats that can; null for none.</param>
internal sealed record StrokedShape(Shape Shape, Stroke Stroke, string? Role = null) : PageElement;
