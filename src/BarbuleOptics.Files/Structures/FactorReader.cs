using BarbuleOptics.Anatomy;
using BarbuleOptics.Files.Toml;

namespace BarbuleOptics.Files;

/// <summary>Reads <c>[preparation]</c> and <c>[preservation]</c>: numbers that correct the lengths measured.</summary>
internal sealed class FactorReader(ReadingLog log)
{
    /// <summary>Beyond this angle a section shows its own slant rather than a barbule.</summary>
    private static readonly NumberRange Obliquity = new(0, 80);

    private static readonly NumberRange Scale = new(0.1, 10);
    private static readonly NumberRange Shrinkage = new(-0.9, 0.9);
    private static readonly string[] PreparationKeys = ["obliquity", "keratin_scale", "melanin_scale"];
    private static readonly string[] PreservationKeys = ["melanosome_shrinkage", "cortex_shrinkage"];
    private static readonly string[] SummaryKeys = ["mean", "sd"];
    private static readonly string[] IntervalKeys = ["min", "max"];

    private const string Kinds = "a number, { mean, sd } or { min, max }";

    /// <summary>The preparation; null where the file has none.</summary>
    public Preparation? ReadPreparation(TableReader file)
    {
        if (file.Inner("preparation") is not { } reader)
            return null;
        reader.RefuseOthers(PreparationKeys);
        return new Preparation(Read(reader, "obliquity", Obliquity, " degrees"), Read(reader, "keratin_scale", Scale), Read(reader, "melanin_scale", Scale));
    }

    /// <summary>The preservation; null where the file has none.</summary>
    public Preservation? ReadPreservation(TableReader file)
    {
        if (file.Inner("preservation") is not { } reader)
            return null;
        reader.RefuseOthers(PreservationKeys);
        return new Preservation(Read(reader, "melanosome_shrinkage", Shrinkage), Read(reader, "cortex_shrinkage", Shrinkage));
    }

    private MeasuredFactor? Read(TableReader reader, string key, NumberRange range, string unit = "")
    {
        if (!reader.TryGet(key, out TomlNode? value))
            return null;
        if (value is not TomlTable table)
        {
            if (value is TomlNumber)
                return reader.Number(key, range, unit) is { } number ? MeasuredFactor.Of(number) : null;
            reader.Refuse(key, $"found {value.Found}; allowed {Kinds}");
            return null;
        }
        var inner = new TableReader(table, log);
        bool isInterval = IntervalKeys.Any(inner.Has), isSummary = SummaryKeys.Any(inner.Has);
        if (isInterval == isSummary)
        {
            reader.Refuse(key, $"found {value.Found}; allowed {Kinds}");
            return null;
        }
        string[] keys = isInterval ? IntervalKeys : SummaryKeys;
        inner.RefuseOthers(keys);
        foreach (string missing in keys.Where(one => !inner.Has(one)))
            inner.RefuseMissing(missing, "a number");
        return isInterval ? Interval(inner, range, unit) : Summary(inner, range, unit);
    }

    private static MeasuredFactor.Summary? Summary(TableReader reader, NumberRange range, string unit)
    {
        double? mean = reader.Number("mean", range, unit), sd = reader.Number("sd", new NumberRange(0, range.Most), unit);
        return mean is { } center && sd is { } deviation ? new MeasuredFactor.Summary(center, deviation) : null;
    }

    private static MeasuredFactor.Interval? Interval(TableReader reader, NumberRange range, string unit)
    {
        if (reader.Number("min", range, unit) is not { } least || reader.Number("max", range, unit) is not { } most)
            return null;
        if (most >= least)
            return new MeasuredFactor.Interval(least, most);
        reader.Refuse("max", $"found {OneLine.Number(most)}; allowed min or above, {OneLine.Number(least)}");
        return null;
    }
}
