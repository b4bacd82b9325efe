using System.Globalization;
using ScottPlot;
using ScottPlot.TickGenerators;

namespace BarbuleOptics.Figures.Plots;

/// <summary>One axis of a plot with its ticks, which ScottPlot places.</summary>
internal sealed class PlotAxis
{
    // Ends that are round numbers keep their tick although sums of steps miss them by a rounding.
    private const double Slack = 1e-9;

    private readonly string _format;

    /// <summary>Chooses ticks.</summary>
    /// <param name="from">The lower end.</param>
    /// <param name="to">The upper end, greater than the lower.</param>
    /// <param name="lengthPt">Length on the page.</param>
    /// <param name="numberPt">Room along the axis that a number takes, gap excluded.</param>
    public PlotAxis(double from, double to, double lengthPt, double numberPt)
    {
        (From, To) = (from, to);
        var range = new CoordinateRange(from - Slack * (to - from), to + Slack * (to - from));
        double[] all = new DecimalTickSpacingCalculator().GenerateTickPositions(range, new PixelLength((float)lengthPt), new PixelLength((float)numberPt));
        double step = all[1] - all[0];
        int decade = (int)Math.Floor(Math.Log10(step * (1 + Slack)));
        // Small ticks at round numbers too: a step of 2 has four parts, of 1 or 5 five.
        bool isTwo = Math.Round(step / Math.Pow(10, decade)) == 2;
        MinorStep = step / (isTwo ? 4 : 5);
        Major = [.. all.Where(range.Contains).Select(Settled)];
        Minor = [.. new EvenlySpacedMinorTickGenerator(isTwo ? 4 : 5).GetMinorTicks(all, range).Select(Settled)];
        _format = decade >= 0 ? "0" : "0." + new string('0', -decade);

        // A tick at an end lies not a rounding beyond it, and zero is zero.
        double Settled(double value) => Math.Abs(value) < Slack * step ? 0 : Math.Clamp(value, from, to);
    }

    public double From { get; }

    public double To { get; }

    /// <summary>Where numbers stand.</summary>
    public IReadOnlyList<double> Major { get; }

    /// <summary>Where small ticks stand, between the others.</summary>
    public IReadOnlyList<double> Minor { get; }

    /// <summary>Distance of neighboring ticks, small ones included.</summary>
    public double MinorStep { get; }

    /// <summary>A number with no more decimals than the ticks need.</summary>
    public string Text(double value) => value.ToString(_format, CultureInfo.InvariantCulture);
}
