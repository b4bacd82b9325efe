using BarbuleOptics.Figures.Drawing;

namespace BarbuleOptics.Figures.Plots;

/// <summary>A plot on a page without its words: two axes with ticks, and what they measure.</summary>
/// <param name="Area">Where the axes span the page, ticks excluded.</param>
/// <param name="Horizontal">The axis along the bottom.</param>
/// <param name="Vertical">The axis along the left.</param>
/// <param name="Marks">What is plotted, in drawing order; the axes come last.</param>
internal sealed record PlotPanel(Box Area, PlotAxis Horizontal, PlotAxis Vertical, IReadOnlyList<PlotMark> Marks) : PageElement
{
    /// <summary>Length of ticks with a number, in points.</summary>
    public const double TickPt = 3;

    /// <summary>Length of ticks without, in points.</summary>
    public const double MinorTickPt = 1.6;
}
