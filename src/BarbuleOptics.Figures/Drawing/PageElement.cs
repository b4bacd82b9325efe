namespace BarbuleOptics.Figures.Drawing;

/// <summary>Something on a page.</summary>
internal abstract record PageElement;
