using System.Security.Cryptography;
using System.Text;
using BarbuleOptics.Anatomy;
using BarbuleOptics.Files;
using BarbuleOptics.Materials;
using BarbuleOptics.Quantities;
using Xunit;
using static BarbuleOptics.Anatomy.MeasuredLength;
using static BarbuleOptics.Materials.MaterialReference;

namespace BarbuleOptics.Tests.Files;

/// <summary>What a structure file says arrives as it was said. Expected values are read off the texts.</summary>
public sealed class StructureFileTests
{
    [Fact]
    public void The_structure_of_the_format_description_arrives_whole()
    {
        var rods = new BarbuleLayer(
            [new Body(new MelanosomeForm.Rod(new Replicates([118, 121, 116, 120]), new Exact(0)), new Named("eumelanin"), new Named("air"), 0, 0)],
            new Packing(new Exact(160), false), new RowCount([4]), new Packing(new Exact(150), false), Stacking.Staggered, 0, new Exact(40));
        var expected = new Barbule(
            "Sallow Fen reedling, throat barbule", new Named("air"), new Named("keratin"), new Named("keratin"), Angle.FromDegrees(0),
            new Summary(182, 9, 14, null), [rods], null);
        LoadedStructure loaded = StructureTexts.Good(StructureTexts.Rods);
        Assert.Equal(expected, loaded.Barbule);
        Assert.Empty(loaded.Notes);
    }

    [Fact]
    public void Every_form_and_kind_of_length_arrives_whole()
    {
        var flattened = new BarbuleLayer(
            [new Body(
                new MelanosomeForm.FlattenedRod(
                    new Summary(90.5, 4, 6, 2.5), new NestedReplicates([[210, 205.5], [198], [220, 221, 219]]), new Exact(40), new Exact(100)),
                new Named("eumelanin"), new Inline(1.5, 1e-4), 0, 0)],
            new Packing(new Exact(0), true), new RowCount([3, 4, 4]), new Packing(new Summary(12, 3, null, null), true), Stacking.Aligned, 0.25, new Exact(-10));
        var platelets = new BarbuleLayer(
            [new Body(new MelanosomeForm.Platelet(new Exact(60), new Exact(400), new Exact(12), 0.8), new Named("eumelanin"), new Named("air"), 0, 0)],
            new Packing(new Exact(400), false), RowCount.One, null, Stacking.Aligned, 0, new Exact(0));
        var films = new BarbuleLayer(
            [new Body(new MelanosomeForm.Film(new Exact(75)), new Named("eumelanin"), new Named("air"), 0, 0)],
            null, new RowCount([2]), new Packing(new Exact(180), false), Stacking.Aligned, 0, new Exact(0));
        var expected = new Barbule(
            "throat", new Named("water"), new Inline(1.55, 0), null, Angle.FromDegrees(37.5), new Interval(5, 250.5),
            [flattened, platelets, films], new Back(new Summary(2500, 300, 3, null), new Named("air"), true));
        Assert.Equal(expected, StructureTexts.Good(StructureTexts.Mixed).Barbule);
    }

    [Fact]
    public void Bodies_of_a_cell_arrive_with_their_places()
    {
        BarbuleLayer layer = StructureTexts.Good(StructureTexts.Bodies).Barbule.Layers[0];
        Assert.Equal(2, layer.Bodies.Count);
        Assert.Equal(
            new Body(new MelanosomeForm.Platelet(new Exact(40), new Exact(90), null, 1), new Named("keratin"), new Named("air"), 0.5, -25), layer.Bodies[1]);
    }

    [Fact]
    public void Films_alone_and_a_cortex_alone_are_structures()
    {
        Assert.All(StructureTexts.Good(StructureTexts.Films).Barbule.Layers, layer => Assert.True(layer.IsFilm));
        Barbule cortex = StructureTexts.Good(StructureTexts.Cortex).Barbule;
        Assert.Equal(new Exact(350), cortex.Cortex);
        Assert.Empty(cortex.Layers);
    }

    [Fact]
    public void Defaults_stand_where_the_file_is_silent()
    {
        Barbule barbule = StructureTexts.Good("format = 1\n[[layer]]\nform = 'rod'\ndiameter = 100\nspacing = 100\n").Barbule;
        Assert.Equal("throat", barbule.Name);
        Assert.Equal((new Named("air"), new Named("keratin"), new Named("keratin")), (barbule.Surround, barbule.Matrix, barbule.Backing));
        Assert.Null(barbule.Cortex);
        Assert.Equal(new Named("eumelanin"), barbule.Layers[0].Bodies[0].Material);
        Assert.Equal(RowCount.One, barbule.Layers[0].Rows);
    }

    [Fact]
    public void A_pitch_with_one_row_is_ignored_with_a_warning_at_its_line()
    {
        LoadedStructure loaded = StructureTexts.Good(StructureTexts.Rods.Replace("rows     = 4", "rows     = 1"));
        FileNote note = Assert.Single(loaded.Notes);
        Assert.Equal((FileNote.PitchIgnored, "layer1.pitch", 20, 12), (note.Code, note.Key, note.Location.Line, note.Location.Column));
        Assert.Null(loaded.Barbule.Layers[0].Depth);
    }

    [Fact]
    public void The_checksum_is_that_of_the_bytes()
    {
        byte[] bytes = Encoding.UTF8.GetBytes(StructureTexts.Rods);
        Assert.Equal(Convert.ToHexString(SHA256.HashData(bytes)).ToLowerInvariant(), StructureTexts.Good(StructureTexts.Rods).Sha256);
    }

    [Fact]
    public void A_byte_order_mark_changes_nothing_but_the_checksum()
    {
        LoadedStructure plain = StructureTexts.Good(StructureTexts.Rods), marked = StructureTexts.Good("\uFEFF" + StructureTexts.Rods);
        Assert.Equal(plain.Barbule, marked.Barbule);
        Assert.NotEqual(plain.Sha256, marked.Sha256);
    }

    [Fact]
    public void Windows_line_ends_change_nothing()
        => Assert.Equal(StructureTexts.Good(StructureTexts.Mixed).Barbule, StructureTexts.Good(StructureTexts.Mixed.Replace("\n", "\r\n")).Barbule);

    [Theory]
    [InlineData("layer1.spacing", 18, 12)]
    [InlineData("layer1.lumen", 17, 12)]
    [InlineData("cortex.thickness", 11, 13)]
    [InlineData("layer1.material.n", 15, 12)]
    [InlineData("layer1.shift", 13, 1)]
    [InlineData("barbule", 4, 1)]
    [InlineData("layer7.spacing", 0, 0)]
    public void A_later_problem_finds_its_line_or_that_of_what_encloses_it(string key, int line, int column)
    {
        FileProblem problem = StructureTexts.Good(StructureTexts.Rods).Locate(new AnatomyProblem(key, "found 1; allowed 2"));
        Assert.Equal(new SourceLocation("throat.toml", line, column), problem.Location);
        Assert.Equal((key, "found 1; allowed 2"), (problem.Key, problem.Message));
    }

    [Fact]
    public void A_file_that_is_not_there_is_a_problem()
    {
        FileProblem problem = Assert.Single(StructureFile.Read("no/such/file.toml", StructureTexts.Catalog).Problems);
        Assert.Equal("no/such/file.toml: there is no such file", problem.ToString());
    }

    [Theory]
    [InlineData("")]
    [InlineData(".")]
    [InlineData("a\0b")]
    public void A_path_that_is_no_file_is_a_problem(string path)
        => Assert.Single(StructureFile.Read(path, StructureTexts.Catalog).Problems);

    [Fact]
    public void The_catalog_of_a_structure_finds_inline_constants()
    {
        LoadedStructure loaded = StructureTexts.Good(StructureTexts.Mixed);
        Assert.True(loaded.Catalog.TryFind(loaded.Barbule.Matrix, out Material? material));
        Assert.Equal(1.55, material.IndexAt(500).Real);
        Assert.Equal((10.0, 100_000.0), (material.LeastNm, material.MostNm));
    }
}
