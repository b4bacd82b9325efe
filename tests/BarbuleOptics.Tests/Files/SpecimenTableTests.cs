using System.Text;
using BarbuleOptics.Anatomy;
using BarbuleOptics.Files;
using BarbuleOptics.Files.Specimens;
using CsCheck;
using Xunit;

namespace BarbuleOptics.Tests.Files;

/// <summary>Tables of specimens as people and spreadsheets write them, and back.</summary>
public sealed class SpecimenTableTests : IDisposable
{
    private readonly TemporaryFolder _folder = new();

    public SpecimenTableTests()
        => File.WriteAllText(_folder["own.toml"], StructureTexts.TableText("own", "kind = \"constant\"\nvalue = 1.6", "kind = \"constant\"\nvalue = 0.1"));

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void Random_barbules_go_into_a_table_and_come_back_equal()
    {
        var random = new PCG(1, 20260402);
        List<Barbule> barbules = [.. Enumerable.Range(0, 300).Select(number => BarbuleGenerator.Barbules.Generate(random, null, out _))];
        // Two specimens of one name are refused, and names differ by more than the white space around them.
        barbules = [.. barbules.Select((barbule, i) => barbule with { Name = barbule.Name + i })];
        string text = SpecimenTableWriter.Write(barbules);
        SpecimenTable table = Good(text);
        Assert.Equal(barbules.Count, table.Rows.Count);
        for (int i = 0; i < barbules.Count; i++)
        {
            Assert.True(table.Rows[i].Structure.Succeeded, string.Join('\n', table.Rows[i].Structure.Problems));
            Assert.Equal(barbules[i], table.Rows[i].Structure.Value!.Barbule);
        }
        // And from structure files to the same table again.
        Assert.Equal(text, SpecimenTableWriter.Write([.. table.Rows.Select(row => row.Structure.Value!.Barbule)]));
    }

    [Fact]
    public void The_table_of_samples_holds_sixty_specimens()
    {
        string text = File.ReadAllText(Path.Combine(Repository.Root, "src", "BarbuleOptics.Cli", "Samples", "specimens.csv"));
        MelanosomeForm[] forms = [.. Good(text).Rows.Select(row => Assert.Single(row.Structure.Value!.Barbule.Layers).Bodies[0].Form)];
        Assert.Equal((48, 6, 6), (forms.OfType<MelanosomeForm.Rod>().Count(), forms.OfType<MelanosomeForm.FlattenedRod>().Count(rod => rod.LumenHeight is not null), forms.OfType<MelanosomeForm.Platelet>().Count()));
    }

    /// <summary>One specimen, written in every way that means the same.</summary>
    [Theory]
    [InlineData("specimen,cortex_nm,cortex_sd,cortex_n\nÖd moor,182.5,9,14\n")]
    [InlineData("\uFEFFspecimen,cortex_nm,cortex_sd,cortex_n\r\nÖd moor,182.5,9,14\r\n")]
    [InlineData("specimen;cortex_nm;cortex_sd;cortex_n\nÖd moor;182,5;9;14\n")]
    [InlineData("specimen\tcortex_nm\tcortex_sd\tcortex_n\nÖd moor\t182,5\t9,0\t14")]
    [InlineData("sep=;\nspecimen;cortex_nm;cortex_sd;cortex_n\nÖd moor;182.5;9;14\n")]
    [InlineData("# measured in June\n\nSpecimen , Cortex (nm), cortex_sd [nm],cortex_n,notes_are_not_here\nÖd moor , 182.5 , 9 ,14\n,,,\n", ",notes_are_not_here")]
    [InlineData("specimen,cortex (µm),cortex_sd,cortex_n\nÖd moor,0.1825,0.009,14\n")]
    [InlineData("specimen,cortex_um,cortex_sd_nm,cortex_n\nÖd moor,0.1825,9,14\n")]
    [InlineData("name,cortex.thickness_nm,cortex_nm_sd,cortex_n\n\"Öd moor\",\"182.5\",9,14\n")]
    [InlineData("cortex_n,specimen,layer1.diameter_nm,cortex_sd,cortex_nm\n14,Öd moor,NA,9,182.5\n")]
    public void Every_way_of_writing_gives_the_same_specimen(string text, string without = "")
    {
        SpecimenRow row = Assert.Single(Good(without.Length > 0 ? text.Replace(without, "", StringComparison.Ordinal) : text).Rows);
        Assert.True(row.Structure.Succeeded, string.Join('\n', row.Structure.Problems));
        Assert.Equal("Öd moor", row.Structure.Value.Barbule.Name);
        Assert.Equal(new MeasuredLength.Summary(182.5, 9, 14, null), row.Structure.Value.Barbule.Cortex);
    }

    /// <summary>What is wrong with the table as a whole: one line with row and column.</summary>
    [Theory]
    [InlineData("", "t.csv: found no row")]
    [InlineData("\n\n,,\n", "t.csv: found no row")]
    [InlineData("specimen,cortex_nm\n", "t.csv:1:1: found no row below")]
    [InlineData("cortex_nm\n100\n", "t.csv:1:1: specimen: found no column")]
    [InlineData("specimen,cortx_nm\na,1\n", "t.csv:1:2: cortx_nm: is no column of a table of specimens; did you mean \"cortex\"")]
    [InlineData("specimen,layer1.diametre_nm\na,1\n", "t.csv:1:2: layer1.diametre_nm: is no column of a table of specimens; did you mean \"layer1.diameter\"")]
    [InlineData("specimen,layer0.diameter_nm\na,1\n", "t.csv:1:2: layer0.diameter_nm: is no column")]
    [InlineData("specimen,cortex_nm,cortex_nm\na,1,2\n", "t.csv:1:3: cortex_nm: found a second time; the first is column 2")]
    [InlineData("specimen,cortex_nm,cortex (um)\na,1,2\n", "t.csv:1:3: cortex (um): found a second time; the first is column 2")]
    [InlineData("specimen,name,cortex_nm\na,b,2\n", "t.csv:1:2: name: found a second column of names; the first is column 1")]
    [InlineData("specimen,cortex (mm)\na,1\n", "t.csv:1:2: cortex (mm): found the unit \"mm\"; allowed nm or um")]
    [InlineData("specimen,cortex_nm,layer1.form (nm)\na,1,rod\n", "t.csv:1:3: layer1.form (nm): found the unit \"nm\"; allowed none here")]
    [InlineData("specimen,cortex_nm,layer1.material_sd\na,1,2\n", "t.csv:1:3: layer1.material_sd: found _sd; layer1.material has no such part")]
    [InlineData("specimen,cortex_nm,preparation.obliquity_n\na,1,2\n", "t.csv:1:3: preparation.obliquity_n: found _n; preparation.obliquity has no such part")]
    [InlineData("specimen,cortex_nm,\na,1,2\n", "t.csv:1:3: found a column without a name whose cell in row 2")]
    [InlineData("specimen,cortex_nm\n\"a,1\n", "t.csv:2:1: found a quote that is not closed")]
    [InlineData("specimen,cortex_nm\n\"a\"b,1\n", "t.csv:2:1: found a quote that is not closed")]
    [InlineData("specimen,cortex_nm\na,1\0\n", "t.csv:2:4: found a zero byte")]
    public void A_wrong_table_is_refused_in_one_line(string text, string start)
    {
        FileResult<SpecimenTable> read = Read(text);
        Assert.StartsWith(start, Assert.Single(read.Problems).ToString(), StringComparison.Ordinal);
    }

    [Fact]
    public void Other_encodings_are_refused()
    {
        foreach (byte[] bytes in (byte[][])[Encoding.Unicode.GetPreamble().Concat(Encoding.Unicode.GetBytes("specimen,cortex_nm\na,1\n")).ToArray(), Encoding.Latin1.GetBytes("specimen,cortex_nm\nÖd,1\n")])
            Assert.Contains("UTF-8", Assert.Single(SpecimenTable.Parse(bytes, "t.csv", null, StructureTexts.Catalog).Problems).ToString(), StringComparison.Ordinal);
    }

    /// <summary>What is wrong with one cell fails its row alone, in one line with row and column.</summary>
    [Theory]
    [InlineData("specimen,cortex_nm\na,abc\n", "t.csv:2:2: cortex.thickness: found \"abc\"; allowed a number")]
    [InlineData("specimen,cortex_nm\na,-5\n", "t.csv:2:2: cortex.thickness: found -5; allowed 0")]
    [InlineData("specimen,cortex_nm\na,1e9\n", "t.csv:2:2: cortex.thickness: found")]
    [InlineData("specimen,cortex_nm\na,#DIV/0!\n", "t.csv:2:2: cortex.thickness: found \"#DIV/0!\"")]
    [InlineData("specimen,cortex_nm\na,182 nm\n", "t.csv:2:2: cortex.thickness: found \"182 nm\"")]
    [InlineData("specimen,cortex_nm\na,\"182,5\"\n", "t.csv:2:2: cortex.thickness: found \"182,5\" in a table whose cells are parted by commas")]
    [InlineData("specimen;cortex_nm;cortex_sd\na;1.182;4,5\n", "t.csv:2:2: cortex.thickness: found \"1.182\" in a table with decimal commas elsewhere")]
    [InlineData("specimen;cortex_nm\na;1.182,5\n", "t.csv:2:2: cortex.thickness: found \"1.182,5\"")]
    [InlineData("specimen,cortex_nm\na,[118; 121]\n", "t.csv:2:2: cortex.thickness: found \"[118; 121]\"; allowed lists as a structure file has them")]
    [InlineData("specimen,cortex_nm\na,[118]\n", "t.csv:2:2: cortex.thickness: found a list of one")]
    [InlineData("specimen,cortex_nm,cortex_sd\na,,9\n", "t.csv:2:3: cortex.thickness.mean: found nothing")]
    [InlineData("specimen,cortex_nm,cortex_sd\na,182,-9\n", "t.csv:2:3: cortex.thickness.sd: found -9")]
    [InlineData("specimen,cortex_nm,cortex_n\na,182,9\n", "t.csv:2:2: cortex.thickness.sd: found nothing")]
    [InlineData("specimen,cortex_nm,cortex_sd,cortex_n\na,182,9,2.5\n", "t.csv:2:4: cortex.thickness.n: found 2.5; allowed a whole number")]
    [InlineData("specimen,cortex_min,cortex_max\na,182,90\n", "t.csv:2:3: cortex.thickness.max: found 90; allowed min or above")]
    [InlineData("specimen,cortex_nm,cortex_max\na,182,90\n", "t.csv:2:2: cortex.thickness: found a table with mean, max")]
    [InlineData("specimen,cortex_nm\n,182\n", "t.csv:2:1: specimen: found nothing; needed a name")]
    [InlineData("specimen,cortex_nm\nb,1\nB,182\n", "t.csv:3:1: specimen: found \"B\" a second time; the first is row 2")]
    [InlineData("specimen,cortex_nm\na,182,7\n", "t.csv:2:3: found \"7\" beyond the last of 2 columns")]
    [InlineData("specimen,cortex_nm,layer1.form,layer1.thickness_nm\na,1,flim,20\n", "t.csv:2:3: layer1.form: found \"flim\"; did you mean \"film\"")]
    [InlineData("specimen,cortex_nm,layer1.form,layer1.thickness_nm,layer1.material\na,1,film,20,eumelanine\n", "t.csv:2:5: layer1.material: found the unknown material \"eumelanine\"")]
    [InlineData("specimen,cortex_nm,layer2.form,layer2.thickness_nm\na,1,film,20\n", "t.csv:2:3: layer2: found without a layer1")]
    [InlineData("specimen,layer1.form,layer1.diameter_nm\na,rod,100\n", "t.csv:2:2: layer1.spacing: found nothing")]
    [InlineData("specimen,layer1.form,layer1.diameter_nm,layer1.spacing_nm\na,rod,100,80\n", "t.csv:2:4: layer1.spacing: found 80; allowed the width or above, 100")]
    [InlineData("specimen,layer1.form,layer1.diameter_nm,layer1.spacing_nm,layer1.lumen_nm\na,rod,100,120,100\n", "t.csv:2:5: layer1.lumen: found 100")]
    [InlineData("specimen,layer1.form,layer1.diameter_nm,layer1.spacing_nm,layer1.rows\na,rod,100,120,0\n", "t.csv:2:5: layer1.rows: found 0")]
    [InlineData("specimen,layer1.form,layer1.diameter_nm,layer1.spacing_nm,layer1.width_nm\na,rod,100,120,50\n", "t.csv:2:5: layer1.width: is no key of a rod")]
    [InlineData("specimen,cortex_nm,axis\na,100,95\n", "t.csv:2:3: barbule.axis: found 95")]
    [InlineData("specimen,cortex_nm,surround\na,100,eumelanin\n", "t.csv:2:3: barbule.surround: found a material with k")]
    [InlineData("specimen,cortex_nm,back.thickness_nm,back.coherent\na,100,50,maybe\n", "t.csv:2:4: back.coherent: found \"maybe\"; allowed true or false")]
    [InlineData("specimen,cortex_nm,matrix\na,100,\"{ n = 0 }\"\n", "t.csv:2:3: barbule.matrix.n: found 0")]
    [InlineData("specimen,cortex_nm\na,0\n", "t.csv:2:2: cortex.thickness: found 0 and no layer", "t.csv:2:1: cortex.thickness: found 0 and no layer")]
    public void A_wrong_cell_fails_its_row_alone_in_one_line(string text, string start, string? instead = null)
    {
        SpecimenTable table = Good(text + "the last one" + (text.Contains(';', StringComparison.Ordinal) && !text.Contains(',' + "cortex", StringComparison.Ordinal) ? ";" : ",") + "\n");
        SpecimenRow wrong = table.Rows[^2];
        Assert.StartsWith(instead ?? start, Assert.Single(wrong.Structure.Problems).ToString(), StringComparison.Ordinal);
    }

    [Fact]
    public void Values_set_on_the_command_line_hold_for_every_row()
    {
        FileResult<SpecimenTable> read = SpecimenTable.Parse(Encoding.UTF8.GetBytes("specimen,cortex_nm\na,1\nb,2\n"), "t.csv", null, StructureTexts.Catalog, ["cortex.thickness=7"]);
        Assert.All(read.Value!.Rows, row => Assert.Equal(7, row.Structure.Value!.Barbule.Cortex!.CentralNm));
    }

    private SpecimenTable Good(string text)
    {
        FileResult<SpecimenTable> read = Read(text);
        Assert.True(read.Succeeded, string.Join('\n', read.Problems));
        return read.Value;
    }

    private FileResult<SpecimenTable> Read(string text) => SpecimenTable.Parse(Encoding.UTF8.GetBytes(text), "t.csv", _folder.Path, StructureTexts.Catalog);
}
