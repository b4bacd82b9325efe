using BarbuleOptics.Anatomy;
using BarbuleOptics.Files;
using BarbuleOptics.Layering;
using Xunit;

namespace BarbuleOptics.Tests.Files;

/// <summary>What the section finds impossible is told at the line of the measurement at fault.</summary>
public sealed class OverlapLocationTests
{
    // Two aligned rows of rods, 100 across, need a pitch of 100.
    [Theory]
    [InlineData("pitch = 90", "throat.toml:8:9: layer1.pitch")]
    [InlineData("pitch = [89, 91]", "throat.toml:8:9: layer1.pitch")]
    public void Rows_that_overlap_are_refused_at_their_pitch(string pitch, string start)
        => Assert.StartsWith(start, Problem($"format = 1\ncortex.thickness = 50\n[[layer]]\nform = 'rod'\ndiameter = 100\nspacing = 150\nrows = 2\n{pitch}\n"), StringComparison.Ordinal);

    [Fact]
    public void Bodies_that_overlap_are_refused_at_the_place_of_the_second()
        => Assert.StartsWith(
            "throat.toml:10:5: layer1.body2.x",
            Problem("format = 1\n[[layer]]\nspacing = 300\n[[layer.body]]\nform = 'rod'\ndiameter = 100\n[[layer.body]]\nform = 'rod'\ndiameter = 100\nx = 0.1\n"), StringComparison.Ordinal);

    [Fact]
    public void Layers_that_overlap_are_refused_at_the_gap_between_them()
        => Assert.StartsWith(
            "throat.toml:5:7: layer1.gap",
            Problem("format = 1\n[[layer]]\nform = 'film'\nthickness = 100\ngap = -20\n[[layer]]\nform = 'film'\nthickness = 100\n"), StringComparison.Ordinal);

    [Fact]
    public void A_key_that_the_file_writes_the_other_way_is_found()
    {
        LoadedStructure loaded = StructureTexts.Good(StructureTexts.Mixed);
        Assert.Equal(18, loaded.Locate("layer1.pitch").Line);
        Assert.Equal(16, loaded.Locate("layer1.spacing").Line);
    }

    private static string Problem(string text)
    {
        LoadedStructure loaded = StructureTexts.Good(text);
        Assert.False(SectionBuilder.TryBuild(loaded.Barbule, out _, out IReadOnlyList<AnatomyProblem> problems));
        return loaded.Locate(problems[0]).ToString();
    }
}
