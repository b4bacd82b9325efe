using BarbuleOptics.Figures.Drawing;
using ScottPlot;
using ScottPlot.Plottables;
using SkiaSharp;

namespace BarbuleOptics.Figures.Plots;

/// <summary>A line through points, or a ring where there is only one.</summary>
internal sealed record PlotCurve(IReadOnlyList<(double X, double Y)> Points, Stroke Line) : PlotMark("curve")
{
    private const float RingPt = 3.6f;

    public override Stroke Stroke => Points.Count > 1 ? Line : Line with { Dash = null };

    public override IPlottable AddTo(Plot plot)
    {
        if (Points.Count == 1)
            return Ring(plot);
        Scatter curve = plot.Add.ScatterLine(Points.Select(point => new Coordinates(point.X, point.Y)).ToArray(), Of(Line.Color));
        curve.LineWidth = (float)Line.WidthPt;
        curve.LineStyle.StrokeJoin = SKStrokeJoin.Round;
        return curve;
    }

    private Marker Ring(Plot plot)
    {
        Marker ring = plot.Add.Marker(Points[0].X, Points[0].Y, MarkerShape.OpenCircle, RingPt, Of(Line.Color));
        ring.MarkerLineWidth = (float)Line.WidthPt;
        return ring;
    }
}
