using ScottPlot;

namespace BarbuleOptics.Figures.Plots;

/// <summary>Draws what is plotted without cutting lines along the axes in half, unlike ScottPlot's own action for this.</summary>
internal sealed class DrawUnclipped : IRenderAction
{
    public void Render(RenderPack rp)
    {
        foreach (IPlottable plottable in rp.Plot.PlottableList)
        {
            plottable.Axes.DataRect = rp.DataRect;
            plottable.Render(rp);
        }
    }
}
