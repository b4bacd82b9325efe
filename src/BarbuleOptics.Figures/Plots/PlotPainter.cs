using BarbuleOptics.Figures.Drawing;
using ScottPlot;
using ScottPlot.Plottables;
using ScottPlot.Rendering.RenderActions;
using SkiaSharp;
using Box = BarbuleOptics.Figures.Drawing.Box;

namespace BarbuleOptics.Figures.Plots;

/// <summary>Has ScottPlot draw panels, on canvases whose unit is the point.</summary>
internal static class PlotPainter
{
    public static void Paint(PlotPanel panel, SKCanvas canvas)
    {
        Plot plot = PlotOf(panel);
        foreach (PlotMark mark in panel.Marks)
        {
            IPlottable plotted = mark.AddTo(plot);
            if (plotted is Scatter curve && mark.Stroke?.Dash is IReadOnlyList<double> dash)
                curve.LinePattern = new LinePattern([.. dash.Select(length => (float)length)], 0, "dash");
        }
        Draw(plot, panel, canvas, new DrawUnclipped(), new RenderPanels());
    }

    /// <summary>One mark as SVG, dashes left to the reader of the document: on a canvas they become an outline each.</summary>
    public static byte[] Svg(PlotPanel panel, PlotMark mark)
    {
        Plot plot = PlotOf(panel);
        mark.AddTo(plot);
        return Svg(plot, panel, new DrawUnclipped());
    }

    /// <summary>The axes as SVG.</summary>
    public static byte[] SvgAxes(PlotPanel panel) => Svg(PlotOf(panel), panel, new RenderPanels());

    private static byte[] Svg(Plot plot, PlotPanel panel, IRenderAction action)
    {
        using var bytes = new MemoryStream();
        using (SKCanvas canvas = SKSvgCanvas.Create(SKRect.Create((float)panel.Area.Right + 10, (float)panel.Area.Bottom + 10), bytes))
            Draw(plot, panel, canvas, action);
        return bytes.ToArray();
    }

    /// <summary>A plot with axes in place.</summary>
    private static Plot PlotOf(PlotPanel panel)
    {
        var plot = new Plot();
        plot.Axes.SetLimits(panel.Horizontal.From, panel.Horizontal.To, panel.Vertical.From, panel.Vertical.To);
        plot.Layout.Fixed(RectOf(panel.Area));
        plot.Axes.Top.IsVisible = false;
        plot.Axes.Right.IsVisible = false;
        Style(plot.Axes.Bottom, panel.Horizontal);
        Style(plot.Axes.Left, panel.Vertical);
        plot.RenderManager.RenderActions.Clear();
        plot.RenderManager.RenderActions.AddRange([new ReplaceNullAxesWithDefaults(), new CalculateLayout(), new RegenerateTicks()]);
        return plot;
    }

    private static void Style(IAxis shown, PlotAxis axis)
    {
        ScottPlot.Color color = new(Ink.Axis.Red, Ink.Axis.Green, Ink.Axis.Blue);
        shown.TickGenerator = new FixedTicks(axis);
        LineStyle frame = shown.FrameLineStyle;
        (frame.Color, frame.Width, frame.AntiAlias) = (color, (float)Ink.LinePt, true);
        Style(shown.MajorTickStyle, PlotPanel.TickPt, color);
        Style(shown.MinorTickStyle, PlotPanel.MinorTickPt, color);
    }

    private static void Style(TickMarkStyle marks, double lengthPt, ScottPlot.Color color)
        => (marks.Length, marks.Width, marks.Color, marks.AntiAlias) = ((float)lengthPt, (float)Ink.LinePt, color, true);

    /// <summary>Some of the steps of ScottPlot's own rendering, which would clear the canvas of the page and draw everything twice.</summary>
    private static void Draw(Plot plot, PlotPanel panel, SKCanvas canvas, params IRenderAction[] actions)
    {
        var pack = new RenderPack(plot, RectOf(panel.Area.Grown(PlotPanel.TickPt + 1)), canvas);
        foreach (IRenderAction action in (IRenderAction[])[new ReplaceNullAxesWithDefaults(), new CalculateLayout(), .. actions])
        {
            pack.CanvasState.Save();
            action.Render(pack);
            pack.CanvasState.Restore();
        }
    }

    private static PixelRect RectOf(Box box) => new((float)box.Left, (float)box.Right, (float)box.Bottom, (float)box.Top);
}
