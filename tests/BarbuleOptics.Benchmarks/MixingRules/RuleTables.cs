using System.Globalization;
using System.Text;
using BarbuleOptics.Layering.Mixing;
using BarbuleOptics.Multilayer;

namespace BarbuleOptics.Benchmarks.MixingRules;

/// <summary>The evidence as tables of a document.</summary>
internal static class RuleTables
{
    private static readonly (Polarizations Polarization, string Name)[] Lights =
        [(Polarizations.Unpolarized, "unpolarized"), (Polarizations.S, "s"), (Polarizations.P, "p")];

    /// <summary>Every rule in every polarization, over all random structures and angles.</summary>
    public static string Rules(IReadOnlyList<Case> cases)
    {
        var text = new StringBuilder();
        text.AppendLine("| `--mixing` | light | largest change of R | peak shift, nm | no such peak | CIEDE2000 |");
        text.AppendLine("|---|---|---|---|---|---|");
        foreach ((Polarizations light, string name) in Lights)
        {
            foreach (IMixingRule rule in Layering.Mixing.MixingRules.All)
                AppendRow(text, $"| `{rule.Name}` | {name} |", [.. cases.Where(one => one.Rule == rule && one.Polarization == light)]);
        }
        return text.ToString();
    }

    /// <summary>One rule in unpolarized light for each form and angle, with the share of spectra that look alike.</summary>
    public static string Forms(IReadOnlyList<Case> cases, IMixingRule rule)
    {
        var text = new StringBuilder();
        text.AppendLine("| form | angle | CIEDE2000, no order inside | below 2 | CIEDE2000, orders inside | below 2 |");
        text.AppendLine("|---|---|---|---|---|---|");
        IEnumerable<Case> seen = cases.Where(one => one.Rule == rule && one.Polarization == Polarizations.Unpolarized);
        foreach (IGrouping<(string Form, double IncidenceDeg), Case> group in seen.GroupBy(one => (one.Form, one.IncidenceDeg)))
        {
            double[] without = Colors(group.Where(one => !one.OrdersInMatrix)), with = Colors(group.Where(one => one.OrdersInMatrix));
            text.AppendLine(CultureInfo.InvariantCulture, $"| {group.Key.Form} | {group.Key.IncidenceDeg} | {Pair(without, "0.0")} | {Alike(without)} | {Pair(with, "0.0")} | {Alike(with)} |");
        }
        return text.ToString();
    }

    /// <summary>The rules on the program's own samples at normal incidence in unpolarized light: CIEDE2000.</summary>
    public static string Samples(IReadOnlyList<Case> cases)
    {
        var text = new StringBuilder("| sample |");
        foreach (IMixingRule rule in Layering.Mixing.MixingRules.All)
            text.Append(CultureInfo.InvariantCulture, $" `{rule.Name}` |");
        text.AppendLine().Append('|').Insert(text.Length, "---|", Layering.Mixing.MixingRules.All.Count + 1).AppendLine();
        IEnumerable<Case> seen = cases.Where(one => one.IncidenceDeg == 0 && one.Polarization == Polarizations.Unpolarized);
        foreach (IGrouping<string, Case> sample in seen.GroupBy(one => one.Structure))
        {
            text.Append(CultureInfo.InvariantCulture, $"| {sample.Key} |");
            foreach (Case one in sample)
                text.Append(CultureInfo.InvariantCulture, $" {one.Distance.Color:0.0} |");
            text.AppendLine();
        }
        return text.ToString();
    }

    private static void AppendRow(StringBuilder text, string start, List<Case> cases)
    {
        int peaks = cases.Count(one => one.Distance.HasPeak), matched = cases.Count(one => one.Distance.PeakNm is not null);
        text.AppendLine(CultureInfo.InvariantCulture,
            $"{start} {Pair([.. cases.Select(one => one.Distance.Change)], "0.000")} | {Pair([.. cases.Select(one => one.Distance.PeakNm).OfType<double>()], "0.0")} | {100.0 * (peaks - matched) / Math.Max(peaks, 1):0} % | {Pair(Colors(cases), "0.0")} |");
    }

    private static double[] Colors(IEnumerable<Case> cases) => [.. cases.Select(one => one.Distance.Color)];

    private static string Alike(double[] values)
        => values.Length == 0 ? "" : string.Create(CultureInfo.InvariantCulture, $"{100.0 * values.Count(value => value < 2) / values.Length:0} % of {values.Length}");

    /// <summary>Median and 95th percentile.</summary>
    private static string Pair(double[] values, string format)
        => values.Length == 0 ? "" : $"{Quantile(values, 0.5).ToString(format, CultureInfo.InvariantCulture)} / {Quantile(values, 0.95).ToString(format, CultureInfo.InvariantCulture)}";

    /// <summary>Linear between order statistics (type 7 of Hyndman and Fan 1996, Am. Stat. 50:361).</summary>
    private static double Quantile(double[] values, double share)
    {
        double[] sorted = [.. values.Order()];
        double place = share * (sorted.Length - 1);
        int below = (int)place;
        return below + 1 < sorted.Length ? sorted[below] + (place - below) * (sorted[below + 1] - sorted[below]) : sorted[^1];
    }
}
