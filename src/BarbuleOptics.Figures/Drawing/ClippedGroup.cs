namespace BarbuleOptics.Figures.Drawing;

/// <summary>Elements of which only the part within an outline is seen.</summary>
internal sealed record ClippedGroup(Shape Window, IReadOnlyList<PageElement> Elements) : PageElement;
