using BarbuleOptics.Color;
using BarbuleOptics.Figures.Drawing;
using ScottPlot;
using ScottPlot.Plottables;

namespace BarbuleOptics.Figures.Plots;

/// <summary>A white disk with a rim of a color.</summary>
internal sealed record PlotPeak(double X, double Y, SrgbColor Color) : PlotMark("peak")
{
    /// <summary>Radius to the middle of the rim, in points.</summary>
    public const double RadiusPt = 1.7;

    public override Stroke Stroke => new(Color, 0.7);

    public override IPlottable AddTo(Plot plot)
    {
        Marker marker = plot.Add.Marker(X, Y, MarkerShape.FilledCircle, (float)(2 * RadiusPt), Of(Ink.White));
        marker.MarkerStyle.OutlineColor = Of(Color);
        marker.MarkerStyle.OutlineWidth = (float)Stroke.WidthPt;
        return marker;
    }
}
