using BarbuleOptics.Color;
using BarbuleOptics.Figures.Drawing;
using ScottPlot;

namespace BarbuleOptics.Figures.Plots;

/// <summary>Something plotted in the units of the axes.</summary>
/// <param name="Role">What it stands for, kept in formats that can.</param>
internal abstract record PlotMark(string Role)
{
    /// <summary>The line it is drawn with; null for none.</summary>
    public virtual Stroke? Stroke => null;

    /// <summary>Adds it to a plot, its line solid: <see cref="PlotPainter"/> sees to dashes.</summary>
    public abstract IPlottable AddTo(Plot plot);

    protected static ScottPlot.Color Of(SrgbColor color) => new(color.Red, color.Green, color.Blue);
}
