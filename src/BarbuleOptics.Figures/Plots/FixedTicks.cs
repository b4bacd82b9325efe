using ScottPlot;

namespace BarbuleOptics.Figures.Plots;

/// <summary>Ticks that are settled before anything is drawn, since the page's words stand beside them.</summary>
internal sealed class FixedTicks(PlotAxis axis) : ITickGenerator
{
    /// <summary>All ticks; numbers are left to the page, on which they look the same on every machine.</summary>
    public Tick[] Ticks { get; } = [.. axis.Minor.Select(Tick.Minor), .. axis.Major.Select(value => Tick.Major(value, ""))];

    public int MaxTickCount { get; set; } = int.MaxValue;

    public void Regenerate(CoordinateRange range, Edge edge, PixelLength size, Paint paint, LabelStyle labelStyle)
    {
        // They stay.
    }
}
