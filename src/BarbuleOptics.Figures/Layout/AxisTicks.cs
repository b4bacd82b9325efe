using System.Globalization;

namespace BarbuleOptics.Figures.Layout;

/// <summary>Round numbers along an axis.</summary>
/// <param name="Step">Distance of neighbors: 1, 2 or 5 times a power of ten.</param>
/// <param name="MinorStep">Distance of the small ticks between them.</param>
/// <param name="Format">How a number is written, with no more decimals than the step needs.</param>
internal sealed record AxisTicks(double Step, double MinorStep, string Format)
{
    // The last is for the rounding of the logarithm that the decade comes from.
    private static readonly int[] Factors = [1, 2, 5, 10, 20];

    /// <summary>The closest ticks of which no more than <paramref name="most"/> fit on a span.</summary>
    public static AxisTicks For(double span, double most)
    {
        double decade = Math.Pow(10, Math.Floor(Math.Log10(span / most)));
        int factor = Factors.First(candidate => candidate * decade * (1 + 1e-9) >= span / most);
        double step = factor * decade;
        int decimals = Math.Max(0, (int)-Math.Floor(Math.Log10(step * (1 + 1e-9))));
        return new AxisTicks(step, step / (factor is 2 or 20 ? 4 : 5), decimals == 0 ? "0" : "0." + new string('0', decimals));
    }

    /// <summary>Numbers that label the axis from <paramref name="from"/> to <paramref name="to"/>.</summary>
    public IEnumerable<double> Major(double from, double to) => Multiples(Step, from, to);

    /// <summary>Small ticks, the labelled ones among them.</summary>
    public IEnumerable<double> Minor(double from, double to) => Multiples(MinorStep, from, to);

    public string Text(double value) => value.ToString(Format, CultureInfo.InvariantCulture);

    private static IEnumerable<double> Multiples(double step, double from, double to)
    {
        double slack = step * 1e-6;
        for (double n = Math.Ceiling((from - slack) / step); n * step <= to + slack; n++)
            yield return n == 0 ? 0 : n * step; // Ceiling may give a negative zero.
    }
}
