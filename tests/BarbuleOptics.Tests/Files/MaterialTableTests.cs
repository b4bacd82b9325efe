using System.Text;
using BarbuleOptics.Files;
using BarbuleOptics.Materials;
using Xunit;

namespace BarbuleOptics.Tests.Files;

/// <summary>Material tables give the constants that their formulas state, in either unit, and are refused at the line of what is wrong.</summary>
public sealed class MaterialTableTests
{
    private const string Zero = "kind = 'constant'\nvalue = 0";
    private const string One = "kind = 'constant'\nvalue = 1.5";

    [Theory]
    [InlineData("nm", 1.648, 23700.0, 0.0, 1.742800)] // 1.648 + 23700 / 500^2 = 1.7428, by hand
    [InlineData("um", 1.648, 0.0237, 0.0, 1.742800)]
    [InlineData("nm", 1.5, 5000.0, 1e9, 1.536000)] // 1.5 + 0.02 + 1e9 / 6.25e10 = 1.536, by hand
    [InlineData("um", 1.5, 0.005, 0.001, 1.536000)]
    public void Cauchy_coefficients_follow_the_unit(string unit, double a, double b, double c, double expected)
    {
        Material material = Good(Text(FormattableString.Invariant($"kind = 'cauchy'\na = {a}\nb = {b}\nc = {c}"), Zero, unit));
        Assert.Equal(expected, material.IndexAt(500).Real, 12);
    }

    // Fused silica, Malitson 1965, J. Opt. Soc. Am. 55:1205, doi 10.1364/JOSA.55.001205: n = 1.458464 at 587.5618 nm
    // (digits as in the public tables of optical constants); the same resonances in every way of writing them.
    [Theory]
    [InlineData("um", "c_root = [0.0684043, 0.1162414, 9.896161]")]
    [InlineData("um", "c = [0.00467914825849, 0.01351206307396, 97.934002537921]")]
    [InlineData("nm", "c_root = [68.4043, 116.2414, 9896.161]")]
    public void Sellmeier_coefficients_follow_the_unit(string unit, string resonances)
    {
        Material material = Good(Text($"kind = 'sellmeier'\nb = [0.6961663, 0.4079426, 0.8974794]\n{resonances}", Zero, unit));
        Assert.Equal(1.458464, material.IndexAt(587.5618).Real, 6);
    }

    [Theory]
    [InlineData("nm", 270.0)]
    [InlineData("um", 0.27)]
    public void Exponential_absorption_follows_the_unit(string unit, double decay)
    {
        Material material = Good(Text(One, FormattableString.Invariant($"kind = 'exponential-absorption'\na = 0.56\nb = {decay}"), unit));
        // 0.56 / e at one decay length.
        Assert.Equal(0.56 / Math.E, material.IndexAt(270).Imaginary, 14);
    }

    [Fact]
    public void Tables_hold_their_rows_and_do_not_extrapolate()
    {
        Material separate = Good(Text("kind = 'table'\nwavelengths = [0.2, 0.5, 0.9]\nvalues = [1.6, 1.55, 1.5]", "kind = 'table'\nwavelengths = [0.3, 0.8]\nvalues = [0.2, 0.1]", "um"));
        Assert.Equal((1.55, 0.16), (separate.IndexAt(500).Real, Math.Round(separate.IndexAt(500).Imaginary, 12)));
        Assert.False(separate.Extrapolates);
        Material joint = Good(Head("nm") + "[table]\nrows = [[300, 1.6, 0.2], [500, 1.55, 0.1], [800, 1.5, 0]]\n");
        Assert.Equal((1.55, 0.1), (joint.IndexAt(500).Real, joint.IndexAt(500).Imaginary));
        Assert.False(joint.Extrapolates);
        Assert.True(Good(Text(One, Zero)).Extrapolates);
    }

    [Fact]
    public void A_table_keeps_its_words()
    {
        MaterialTable table = MaterialTableFile.Parse(Encoding.UTF8.GetBytes("note = 'dry'\n" + Text(One, Zero)), "own.toml").Value!;
        Assert.Equal(("own", "invented", "for a test", "dry", "own.toml"), (table.Material.Name, table.Material.Source, table.Material.Obtained, table.Material.Note, table.File));
        Assert.Equal((300.0, 800.0), (table.Material.LeastNm, table.Material.MostNm));
    }

    /// <summary>Text, line, key, words of the message. Lines 1 to 6 are the head, [n] opens in line 7 and holds lines 8 on.</summary>
    public static TheoryData<string, int, string?, string> Wrong => new()
    {
        { "", 1, "format", "format = 1" },
        { Text(One, Zero).Replace("format = 1", "format = 7"), 1, "format", "found 7" },
        { Text(One, Zero).Replace("unit = 'nm'", "unit = 'um '"), 3, "unit", "did you mean \"um\"; allowed \"nm\", \"um\"" },
        { Text(One, Zero).Replace("name = 'own'", "name = 'a/b'"), 2, "name", "without /" },
        { Text(One, Zero).Replace("name = 'own'", "name = 'unknown'"), 2, "name", "other than unknown" },
        { Text(One, Zero).Replace("name = 'own'", "nane = 'own'"), 2, "nane", "did you mean \"name\"" },
        { Text(One, Zero).Replace("[300, 800]", "[800, 300]"), 4, "range_nm", "ascending" },
        { Text(One, Zero).Replace("[300, 800]", "[300]"), 4, "range_nm", "two ascending" },
        { Text(One, Zero).Replace("[300, 800]", "[-300, 800]"), 4, "range_nm", "found -300, 800" },
        { Text(One, Zero).Replace("source = 'invented'\n", ""), 1, "source", "with DOI" },
        { Head("nm"), 1, "n", "a section [n]" },
        { Head("nm") + "[n]\n" + One, 1, "k", "a section [k]" },
        { Text("value = 1.5", Zero), 7, "n.kind", "\"cauchy\"" },
        { Text("kind = 'cauchi'", Zero), 8, "n.kind", "did you mean \"cauchy\"" },
        { Text("kind = 'cauchy'\na = 1.5", Zero), 7, "n.b", "found nothing" },
        { Text("kind = 'cauchy'\na = 1.5\nb = 'x'", Zero), 10, "n.b", "found \"x\"" },
        { Text("kind = 'cauchy'\na = 1.5\nb = 3000\nd = 1", Zero), 11, "n.d", "allowed kind, a, b, c" },
        { Text("kind = 'cauchy'\na = -1.5\nb = 0", Zero), 7, "n", "found n = -1.5 at 300 nm; allowed above 0" },
        { Text(One, "kind = 'cauchy'\na = 0.1\nb = -25000"), 10, "k", "allowed 0 or above over range_nm" },
        { Text("kind = 'sellmeier'\nb = [1, 2]\nc = [100]", Zero), 10, "n.c", "found 1 numbers; allowed as many as b has, 2" },
        { Text("kind = 'sellmeier'\nb = [1]\nc = [100]\nc_root = [10]", Zero), 11, "n.c_root", "found beside c" },
        { Text("kind = 'sellmeier'\nb = [1]", Zero), 7, "n.c", "found nothing" },
        { Text("kind = 'sellmeier'\nb = [1]\nc = [160000]", Zero), 7, "n", "found n = " },
        { Text("kind = 'constant'\nvalue = -1", Zero), 9, "n.value", "found -1; allowed 0 to" },
        { Text("kind = 'constant'\nvalue = 0", Zero), 7, "n", "allowed above 0" },
        { Text(One, "kind = 'exponential-absorption'\na = 1\nb = 0"), 13, "k.b", "found 0; allowed above 0" },
        { Text("kind = 'table'\nwavelengths = [300, 800]\nvalues = [1.5]", Zero), 10, "n.values", "as many as wavelengths has, 2" },
        { Text("kind = 'table'\nwavelengths = [300]\nvalues = [1.5]", Zero), 9, "n.wavelengths", "at least 2" },
        { Text("kind = 'table'\nwavelengths = [300, 500, 400, 800]\nvalues = [1, 1, 1, 1]", Zero), 9, "n.wavelengths", "found 400 after 500; allowed ascending" },
        { Text("kind = 'table'\nwavelengths = [301, 800]\nvalues = [1.5, 1.5]", Zero), 4, "range_nm", "within the rows of n, 301 to 800" },
        { Text(One, "kind = 'table'\nwavelengths = [300, 799]\nvalues = [0, 0]"), 4, "range_nm", "within the rows of k, 300 to 799" },
        { Text("kind = 'table'\nwavelengths = [300, nan]\nvalues = [1.5, 1.5]", Zero), 9, "n.wavelengths", "found NaN" },
        { Head("nm") + "[table]\nrows = [[300, 1.5, 0], [800, 1.5]]\n", 8, "table.rows", "allowed [wavelength, n, k]" },
        { Head("nm") + "[table]\nrows = [[300, 1.5, 0], [300, 1.5, 0]]\n", 8, "table.rows", "found 300 after 300" },
        { Head("nm") + "[table]\nrows = [[300, 1.5, 0]]\n", 8, "table.rows", "at least 2" },
        { Head("nm") + "[table]\nrows = [[300, 1.5, 0], [800, 1.5, -1]]\n", 8, "table.rows", "k 0 or above" },
        { Text(One, Zero) + "\n[table]\nrows = [[300, 1.5, 0], [800, 1.5, 0]]\n", 7, "n", "found beside [table]" },
    };

    [Theory]
    [MemberData(nameof(Wrong))]
    public void What_is_wrong_is_refused_at_its_line(string text, int line, string? key, string words)
    {
        FileResult<MaterialTable> result = MaterialTableFile.Parse(Encoding.UTF8.GetBytes(text), "own.toml");
        Assert.False(result.Succeeded);
        Assert.Contains(result.Problems, problem => problem.Location.Line == line && problem.Key == key && problem.Message.Contains(words, StringComparison.Ordinal));
    }

    [Fact]
    public void Mutated_tables_give_a_material_or_problems()
    {
        string[] samples = [Text("kind = 'cauchy'\na = 1.5\nb = 3000", Zero), Head("um") + "[table]\nrows = [[0.3, 1.5, 0], [0.5, 1.6, 0.1], [0.8, 1.5, 0]]\n", Text("kind = 'sellmeier'\nb = [1]\nc = [100]", One)];
        var mutator = new StructureMutator(seed: 11);
        for (int i = 0; i < 3000; i++)
        {
            FileResult<MaterialTable> result = MaterialTableFile.Parse(mutator.Mutate(samples[i % samples.Length]), "own.toml");
            Assert.Equal(result.Succeeded, result.Problems.Count == 0);
            if (result.Succeeded)
                Assert.True(result.Value.Material.IndexAt(result.Value.Material.LeastNm).Real > 0);
        }
    }

    private static string Head(string unit) => $"format = 1\nname = 'own'\nunit = '{unit}'\nrange_nm = [300, 800]\nsource = 'invented'\nobtained = 'for a test'\n";

    private static string Text(string n, string k, string unit = "nm") => $"{Head(unit)}[n]\n{n}\n[k]\n{k}";

    private static Material Good(string text)
    {
        FileResult<MaterialTable> result = MaterialTableFile.Parse(Encoding.UTF8.GetBytes(text), "own.toml");
        Assert.True(result.Succeeded, string.Join('\n', result.Problems));
        return result.Value.Material;
    }
}
