using BarbuleOptics.Anatomy;
using BarbuleOptics.Files;
using Xunit;
using static BarbuleOptics.Anatomy.MeasuredLength;
using static BarbuleOptics.Materials.MaterialReference;

namespace BarbuleOptics.Tests.Files;

/// <summary>Values from the command line stand in for those of the file.</summary>
public sealed class SetOptionTests
{
    [Theory]
    [InlineData("barbule.surround=water")]
    [InlineData("barbule.surround=\"water\"")]
    [InlineData(" barbule.surround = water ")]
    public void A_bare_word_is_a_text(string set)
        => Assert.Equal(new Named("water"), StructureTexts.Good(StructureTexts.Rods, set).Barbule.Surround);

    [Fact]
    public void Every_kind_of_length_can_be_set()
    {
        Assert.Equal(new Exact(90.5), Cortex("90.5"));
        Assert.Equal(new Summary(90, 4, 6, null), Cortex("{ mean = 90, sd = 4, n = 6 }"));
        Assert.Equal(new Interval(80, 100), Cortex("{min=80,max=100}"));
        Assert.Equal(new Replicates([80, 90]), Cortex("[80, 90]"));
        Assert.Equal(new NestedReplicates([[80], [90, 91]]), Cortex("[[80],[90,91]]"));
    }

    [Fact]
    public void Sections_that_the_file_lacks_are_added()
    {
        Barbule barbule = StructureTexts.Good(StructureTexts.Films, "cortex.thickness=50", "back.thickness=2000", "barbule.axis=along", "name=other films").Barbule;
        Assert.Equal(new Exact(50), barbule.Cortex);
        Assert.Equal(new Back(new Exact(2000), new Named("air"), false), barbule.Back);
        Assert.Equal((90.0, "other films"), (barbule.Axis.Degrees, barbule.Name));
    }

    [Fact]
    public void One_part_of_a_summary_can_be_set()
        => Assert.Equal(new Summary(200, 9, 14, null), StructureTexts.Good(StructureTexts.Rods, "cortex.thickness.mean=200").Barbule.Cortex);

    [Fact]
    public void Layers_and_bodies_count_from_one()
    {
        Barbule barbule = StructureTexts.Good(StructureTexts.Bodies, "layer1.body2.x=0.45", "layer2.diameter=85").Barbule;
        Assert.Equal(0.45, barbule.Layers[0].Bodies[1].SpacingShare);
        Assert.Equal(new MelanosomeForm.Rod(new Exact(85), null), barbule.Layers[1].Bodies[0].Form);
    }

    [Fact]
    public void A_spacing_replaces_a_separation_and_the_other_way_round()
    {
        Assert.Equal(new Packing(new Exact(250), false), StructureTexts.Good(StructureTexts.Mixed, "layer1.spacing=250").Barbule.Layers[0].Lateral);
        Assert.Equal(new Packing(new Exact(7), true), StructureTexts.Good(StructureTexts.Rods, "layer1.separation=7").Barbule.Layers[0].Lateral);
        Assert.Equal(new Packing(new Exact(7), true), StructureTexts.Good(StructureTexts.Rods, "layer1.row_separation=7").Barbule.Layers[0].Depth);
        Assert.Equal(new Packing(new Exact(170), false), StructureTexts.Good(StructureTexts.Mixed, "layer1.pitch=170").Barbule.Layers[0].Depth);
    }

    [Fact]
    public void A_later_option_counts_more()
        => Assert.Equal(new Packing(new Exact(200), false), StructureTexts.Good(StructureTexts.Rods, "layer1.spacing=170", "layer1.separation=3", "layer1.spacing=200").Barbule.Layers[0].Lateral);

    [Fact]
    public void A_value_that_mends_a_wrong_file_makes_it_right()
        => Assert.Equal(new Exact(100), StructureTexts.Good("format = 1\n[cortex]\nthickness = 'thick'\n", "cortex.thickness=100").Barbule.Cortex);

    [Fact]
    public void The_checksum_stays_that_of_the_file()
        => Assert.Equal(StructureTexts.Good(StructureTexts.Rods).Sha256, StructureTexts.Good(StructureTexts.Rods, "layer1.diameter=100").Sha256);

    [Fact]
    public void A_later_problem_with_a_set_value_is_placed_at_the_option()
        => Assert.Equal("--set layer1.spacing=150: layer1.spacing: overlap", StructureTexts.Good(StructureTexts.Rods, "layer1.spacing=150").Locate(new AnatomyProblem("layer1.spacing", "overlap")).ToString());

    [Theory]
    [InlineData("layer1.diameter=abc", "--set layer1.diameter=abc: layer1.diameter: found \"abc\"; allowed a number")]
    [InlineData("layer1.diameter=[1,", "--set layer1.diameter=[1,: layer1.diameter: found \"[1,\"")]
    [InlineData("layer1.diameter=", "--set layer1.diameter=: layer1.diameter: found \"\"")]
    [InlineData("layer1.diameter=-5", "--set layer1.diameter=-5: layer1.diameter: found -5; allowed above 0")]
    [InlineData("layer1.diameter=1\nlumen=2", "--set layer1.diameter=1\\u000Alumen=2: layer1.diameter: found")]
    [InlineData("layer1.lumen=130", "--set layer1.lumen=130: layer1.lumen: found 130; allowed 0 to below the diameter, 118.75")]
    [InlineData("layer1.diametr=5", "--set layer1.diametr=5: layer1.diametr: is no key of layer1; did you mean \"diameter\"")]
    [InlineData("layer2.diameter=5", "--set layer2.diameter=5: layer2.diameter: there is no layer2; did you mean \"layer1\"; there is barbule, cortex, back, preparation, preservation, layer1")]
    [InlineData("layer.diameter=5", "--set layer.diameter=5: layer.diameter: there is no layer;")]
    [InlineData("layer1.body1.x=0", "--set layer1.body1.x=0: layer1.body1.x: there is no layer1.body1")]
    [InlineData("layer1.rows.x=0", "--set layer1.rows.x=0: layer1.rows.x: layer1.rows is 4 and has no keys of its own")]
    [InlineData("cortx.thickness=5", "--set cortx.thickness=5: cortx.thickness: there is no cortx; did you mean \"cortex\"")]
    [InlineData("nam=5", "--set nam=5: nam: is no key of the file; did you mean \"name\"")]
    [InlineData("cortex=5", "--set cortex=5: cortex: allowed one value at a time, cortex.KEY=VALUE")]
    [InlineData("layer1=5", "--set layer1=5: layer1: allowed one value at a time, layer1.KEY=VALUE")]
    [InlineData("layer=[]", "--set layer=[]: layer: allowed one value at a time, layer1.KEY=VALUE")]
    [InlineData("barbule.surround", "--set barbule.surround: allowed KEY=VALUE")]
    [InlineData("=5", "--set =5: allowed KEY=VALUE")]
    [InlineData("", "--set : allowed KEY=VALUE")]
    [InlineData("a..b=5", "--set a..b=5: allowed KEY=VALUE")]
    [InlineData("format=2", "--set format=2: format: found 2; allowed 1")]
    [InlineData("barbule.surround=watr", "--set barbule.surround=watr: barbule.surround: found the unknown material \"watr\"; did you mean \"water\"")]
    public void A_wrong_option_is_refused_in_its_own_name(string set, string start)
    {
        FileResult<LoadedStructure> result = StructureTexts.Read(StructureTexts.Rods, set);
        Assert.False(result.Succeeded);
        Assert.Contains(result.Problems, problem => problem.ToString().StartsWith(start, StringComparison.Ordinal));
    }

    private static MeasuredLength? Cortex(string value) => StructureTexts.Good(StructureTexts.Rods, "cortex.thickness=" + value).Barbule.Cortex;
}
