using BarbuleOptics.Files.Toml;
using BarbuleOptics.Materials;

namespace BarbuleOptics.Files;

/// <summary>Reads n and k of a material table, each by its kind.</summary>
/// <param name="unitNm">One unit of the table's lengths, in nm.</param>
/// <param name="log">Receives what is wrong.</param>
internal sealed class DispersionReader(double unitNm, ReadingLog log)
{
    private const string Cauchy = "cauchy";
    private const string Sellmeier = "sellmeier";
    private const string Exponential = "exponential-absorption";
    private const string Constant = "constant";
    private const string Table = "table";

    private static readonly string[] Kinds = [Cauchy, Sellmeier, Exponential, Constant, Table];
    private static readonly NumberRange Any = new(-1e30, 1e30);
    private static readonly NumberRange NotNegative = new(0, 1e30);
    private static readonly NumberRange Positive = new(0, 1e30, ExcludesLeast: true);

    /// <summary>n and k, each from its own section; null for what was refused.</summary>
    public (IDispersion? N, IDispersion? K) ReadSeparate(TableReader reader) => (ReadSection(reader, "n"), ReadSection(reader, "k"));

    /// <summary>n and k from one table of rows; null when it was refused.</summary>
    public (IDispersion? N, IDispersion? K) ReadJoint(TableReader reader)
    {
        foreach (string key in (string[])["n", "k"])
        {
            if (reader.Has(key))
                reader.Refuse(key, "found beside [table]; allowed [n] and [k], or [table] alone");
        }
        if (reader.Inner("table") is not { } table)
            return (null, null);
        table.RefuseOthers(["rows"]);
        double[][]? rows = ReadRows(table);
        if (rows is null)
            return (null, null);
        double[] wavelengths = [.. rows.Select(row => row[0] * unitNm)];
        return (new TabulatedDispersion(wavelengths, [.. rows.Select(row => row[1])]), new TabulatedDispersion(wavelengths, [.. rows.Select(row => row[2])]));
    }

    private IDispersion? ReadSection(TableReader reader, string key)
    {
        if (!reader.Has(key))
            reader.RefuseMissing(key, $"a section [{key}] with its kind, or [table]");
        if (reader.Inner(key) is not { } section)
            return null;
        if (!section.Has("kind"))
            section.RefuseMissing("kind", TableReader.Quoted(Kinds));
        return section.Word("kind", Kinds) switch
        {
            Cauchy => ReadCauchy(section),
            Sellmeier => ReadSellmeier(section),
            Exponential => ReadExponential(section),
            Constant => ReadConstant(section),
            Table => ReadTable(section),
            _ => null,
        };
    }

    private CauchyDispersion? ReadCauchy(TableReader section)
    {
        section.RefuseOthers(["kind", "a", "b", "c"]);
        double? a = Need(section, "a", Any), b = Need(section, "b", Any), c = section.Has("c") ? section.Number("c", Any) : 0;
        double squared = unitNm * unitNm;
        return a is { } first && b is { } second && c is { } third ? new CauchyDispersion(first, second * squared, third * squared * squared) : null;
    }

    private SellmeierDispersion? ReadSellmeier(TableReader section)
    {
        section.RefuseOthers(["kind", "a", "b", "c", "c_root"]);
        double? a = section.Has("a") ? section.Number("a", Any) : 1;
        double[]? strengths = Numbers(section, "b", Any);
        bool isRoot = section.Has("c_root");
        if (isRoot && section.Has("c"))
            section.Refuse("c_root", "found beside c; allowed one of the two");
        double[]? resonances = Numbers(section, isRoot ? "c_root" : "c", NotNegative);
        if (a is not { } constant || strengths is null || resonances is null)
            return null;
        if (strengths.Length != resonances.Length)
        {
            section.Refuse(isRoot ? "c_root" : "c", $"found {resonances.Length} numbers; allowed as many as b has, {strengths.Length}");
            return null;
        }
        double unitUm = unitNm / 1000;
        double[] squared = [.. resonances.Select(c => (isRoot ? c * c : c) * unitUm * unitUm)];
        return new SellmeierDispersion(constant, strengths, squared);
    }

    private ExponentialAbsorption? ReadExponential(TableReader section)
    {
        section.RefuseOthers(["kind", "a", "b"]);
        double? a = Need(section, "a", NotNegative), b = Need(section, "b", Positive);
        return a is { } amplitude && b is { } decay ? new ExponentialAbsorption(amplitude, decay * unitNm) : null;
    }

    private static ConstantDispersion? ReadConstant(TableReader section)
    {
        section.RefuseOthers(["kind", "value"]);
        return Need(section, "value", NotNegative) is { } value ? new ConstantDispersion(value) : null;
    }

    private TabulatedDispersion? ReadTable(TableReader section)
    {
        section.RefuseOthers(["kind", "wavelengths", "values"]);
        double[]? wavelengths = Numbers(section, "wavelengths", Positive), values = Numbers(section, "values", NotNegative);
        if (wavelengths is null || values is null || RefusesRows(section, "wavelengths", wavelengths))
            return null;
        if (wavelengths.Length == values.Length)
            return new TabulatedDispersion([.. wavelengths.Select(wavelength => wavelength * unitNm)], values);
        section.Refuse("values", $"found {values.Length} numbers; allowed as many as wavelengths has, {wavelengths.Length}");
        return null;
    }

    private double[][]? ReadRows(TableReader table)
    {
        const string Row = "[wavelength, n, k]";
        if (!table.Has("rows"))
            table.RefuseMissing("rows", $"a list of {Row}");
        if (!table.TryGet("rows", out TomlNode? value))
            return null;
        if (value is not TomlArray list)
        {
            table.Refuse("rows", $"found {value.Found}; allowed a list of {Row}");
            return null;
        }
        if (list.Items.FirstOrDefault(item => !IsRow(item)) is { } odd)
        {
            log.Refuse(odd.Location, table.Table.PathOf("rows"), $"found {odd.Found}; allowed {Row}, with a wavelength and an n above 0 and k 0 or above");
            return null;
        }
        double[][] rows = [.. list.Items.Cast<TomlArray>().Select(row => row.Items.Cast<TomlNumber>().Select(number => number.Value).ToArray())];
        return RefusesRows(table, "rows", [.. rows.Select(row => row[0])]) ? null : rows;
    }

    private static bool IsRow(TomlNode node)
        => node is TomlArray { Items: [TomlNumber { Value: var wavelength }, TomlNumber { Value: var n }, TomlNumber { Value: var k }] }
            && Positive.Holds(wavelength) && Positive.Holds(n) && NotNegative.Holds(k);

    private static bool RefusesRows(TableReader section, string key, double[] wavelengths)
    {
        int unordered = Enumerable.Range(1, Math.Max(0, wavelengths.Length - 1)).FirstOrDefault(i => wavelengths[i] <= wavelengths[i - 1]);
        if (wavelengths.Length >= 2 && unordered == 0)
            return false;
        section.Refuse(key, wavelengths.Length < 2
            ? FormattableString.Invariant($"found {wavelengths.Length} rows; allowed at least 2")
            : $"found {OneLine.Number(wavelengths[unordered])} after {OneLine.Number(wavelengths[unordered - 1])}; allowed ascending wavelengths");
        return true;
    }

    private static double? Need(TableReader section, string key, NumberRange range)
    {
        if (!section.Has(key))
            section.RefuseMissing(key, $"a number, {range}");
        return section.Number(key, range);
    }

    private double[]? Numbers(TableReader section, string key, NumberRange range)
    {
        if (!section.Has(key))
            section.RefuseMissing(key, "a list of numbers");
        if (!section.TryGet(key, out TomlNode? value))
            return null;
        if (value is not TomlArray { Items.Count: > 0 } list)
        {
            section.Refuse(key, $"found {value.Found}; allowed a list of numbers");
            return null;
        }
        foreach (TomlNode odd in list.Items.Where(item => item is not TomlNumber number || !range.Holds(number.Value)))
            log.Refuse(odd.Location, section.Table.PathOf(key), $"found {odd.Found}; allowed a number, {range}");
        double[] numbers = [.. list.Items.OfType<TomlNumber>().Where(number => range.Holds(number.Value)).Select(number => number.Value)];
        return numbers.Length == list.Items.Count ? numbers : null;
    }
}
