using System.Text;
using BarbuleOptics.Files;
using Xunit;

namespace BarbuleOptics.Tests.Files;

/// <summary>What cannot exist is refused at its line, in words that say what was found and what is allowed.</summary>
public sealed class StructureRefusalTests
{
    // Lines 1 to 3 of most cases below; what is wrong follows from line 4 on.
    private const string Head = "format = 1\n[cortex]\nthickness = 100\n";
    private const string Rod = "[[layer]]\nform = 'rod'\ndiameter = 100\nspacing = 150\n";
    private const string Flat = "[[layer]]\nform = 'flattened-rod'\nheight = 80\nwidth = 120\nspacing = 150\n";
    private const string Platelet = "[[layer]]\nform = 'platelet'\nthickness = 60\nwidth = 200\nspacing = 200\n";
    private const string Film = "[[layer]]\nform = 'film'\nthickness = 60\n";
    private const string Cell = "[[layer]]\nspacing = 300\n[[layer.body]]\nform = 'rod'\ndiameter = 100\n";

    /// <summary>Text, line, key, words of the message. The lines are counted by hand.</summary>
    public static TheoryData<string, int, string?, string> Wrong => new()
    {
        // The file as a whole.
        { "", 1, "format", "needed format = 1" },
        { "[cortex]\nthickness = 5\n", 1, "format", "format = 1" },
        { "format = 2\n[cortex]\nthickness = 5\n", 1, "format", "found 2; allowed 1" },
        { "format = 1.0\n[cortex]\nthickness = 5\n", 1, "format", "found 1.0; allowed 1" },
        { "format = '1'\n[cortex]\nthickness = 5\n", 1, "format", "found \"1\"; allowed 1" },
        { "format = 1\n", 1, null, "at least one layer or a cortex" },
        { "format = 1\nlayer = []\n", 1, null, "at least one layer or a cortex" },
        { "format = 1\n[cortex]\nthickness = 0\n", 1, "cortex.thickness", "at least one layer or a cortex" },
        { Head + "[[layers]]\nform = 'rod'\n", 4, "layers", "did you mean [[layer]]" },
        { Head + "[layer]\nform = 'rod'\n", 4, "layer", "[[layer]]" },
        { "format = 1\nnam = 'x'\n" + Film, 2, "nam", "did you mean \"name\"" },
        { "format = 1\nname = ''\n" + Film, 2, "name", "allowed a text" },
        { "format = 1\nname = \"two\\nlines\"\n" + Film, 2, "name", "one line" },
        { "format = 1\nname = 12\n" + Film, 2, "name", "found 12; allowed a text" },
        { "format = 1\ncortex = 5\n", 2, "cortex", "found 5; allowed a table" },

        // Not TOML, or written twice.
        { Head + "[[layer]\n", 4, null, "not valid TOML" },
        { Head + "[[layer]]\nform = rod\n", 5, null, "a text stands in quotes: \"rod\"" },
        { Head + "[[layer]]\nform = 'film'\nthickness = 118,5\n", 6, null, "a point, not a comma" },
        { Head + "[[layer]]\nform = 'film\nthickness = 5\n", 6, null, "not valid TOML" },
        { Head + "thickness = 200\n", 4, "cortex.thickness", "second time" },
        { Head + "[cortex]\nthickness = 200\n", 4, "cortex", "second time" },
        { Head + "[barbule]\naxis = 'along'\nsurround = 'air'\naxis = 'across'\n", 7, "barbule.axis", "throat.toml:5:1" },
        { Head + "[[cortex]]\n", 4, "cortex", "second time" },
        { "format = 1\ncortex = { thickness = 5, thickness = 6 }\n", 2, "cortex.thickness", "second time" },

        // The surroundings.
        { Head + "[barbule]\nsuround = 'air'\n", 5, "barbule.suround", "did you mean \"surround\"" },
        { Head + "[barbule]\nsurround = { n = 1.33, k = 0.01 }\n", 5, "barbule.surround", "k = 0.01; allowed a lossless one" },
        { Head + "[barbule]\nsurround = 'eumelanin'\n", 5, "barbule.surround", "lossless" },
        { Head + "[barbule]\nmatrix = 'keratine'\n", 5, "barbule.matrix", "did you mean \"keratin\"; allowed air, eumelanin, keratin, water" },
        { Head + "[barbule]\nmatrix = 'unknown'\n", 5, "barbule.matrix", "unknown material" },
        { Head + "[barbule]\nmatrix = 1.5\n", 5, "barbule.matrix", "found 1.5; allowed the name" },
        { Head + "[barbule]\nmatrix = './own.toml'\n", 5, "barbule.matrix", "own.toml" },
        { Head + "[barbule]\nmatrix = { k = 0.1 }\n", 5, "barbule.matrix.n", "refractive index" },
        { Head + "[barbule]\nmatrix = { n = 0 }\n", 5, "barbule.matrix.n", "found 0; allowed above 0" },
        { Head + "[barbule]\nmatrix = { n = 1.5, k = -0.1 }\n", 5, "barbule.matrix.k", "found -0.1; allowed 0 to" },
        { Head + "[barbule]\nmatrix = { n = 1.5, q = 1 }\n", 5, "barbule.matrix.q", "allowed n, k" },
        { Head + "[barbule]\nmatrix = { n = nan }\n", 5, "barbule.matrix.n", "found NaN" },
        { Head + "[barbule]\naxis = 'accross'\n", 5, "barbule.axis", "did you mean \"across\"" },
        { Head + "[barbule]\naxis = 91\n", 5, "barbule.axis", "found 91; allowed \"across\"" },
        { Head + "[barbule]\naxis = -1e-9\n", 5, "barbule.axis", "found -1E-09" },
        { Head + "[back]\nbehind = 'air'\n", 4, "back.thickness", "found nothing" },
        { Head + "[back]\nthickness = 0\n", 5, "back.thickness", "found 0; allowed above 0" },
        { Head + "[back]\nthickness = 5\ncoherent = 'yes'\n", 6, "back.coherent", "allowed true or false" },

        // Lengths of every kind.
        { "format = 1\n[cortex]\n", 2, "cortex.thickness", "found nothing" },
        { "format = 1\n[cortex]\nthickness = -1\n", 3, "cortex.thickness", "found -1; allowed 0 to" },
        { "format = 1\n[cortex]\nthickness = inf\n", 3, "cortex.thickness", "allowed 0 to" },
        { "format = 1\n[cortex]\nthickness = 1e999\n", 3, "cortex.thickness", "allowed 0 to" },
        { "format = 1\n[cortex]\nthickness = 1000000.1\n", 3, "cortex.thickness", "up to|0 to 1000000" },
        { "format = 1\n[cortex]\nthickness = true\n", 3, "cortex.thickness", "found true" },
        { "format = 1\n[cortex]\nthickness = 1979-05-27\n", 3, "cortex.thickness", "found a date" },
        { "format = 1\n[cortex]\nthickness = { mean = 5 }\n", 3, "cortex.thickness.sd", "found nothing" },
        { "format = 1\n[cortex]\nthickness = { sd = 5 }\n", 3, "cortex.thickness.mean", "found nothing" },
        { "format = 1\n[cortex]\nthickness = { mean = 5, sd = -1 }\n", 3, "cortex.thickness.sd", "found -1" },
        { "format = 1\n[cortex]\nthickness = { mean = 5, sd = 1, n = 0 }\n", 3, "cortex.thickness.n", "whole number, 1 or above" },
        { "format = 1\n[cortex]\nthickness = { mean = 5, sd = 1, n = 2.5 }\n", 3, "cortex.thickness.n", "found 2.5" },
        { "format = 1\n[cortex]\nthickness = { mean = 5, sd = 1, sd_betwen = 2 }\n", 3, "cortex.thickness.sd_betwen", "did you mean \"sd_between\"" },
        { "format = 1\n[cortex]\nthickness = { min = 5 }\n", 3, "cortex.thickness.max", "found nothing" },
        { "format = 1\n[cortex]\nthickness = { min = 5, max = 4 }\n", 3, "cortex.thickness.max", "found 4; allowed min or above, 5" },
        { "format = 1\n[cortex]\nthickness = { min = 5, max = 9, mean = 7 }\n", 3, "cortex.thickness", "found a table with min, max, mean" },
        { "format = 1\n[cortex]\nthickness = {}\n", 3, "cortex.thickness", "found an empty table" },
        { "format = 1\n[cortex]\nthickness = [100]\n", 3, "cortex.thickness", "found a list of one; allowed a list of at least two" },
        { "format = 1\n[cortex]\nthickness = []\n", 3, "cortex.thickness", "found an empty list" },
        { "format = 1\n[cortex]\nthickness = [1, [2]]\n", 3, "cortex.thickness", "found a list of one; allowed a number" },
        { "format = 1\n[cortex]\nthickness = [[1], []]\n", 3, "cortex.thickness", "found an empty list in a list" },
        { "format = 1\n[cortex]\nthickness = [\n 100,\n 'x',\n]\n", 5, "cortex.thickness", "found \"x\"" },
        { "format = 1\n[cortex]\nthickness = [\n 100,\n -3,\n]\n", 5, "cortex.thickness", "found -3" },

        // Forms.
        { Head + "[[layer]]\nspacing = 100\n", 4, "layer1.form", "found nothing; needed \"rod\", \"flattened-rod\", \"platelet\", \"film\"" },
        { Head + "[[layer]]\nform = 'rods'\n", 5, "layer1.form", "did you mean \"rod\"" },
        { Head + Rod + "diamter = 5\n", 8, "layer1.diamter", "did you mean \"diameter\"" },
        { Head + Rod + "height = 5\n", 8, "layer1.height", "is no key of a rod" },
        { Head + Rod + "wall = 5\n", 8, "layer1.wall", "is no key of a rod" },
        { Head + Rod + "x = 0.5\n", 8, "layer1.x", "[[layer.body]]" },
        { Head + Film + "spacing = 5\n", 7, "layer1.spacing", "is no key of a film" },
        { Head + Film + "stacking = 'aligned'\n", 7, "layer1.stacking", "is no key of a film" },
        { Head + Film + "shift = 0\n", 7, "layer1.shift", "is no key of a film" },
        { Head + Film + "lumen_material = 'air'\n", 7, "layer1.lumen_material", "is no key of a film" },
        { Head + "[[layer]]\nform = 'rod'\nspacing = 150\n", 4, "layer1.diameter", "found nothing" },
        { Head + "[[layer]]\nform = 'rod'\ndiameter = 0\nspacing = 150\n", 6, "layer1.diameter", "found 0; allowed above 0" },
        { Head + Rod + "lumen = 100\n", 8, "layer1.lumen", "found 100; allowed 0 to below the diameter, 100" },
        { Head + Rod + "lumen = { mean = 101, sd = 3 }\n", 8, "layer1.lumen", "found 101; allowed 0 to below the diameter, 100" },
        { Head + Flat + "lumen_height = 20\n", 4, "layer1.lumen_width", "come together" },
        { Head + Flat + "lumen_width = 20\n", 4, "layer1.lumen_height", "come together" },
        { Head + Flat + "lumen_height = 80\nlumen_width = 20\n", 9, "layer1.lumen_height", "below the height, 80" },
        { Head + Flat + "lumen_height = 20\nlumen_width = 130\n", 10, "layer1.lumen_width", "below the width, 120" },
        { Head + Flat + "lumen_height = 0\nlumen_width = 20\n", 10, "layer1.lumen_width", "both 0 or both above 0" },
        { Head + Platelet + "wall = 0\n", 9, "layer1.wall", "found 0; allowed above 0" },
        { Head + Platelet + "wall = 30\n", 9, "layer1.wall", "below half of thickness and width, 30" },
        { Head + "[[layer]]\nform = 'platelet'\nthickness = 200\nwidth = 60\nspacing = 70\nwall = 30\n", 9, "layer1.wall", "below half of thickness and width, 30" },
        { Head + Flat.Replace("spacing = 150", "spacing = 119"), 8, "layer1.spacing", "found 119; allowed the width or above, 120" },
        { Head + Platelet.Replace("spacing = 200", "spacing = 199"), 8, "layer1.spacing", "found 199; allowed the width or above, 200" },
        { Head + Platelet + "core_air = 0.5\n", 9, "layer1.core_air", "found without a wall" },
        { Head + Platelet + "wall = 5\ncore_air = 1.5\n", 10, "layer1.core_air", "found 1.5; allowed 0 to 1" },

        // Rows.
        { Head + "[[layer]]\nform = 'rod'\ndiameter = 100\n", 4, "layer1.spacing", "spacing (center to center) or separation" },
        { Head + Rod + "separation = 5\n", 8, "layer1.separation", "found beside spacing" },
        { Head + "[[layer]]\nform = 'rod'\ndiameter = 100\nspacing = 99\n", 7, "layer1.spacing", "found 99; allowed the width or above, 100" },
        { Head + "[[layer]]\nform = 'rod'\ndiameter = 100\nseparation = -1\n", 7, "layer1.separation", "found -1; allowed 0 to" },
        { Head + Rod + "rows = 0\npitch = 100\n", 8, "layer1.rows", "found 0; allowed a whole number, 1 to 1000" },
        { Head + Rod + "rows = 1001\npitch = 100\n", 8, "layer1.rows", "found 1001" },
        { Head + Rod + "rows = 2.5\npitch = 100\n", 8, "layer1.rows", "found 2.5" },
        { Head + Rod + "rows = [3, '4']\npitch = 100\n", 8, "layer1.rows", "found \"4\"" },
        { Head + Rod + "rows = []\npitch = 100\n", 8, "layer1.rows", "found an empty list" },
        { Head + Rod + "rows = 3\n", 4, "layer1.pitch", "for 3 rows" },
        { Head + Rod + "rows = [1, 2]\n", 4, "layer1.pitch", "for 2 rows" },
        { Head + Rod + "rows = 2\npitch = 100\nrow_separation = 3\n", 10, "layer1.row_separation", "found beside pitch" },
        { Head + Rod + "pitch = 'x'\n", 8, "layer1.pitch", "found \"x\"" },
        { Head + Rod + "stacking = 'stagered'\n", 8, "layer1.stacking", "did you mean \"staggered\"" },
        { Head + Rod + "shift = 1.2\n", 8, "layer1.shift", "allowed -1 to 1 of the spacing" },
        { Head + Rod + "gap = -2000000\n", 8, "layer1.gap", "allowed -1000000 to 1000000" },
        { Head + Film + "rows = 2\npitch = 59\n", 8, "layer1.pitch", "allowed the thickness or above, 60" },
        { Head + Film + Rod + "lumen = 130\n", 11, "layer2.lumen", "found 130" },

        // Cells of several bodies.
        { Head + Cell + "form2 = 1\n", 9, "layer1.body1.form2", "did you mean \"form\"" },
        { Head + Cell + "spacing = 1\n", 9, "layer1.body1.spacing", "is a key of the layer" },
        { Head + Cell + "x = 2\n", 9, "layer1.body1.x", "allowed -1 to 1 of the spacing" },
        { Head + Cell + "z = [1, 2]\n", 9, "layer1.body1.z", "found a list of 2; allowed a number" },
        { Head + Cell + "[[layer.body]]\nform = 'film'\nthickness = 5\n", 10, "layer1.body2.form", "found \"film\"" },
        { Head + Cell + "[[layer.body]]\nform = 'rod'\ndiameter = 300.5\n", 5, "layer1.spacing", "found 300; allowed the width or above, 300.5" },
        { Head + "[[layer]]\nform = 'rod'\nspacing = 300\n[[layer.body]]\nform = 'rod'\ndiameter = 100\n", 5, "layer1.form", "stands in each [[layer.body]]" },
        { Head + "[[layer]]\nmaterial = 'air'\nspacing = 300\n[[layer.body]]\nform = 'rod'\ndiameter = 100\n", 5, "layer1.material", "stands in each [[layer.body]]" },
        { Head + Cell.Replace("spacing", "separation") + "[[layer.body]]\nform = 'rod'\ndiameter = 50\nx = 0.5\n", 5, "layer1.separation", "several bodies" },
        { Head + "[[layer]]\nspacing = 300\nbody = []\n", 6, "layer1.body", "empty list" },
        { Head + "[[layer]]\nspacing = 300\n[layer.body]\nform = 'rod'\n", 6, "layer1.body", "[[layer.body]]" },
    };

    [Theory]
    [MemberData(nameof(Wrong))]
    public void What_is_wrong_is_refused_at_its_line(string text, int line, string? key, string words)
    {
        FileResult<LoadedStructure> result = StructureTexts.Read(text);
        Assert.False(result.Succeeded);
        Assert.Contains(result.Problems, problem => problem.Location.Source == "throat.toml" && problem.Location.Line == line && problem.Location.Column >= 1
            && problem.Key == key && words.Split('|').Any(part => problem.Message.Contains(part, StringComparison.Ordinal)));
        Assert.All(result.Problems, problem => Assert.Equal(problem.ToString(), problem.ToString().ReplaceLineEndings("")));
    }

    [Fact]
    public void A_problem_reads_as_file_line_column_key_found_and_allowed()
    {
        FileProblem problem = Assert.Single(StructureTexts.Read(StructureTexts.Rods.Replace("lumen    = 0", "lumen    = 130")).Problems);
        Assert.Equal("throat.toml:17:12: layer1.lumen: found 130; allowed 0 to below the diameter, 118.75", problem.ToString());
    }

    [Fact]
    public void Every_problem_is_listed_in_the_order_of_the_file()
    {
        string text = "format = 3\ncolour = 1\n[cortex]\nthickness = -4\n[[layer]]\nform = 'rod'\ndiameter = 'thick'\nspacing = 10\nrows = 0\n[back]\nthickness = 0\n";
        Assert.Equal([1, 2, 4, 7, 9, 11], StructureTexts.Read(text).Problems.Select(problem => problem.Location.Line));
    }

    [Fact]
    public void A_flood_of_problems_is_cut_short_and_counted()
    {
        string text = "format = 1\n" + string.Concat(Enumerable.Range(0, 500).Select(i => $"key{i} = 1\n")) + "[cortex]\nthickness = 5\n";
        IReadOnlyList<FileProblem> problems = StructureTexts.Read(text).Problems;
        Assert.Equal(21, problems.Count);
        Assert.Contains("480 more", problems[^1].Message);
    }

    [Theory]
    [InlineData("utf-16")]
    [InlineData("utf-16BE")]
    [InlineData("utf-32")]
    public void Other_encodings_are_refused_with_and_without_their_mark(string name)
    {
        Encoding encoding = Encoding.GetEncoding(name);
        byte[] text = encoding.GetBytes(StructureTexts.Rods);
        foreach (byte[] bytes in (byte[][])[text, [.. encoding.GetPreamble(), .. text]])
            Assert.Contains("UTF-8", Assert.Single(Parse(bytes).Problems).Message);
    }

    [Fact]
    public void A_byte_that_is_not_utf8_is_refused_at_its_place()
    {
        byte[] bytes = Encoding.Latin1.GetBytes("format = 1\nname = \"\u00E9tang\"\n[cortex]\nthickness = 5\n");
        FileProblem problem = Assert.Single(Parse(bytes).Problems);
        Assert.Equal(new SourceLocation("throat.toml", 2, 9), problem.Location);
        Assert.Contains("0xE9", problem.Message);
    }

    [Fact]
    public void A_zero_byte_is_refused_at_its_place()
    {
        FileProblem problem = Assert.Single(Parse("format = 1\n# \0\n"u8.ToArray()).Problems);
        Assert.Equal(new SourceLocation("throat.toml", 2, 3), problem.Location);
    }

    [Fact]
    public void One_megabyte_is_read_and_one_byte_more_is_refused()
    {
        string text = StructureTexts.Rods + "\n#";
        string full = text + new string('x', 1_000_000 - Encoding.UTF8.GetByteCount(text));
        Assert.True(StructureTexts.Read(full).Succeeded);
        Assert.Contains("1 MB", Assert.Single(StructureTexts.Read(full + "x").Problems).Message);
    }

    [Fact]
    public void A_file_without_end_is_read_up_to_the_limit()
    {
        Assert.SkipUnless(File.Exists("/dev/zero"), "Only Unix has a device that never ends.");
        Assert.Contains("1 MB", Assert.Single(StructureFile.Read("/dev/zero", StructureTexts.Catalog).Problems).Message);
    }

    [Theory]
    [InlineData("x = ", "[", 2, 21)]
    [InlineData("x = ", "{a=", 2, 53)]
    [InlineData("# [[[[[[[[[[[[[[[[[[[[\nx = '[[[[[[[[[[[[[[[[[[[[[['\ny = ", "[", 4, 21)]
    public void Nesting_is_refused_before_it_can_exhaust_the_stack(string start, string bracket, int line, int column)
    {
        string text = "format = 1\n" + start + string.Concat(Enumerable.Repeat(bracket, 300_000));
        Assert.Equal(new SourceLocation("throat.toml", line, column), Assert.Single(StructureTexts.Read(text).Problems).Location);
    }

    // Found by random changes: the parser throws here instead of reporting.
    [Fact]
    public void A_file_that_breaks_off_within_an_escape_is_refused()
        => Assert.Contains("not valid TOML", Assert.Single(StructureTexts.Read("format = 1\nname = \"\\u").Problems).Message);

    [Theory]
    [InlineData("{0} = 1")]
    [InlineData("[{0}]")]
    [InlineData("[[{0}]]")]
    public void Names_joined_without_end_are_refused(string pattern)
    {
        string name = string.Join('.', Enumerable.Repeat("a", 100_000));
        Assert.Contains("joined by dots", Assert.Single(StructureTexts.Read("format = 1\n" + pattern.Replace("{0}", name)).Problems).Message);
    }

    private static FileResult<LoadedStructure> Parse(byte[] bytes) => StructureFile.Parse(bytes, "throat.toml", null, StructureTexts.Catalog);
}
