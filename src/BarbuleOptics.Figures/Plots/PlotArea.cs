using BarbuleOptics.Color;
using ScottPlot;
using ScottPlot.Plottables;

namespace BarbuleOptics.Figures.Plots;

/// <summary>The area between two curves over the same places.</summary>
/// <param name="Edges">Places in order, with the lower and the upper value.</param>
/// <param name="Color">Its color.</param>
internal sealed record PlotArea(IReadOnlyList<(double X, double Low, double High)> Edges, SrgbColor Color) : PlotMark("area")
{
    public override IPlottable AddTo(Plot plot)
    {
        Coordinates[] outline =
        [
            .. Edges.Select(edge => new Coordinates(edge.X, edge.High)),
            .. Edges.Reverse().Select(edge => new Coordinates(edge.X, edge.Low)),
        ];
        Polygon area = plot.Add.Polygon(outline);
        area.FillColor = Of(Color);
        area.LineWidth = 0;
        return area;
    }
}
