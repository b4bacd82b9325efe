using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Figures.Plots;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Figures.Curves;

/// <summary>The axes: wavelength from left to right, reflectance in percent from the bottom up.</summary>
internal sealed class PlotFrame
{
    private const double TickPt = PlotPanel.TickPt;
    private const double GapPt = 2.5;
    private const double LeastTopPercent = 0.01;

    // Room along its axis that a number takes.
    private const double WidthPt = 27;
    private const double HeightPt = 16;

    private readonly string _quantity;
    private readonly PlotAxis _percents;
    private readonly PlotAxis _wavelengths;

    private PlotFrame(Box plot, double startNm, double stopNm, double topPercent, string quantity)
    {
        (Plot, _quantity) = (plot, quantity);
        _percents = Percents(topPercent, plot.Height);
        _wavelengths = new PlotAxis(startNm, stopNm, plot.Width, WidthPt);
    }

    /// <summary>The area that curves lie in.</summary>
    public Box Plot { get; }

    public double StartNm => _wavelengths.From;

    public double StopNm => _wavelengths.To;

    /// <summary>Reflectance at the upper end, in percent.</summary>
    public double TopPercent => _percents.To;

    /// <summary>Lays the axes out.</summary>
    /// <param name="grid">The wavelengths.</param>
    /// <param name="greatest">Greatest reflectance shown, a fraction.</param>
    /// <param name="outside">What the axes with their labels may cover at most.</param>
    /// <param name="quantity">What the vertical axis is called.</param>
    public static PlotFrame Within(WavelengthGrid grid, double greatest, Box outside, string quantity = "Reflectance (%)")
    {
        // A grid of one wavelength has no width of its own.
        double aside = grid.Count > 1 ? 0 : Math.Max(1, grid.StartNm * 0.02);
        (double startNm, double stopNm) = (grid.StartNm - aside, grid.StopNm + aside);
        double bottom = outside.Bottom - TickPt - GapPt - 2 * Ink.SmallPt - GapPt;
        double top = TopFor(greatest, bottom - outside.Top);
        PlotAxis percents = Percents(top, bottom - outside.Top);
        double numbers = percents.Major.Max(value => FigureFont.WidthPt(percents.Text(value), Ink.SmallPt));
        double left = outside.Left + Ink.LabelPt + GapPt + numbers + GapPt + TickPt;
        return new PlotFrame(new Box(left, outside.Top, outside.Right, bottom), startNm, stopNm, top, quantity);
    }

    public double X(double wavelengthNm) => Plot.Left + (wavelengthNm - StartNm) / (StopNm - StartNm) * Plot.Width;

    /// <summary>A reflectance in the unit of the vertical axis.</summary>
    public static double Percent(double reflectance) => Math.Max(0, 100 * reflectance);

    public double Y(double reflectance) => Plot.Bottom - Percent(reflectance) / TopPercent * Plot.Height;

    public Point At(double wavelengthNm, double reflectance) => new(X(wavelengthNm), Y(reflectance));

    /// <summary>The axes with what they measure.</summary>
    public PlotPanel Panel(IReadOnlyList<PlotMark> marks) => new(Plot, _wavelengths, _percents, marks);

    /// <summary>Writes numbers and labels.</summary>
    public void Write(List<PageElement> elements)
    {
        foreach (double value in _percents.Major)
            elements.Add(TextRun.CenteredAt(_percents.Text(value), new(Plot.Left - TickPt - GapPt, Y(value / 100)), Ink.SmallPt, TextAlign.End, Ink.Text));
        double baseline = Plot.Bottom + TickPt + GapPt + FigureFont.CapHeight * Ink.SmallPt;
        foreach (double value in _wavelengths.Major)
            elements.Add(new TextRun(_wavelengths.Text(value), new(X(value), baseline), Ink.SmallPt, TextAlign.Middle, Ink.Text));
        Name(elements, baseline);
    }

    private void Name(List<PageElement> elements, double numbersBaseline)
    {
        double numbers = _percents.Major.Max(value => FigureFont.WidthPt(_percents.Text(value), Ink.SmallPt));
        double x = Plot.Left - TickPt - 2 * GapPt - numbers - FigureFont.Descent * Ink.LabelPt;
        elements.Add(new TextRun(_quantity, new(x, Plot.Center.Y), Ink.LabelPt, TextAlign.Middle, Ink.Text, Upward: true));
        double y = numbersBaseline + GapPt + Ink.LabelPt;
        elements.Add(new TextRun("Wavelength (nm)", new(Plot.Center.X, y), Ink.LabelPt, TextAlign.Middle, Ink.Text));
    }

    /// <summary>The upper end: the next whole tick that leaves room for a label above the highest peak, and 100 % at the most.</summary>
    private static double TopFor(double greatest, double heightPt)
    {
        double percent = Math.Max(LeastTopPercent, 100 * greatest);
        PlotAxis ticks = Percents(percent, heightPt);
        double top = ticks.MinorStep * Math.Ceiling(percent * 1.14 / ticks.MinorStep - 1e-9);
        return percent <= 100 ? Math.Min(100, top) : top;
    }

    private static PlotAxis Percents(double topPercent, double heightPt) => new(0, topPercent, heightPt, HeightPt);
}
