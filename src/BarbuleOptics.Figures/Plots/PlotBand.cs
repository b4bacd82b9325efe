using BarbuleOptics.Color;
using ScottPlot;
using ScottPlot.Plottables;

namespace BarbuleOptics.Figures.Plots;

/// <summary>A tint from the bottom to the top of a plot.</summary>
internal sealed record PlotBand(double From, double To, SrgbColor Color) : PlotMark("band")
{
    public override IPlottable AddTo(Plot plot)
    {
        HorizontalSpan span = plot.Add.HorizontalSpan(From, To);
        span.FillColor = Of(Color);
        span.LineWidth = 0;
        return span;
    }
}
