namespace BarbuleOptics.Figures.Drawing;

/// <summary>A place on the page, in points (1/72 inch) from its top left, y down.</summary>
internal readonly record struct Point(double X, double Y);
