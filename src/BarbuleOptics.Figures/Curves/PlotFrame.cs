using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Figures.Layout;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Figures.Curves;

/// <summary>The axes: wavelength from left to right, reflectance in percent from the bottom up.</summary>
internal sealed class PlotFrame
{
    private const double TickPt = 3;
    private const double MinorTickPt = 1.6;
    private const double GapPt = 2.5;
    private const double LeastTopPercent = 0.01;

    private readonly AxisTicks _percents;
    private readonly AxisTicks _wavelengths;

    private PlotFrame(Box plot, double startNm, double stopNm, double topPercent)
    {
        Plot = plot;
        (StartNm, StopNm, TopPercent) = (startNm, stopNm, topPercent);
        _percents = PercentTicks(topPercent, plot.Height);
        _wavelengths = WavelengthTicks(startNm, stopNm, plot.Width);
    }

    /// <summary>The area that curves lie in.</summary>
    public Box Plot { get; }

    public double StartNm { get; }

    public double StopNm { get; }

    /// <summary>Reflectance at the upper end, in percent.</summary>
    public double TopPercent { get; }

    /// <summary>Lays the axes out.</summary>
    /// <param name="grid">The wavelengths.</param>
    /// <param name="greatest">Greatest reflectance shown, a fraction.</param>
    /// <param name="outside">What the axes with their labels may cover at most.</param>
    public static PlotFrame Within(WavelengthGrid grid, double greatest, Box outside)
    {
        // A grid of one wavelength has no width of its own.
        double aside = grid.Count > 1 ? 0 : Math.Max(1, grid.StartNm * 0.02);
        (double startNm, double stopNm) = (grid.StartNm - aside, grid.StopNm + aside);
        double bottom = outside.Bottom - TickPt - GapPt - 2 * Ink.SmallPt - GapPt;
        double top = TopFor(greatest, bottom - outside.Top);
        AxisTicks percents = PercentTicks(top, bottom - outside.Top);
        double numbers = percents.Major(0, top).Max(value => FigureFont.WidthPt(percents.Text(value), Ink.SmallPt));
        double left = outside.Left + Ink.LabelPt + GapPt + numbers + GapPt + TickPt;
        return new PlotFrame(new Box(left, outside.Top, outside.Right, bottom), startNm, stopNm, top);
    }

    public double X(double wavelengthNm) => Plot.Left + (wavelengthNm - StartNm) / (StopNm - StartNm) * Plot.Width;

    public double Y(double reflectance) => Plot.Bottom - Math.Max(0, 100 * reflectance) / TopPercent * Plot.Height;

    public Point At(double wavelengthNm, double reflectance) => new(X(wavelengthNm), Y(reflectance));

    /// <summary>Draws lines, ticks, numbers and labels.</summary>
    public void Draw(List<PageElement> elements)
    {
        var lines = new Shape();
        lines.MoveTo(new(Plot.Left, Plot.Top)).LineTo(new(Plot.Left, Plot.Bottom)).LineTo(new(Plot.Right, Plot.Bottom));
        foreach (double value in _percents.Minor(0, TopPercent))
            lines.AddLine(new(Plot.Left - MinorTickPt, Y(value / 100)), new(Plot.Left, Y(value / 100)));
        foreach (double value in _wavelengths.Minor(StartNm, StopNm))
            lines.AddLine(new(X(value), Plot.Bottom), new(X(value), Plot.Bottom + MinorTickPt));
        foreach (double value in _percents.Major(0, TopPercent))
        {
            double y = Y(value / 100);
            lines.AddLine(new(Plot.Left - TickPt, y), new(Plot.Left, y));
            elements.Add(TextRun.CenteredAt(_percents.Text(value), new(Plot.Left - TickPt - GapPt, y), Ink.SmallPt, TextAlign.End, Ink.Text));
        }
        double baseline = Plot.Bottom + TickPt + GapPt + FigureFont.CapHeight * Ink.SmallPt;
        foreach (double value in _wavelengths.Major(StartNm, StopNm))
        {
            lines.AddLine(new(X(value), Plot.Bottom), new(X(value), Plot.Bottom + TickPt));
            elements.Add(new TextRun(_wavelengths.Text(value), new(X(value), baseline), Ink.SmallPt, TextAlign.Middle, Ink.Text));
        }
        elements.Add(new StrokedShape(lines, new Stroke(Ink.Axis, Ink.LinePt), "axes"));
        Name(elements, baseline);
    }

    private void Name(List<PageElement> elements, double numbersBaseline)
    {
        double numbers = _percents.Major(0, TopPercent).Max(value => FigureFont.WidthPt(_percents.Text(value), Ink.SmallPt));
        double x = Plot.Left - TickPt - 2 * GapPt - numbers - FigureFont.Descent * Ink.LabelPt;
        elements.Add(new TextRun("Reflectance (%)", new(x, Plot.Center.Y), Ink.LabelPt, TextAlign.Middle, Ink.Text, Upward: true));
        double y = numbersBaseline + GapPt + Ink.LabelPt;
        elements.Add(new TextRun("Wavelength (nm)", new(Plot.Center.X, y), Ink.LabelPt, TextAlign.Middle, Ink.Text));
    }

    /// <summary>The upper end: the next whole tick that leaves room for a label above the highest peak, and 100 % at the most.</summary>
    private static double TopFor(double greatest, double heightPt)
    {
        double percent = Math.Max(LeastTopPercent, 100 * greatest);
        AxisTicks ticks = PercentTicks(percent, heightPt);
        double top = ticks.MinorStep * Math.Ceiling(percent * 1.14 / ticks.MinorStep - 1e-9);
        return percent <= 100 ? Math.Min(100, top) : top;
    }

    private static AxisTicks PercentTicks(double topPercent, double heightPt) => AxisTicks.For(topPercent, Math.Max(2, heightPt / 24));

    private static AxisTicks WavelengthTicks(double startNm, double stopNm, double widthPt)
        => AxisTicks.For(stopNm - startNm, Math.Max(2, widthPt / 32));
}
