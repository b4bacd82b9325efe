using BarbuleOptics.Anatomy;
using BarbuleOptics.Files.Toml;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Files;

/// <summary>Reads a length as it was measured: a number, a summary, bounds, or replicates.</summary>
internal static class LengthReader
{
    /// <summary>Largest length, 1 mm.</summary>
    public const double MostNm = 1e6;

    /// <summary>A size: above 0.</summary>
    public static readonly NumberRange Size = new(0, MostNm, ExcludesLeast: true);

    /// <summary>A distance or the size of a core: 0 or above.</summary>
    public static readonly NumberRange Distance = new(0, MostNm);

    /// <summary>A gap or an offset: of either sign.</summary>
    public static readonly NumberRange Signed = new(-MostNm, MostNm);

    private static readonly string[] SummaryKeys = ["mean", "sd", "n", "sd_between"];
    private static readonly string[] IntervalKeys = ["min", "max"];

    private const string Kinds = "a number of nm, { mean, sd, n }, { mean, sd, n, sd_between }, { min, max } or a list of replicates";

    /// <summary>The length under a key; null when it is absent or was refused.</summary>
    public static MeasuredLength? Read(TableReader reader, string key, NumberRange range, ReadingLog log)
    {
        if (!reader.TryGet(key, out TomlNode? value))
            return null;
        string path = reader.Table.PathOf(key);
        switch (value)
        {
            case TomlNumber number:
                return Checked(number, path, range, log) is { } nanometres ? MeasuredLength.FromNanometres(nanometres) : null;
            case TomlTable table:
                return FromTable(new TableReader(table, log), range, log);
            case TomlArray list:
                return FromList(list, path, range, log);
            default:
                log.Refuse(value.Location, path, $"found {value.Found}; allowed {Kinds}");
                return null;
        }
    }

    /// <summary>The length under a key that must be there; null when it was refused.</summary>
    public static MeasuredLength? Need(TableReader reader, string key, NumberRange range, ReadingLog log)
    {
        if (!reader.Has(key))
            reader.RefuseMissing(key, Kinds);
        return Read(reader, key, range, log);
    }

    private static MeasuredLength? FromTable(TableReader reader, NumberRange range, ReadingLog log)
    {
        bool isInterval = IntervalKeys.Any(reader.Has), isSummary = SummaryKeys.Any(reader.Has);
        if (isInterval == isSummary)
        {
            log.Refuse(reader.Table.Location, reader.Table.Path, $"found {reader.Table.Found}; allowed {Kinds}");
            return null;
        }
        reader.RefuseOthers(isInterval ? IntervalKeys : SummaryKeys);
        return isInterval ? Interval(reader, range) : Summary(reader, range);
    }

    private static MeasuredLength.Summary? Summary(TableReader reader, NumberRange range)
    {
        NeedKeys(reader, "mean", "sd");
        double? mean = reader.Number("mean", range), sd = reader.Number("sd", Distance);
        int? units = Units(reader);
        double? between = reader.Number("sd_between", Distance);
        return mean is { } meanNm && sd is { } sdNm ? new MeasuredLength.Summary(meanNm, sdNm, units, between) : null;
    }

    private static MeasuredLength.Interval? Interval(TableReader reader, NumberRange range)
    {
        NeedKeys(reader, "min", "max");
        if (reader.Number("min", range) is not { } least || reader.Number("max", range) is not { } most)
            return null;
        if (most >= least)
            return new MeasuredLength.Interval(least, most);
        reader.Refuse("max", $"found {OneLine.Number(most)}; allowed min or above, {OneLine.Number(least)}");
        return null;
    }

    private static int? Units(TableReader reader)
    {
        if (!reader.TryGet("n", out TomlNode? value))
            return null;
        if (value is TomlNumber { Whole: >= 1 and <= int.MaxValue and { } whole })
            return (int)whole;
        reader.Refuse("n", $"found {value.Found}; allowed a whole number, 1 or above");
        return null;
    }

    private static MeasuredLength? FromList(TomlArray list, string path, NumberRange range, ReadingLog log)
    {
        const string Lists = "a list of at least two numbers, or of at least two lists of numbers, one an independent unit";
        if (list.Items.Count < 2)
        {
            log.Refuse(list.Location, path, $"found {list.Found}; allowed {Lists}");
            return null;
        }
        // What the first item is, all are meant to be.
        if (list.Items[0] is not TomlArray)
            return Numbers(list, path, range, log) is { } values ? new MeasuredLength.Replicates(values) : null;
        if (list.Items.FirstOrDefault(item => item is not TomlArray { Items.Count: > 0 }) is { } odd)
        {
            log.Refuse(odd.Location, path, $"found {odd.Found} in a list; allowed {Lists}");
            return null;
        }
        ValueList<double>?[] units = [.. list.Items.Cast<TomlArray>().Select(unit => Numbers(unit, path, range, log))];
        return units.All(unit => unit is not null) ? new MeasuredLength.NestedReplicates([.. units!]) : null;
    }

    private static ValueList<double>? Numbers(TomlArray list, string path, NumberRange range, ReadingLog log)
    {
        double?[] values = [.. list.Items.Select(item => Checked(item, path, range, log))];
        return values.All(value => value is not null) ? [.. values.Select(value => value!.Value)] : null;
    }

    private static double? Checked(TomlNode node, string path, NumberRange range, ReadingLog log)
    {
        if (node is TomlNumber number && range.Holds(number.Value))
            return number.Value;
        log.Refuse(node.Location, path, $"found {node.Found}; allowed {(node is TomlNumber ? "" : "a number, ")}{range} nm");
        return null;
    }

    private static void NeedKeys(TableReader reader, params ReadOnlySpan<string> keys)
    {
        foreach (string key in keys)
        {
            if (!reader.Has(key))
                reader.RefuseMissing(key, "a number of nm");
        }
    }
}
