using BarbuleOptics.Anatomy;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Ensembles.Spreads;

/// <summary>Which spread a measured length carries.</summary>
/// <remarks>
/// <para>Of the mean: sd/sqrt(n) with n - 1 degrees of freedom, n the number of independent units; where sd_between is given, too, the deviation of a
/// unit is sqrt(sd^2 + sd_between^2), as if each were measured once: never too sure. Replicates: their standard deviation; lists of lists: that of the
/// units' means. Bounds are drawn between.</para>
/// <para>Between barbules: sd_between; replicates: their standard deviation, each being a unit of its own; lists of lists: the component of
/// variance between units, (MS_between - MS_within)/n0 with n0 = (N - sum n_i^2/N)/(k - 1) (one-way analysis of variance with random effects: Searle,
/// Casella and McCulloch 1992, Variance Components, section 3.6, number from memory).</para>
/// <para>Within a section: sd; lists of lists: the pooled deviation within units.</para>
/// </remarks>
internal static class LengthSpread
{
    /// <summary>Units below which the deviation itself is a guess.</summary>
    private const int FewUnits = 4;

    /// <summary>Reads one length.</summary>
    public static LengthReading Of(MeasuredLength length, Spread spread) => length switch
    {
        MeasuredLength.Summary summary => spread switch
        {
            Spread.Mean => MeanOf(summary),
            Spread.Between => summary.SdBetweenNm is double between ? Known(between)
                : summary.SdNm > 0 ? new(null, Note: "has no sd_between and was kept at its mean") : LengthReading.Kept,
            _ => Known(summary.SdNm),
        },
        MeasuredLength.Interval interval when interval.MostNm > interval.LeastNm => spread == Spread.Mean
            ? new(new LengthLaw.Uniform(interval.LeastNm, interval.MostNm), Note: FormattableString.Invariant($"is not known; it was drawn between {interval.LeastNm} and {interval.MostNm} nm, all values alike"))
            : new(null, Note: FormattableString.Invariant($"is not known, which is no spread of barbules or rows; it was kept at its middle, {interval.CentralNm:0.###} nm")),
        MeasuredLength.Replicates replicates => spread switch
        {
            Spread.Mean => MeanOf(replicates.ValuesNm),
            Spread.Between => Known(Deviation(replicates.ValuesNm)),
            _ => Deviation(replicates.ValuesNm) > 0 ? new(null, Note: "is a list of independent units, which says nothing about rows of one section, and was kept at its mean") : LengthReading.Kept,
        },
        MeasuredLength.NestedReplicates nested => spread switch
        {
            Spread.Mean => nested.UnitsNm.Count == 1 ? new(null, "found a list with one inner list; needed two units or more, for one alone shows no spread of the mean") : MeanOf(MeansOf(nested)),
            Spread.Between => nested.UnitsNm.Count == 1 ? new(null, "found a list with one inner list; needed two units or more to tell barbules apart") : Known(Math.Sqrt(BetweenVariance(nested))),
            _ => Known(Math.Sqrt(WithinVariance(nested))),
        },
        _ => LengthReading.Kept,
    };

    /// <summary>Reads a factor: its deviation says how well it is known, which belongs to the spread of the mean alone.</summary>
    public static LengthReading Of(MeasuredFactor factor, Spread spread, string unit) => (factor, spread) switch
    {
        (MeasuredFactor.Summary { Sd: > 0 } summary, Spread.Mean) => new(new LengthLaw.Normal(summary.Sd, double.PositiveInfinity)),
        (MeasuredFactor.Interval interval, Spread.Mean) when interval.Most > interval.Least => new(
            new LengthLaw.Uniform(interval.Least, interval.Most), Note: FormattableString.Invariant($"is not known; it was drawn between {interval.Least} and {interval.Most}{(unit.Length > 0 ? " " + unit : "")}, all values alike")),
        _ => LengthReading.Kept,
    };

    /// <summary>The values that stand for the units, in their order; null where there are none.</summary>
    public static ValueList<double>? UnitsOf(MeasuredLength length) => length switch
    {
        MeasuredLength.Replicates replicates => replicates.ValuesNm,
        MeasuredLength.NestedReplicates nested => MeansOf(nested),
        _ => null,
    };

    private static LengthReading MeanOf(MeasuredLength.Summary summary)
    {
        double deviation = Math.Sqrt(summary.SdNm * summary.SdNm + (summary.SdBetweenNm ?? 0) * (summary.SdBetweenNm ?? 0));
        if (deviation == 0)
            return LengthReading.Kept;
        return summary.Units switch
        {
            null => new(null, "found an sd without n; needed n, the number of independent units, to say how sure the mean is"),
            1 => new(null, "found n = 1; needed n of 2 or above, for one unit shows no spread of the mean"),
            int units => OfUnits(deviation, units),
        };
    }

    private static LengthReading MeanOf(ValueList<double> valuesNm)
    {
        double deviation = Deviation(valuesNm);
        return deviation > 0 ? OfUnits(deviation, valuesNm.Count) : LengthReading.Kept;
    }

    private static LengthReading OfUnits(double deviationNm, int units) => new(
        new LengthLaw.Normal(deviationNm / Math.Sqrt(units), units - 1),
        Note: units < FewUnits ? FormattableString.Invariant($"rests on {units} independent units; with fewer than {FewUnits} the spread itself is a guess, and intervals are very wide") : null);

    private static LengthReading Known(double deviationNm) => deviationNm > 0 ? new(new LengthLaw.Normal(deviationNm, double.PositiveInfinity)) : LengthReading.Kept;

    private static ValueList<double> MeansOf(MeasuredLength.NestedReplicates nested) => [.. nested.UnitsNm.Select(unit => unit.Average())];

    private static double Deviation(ValueList<double> values)
    {
        double mean = values.Average();
        return values.Count < 2 ? 0 : Math.Sqrt(values.Sum(value => (value - mean) * (value - mean)) / (values.Count - 1));
    }

    private static double WithinVariance(MeasuredLength.NestedReplicates nested)
    {
        double squares = nested.UnitsNm.Sum(unit => unit.Sum(value => (value - unit.Average()) * (value - unit.Average())));
        int degrees = nested.UnitsNm.Sum(unit => unit.Count - 1);
        return degrees == 0 ? 0 : squares / degrees;
    }

    private static double BetweenVariance(MeasuredLength.NestedReplicates nested)
    {
        double count = nested.UnitsNm.Sum(unit => unit.Count), units = nested.UnitsNm.Count;
        double mean = nested.UnitsNm.Sum(unit => unit.Sum()) / count;
        double between = nested.UnitsNm.Sum(unit => unit.Count * Math.Pow(unit.Average() - mean, 2)) / (units - 1);
        double perUnit = (count - nested.UnitsNm.Sum(unit => (double)unit.Count * unit.Count) / count) / (units - 1);
        return Math.Max(0, (between - WithinVariance(nested)) / perUnit);
    }
}
