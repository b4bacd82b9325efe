namespace BarbuleOptics.Figures.Drawing;

/// <summary>A step along an outline: control points first, the end in the last that the verb uses.</summary>
internal readonly record struct Step(Verb Verb, Point A = default, Point B = default, Point C = default);
