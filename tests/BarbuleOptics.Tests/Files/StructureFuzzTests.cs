using System.Diagnostics;
using System.Globalization;
using System.Text;
using BarbuleOptics.Files;
using Tomlyn.Parsing;
using Xunit;

namespace BarbuleOptics.Tests.Files;

/// <summary>Whatever bytes a file holds: a structure or problems with places, nothing thrown, no hang.</summary>
public sealed class StructureFuzzTests
{
    private const int Mutations = 20_000;

    [Fact]
    public void Mutated_files_give_a_structure_or_problems()
    {
        var mutator = new StructureMutator(seed: 20260401);
        int accepted = 0;
        double slowestMs = 0;
        for (int i = 0; i < Mutations; i++)
        {
            byte[] bytes = mutator.Mutate(StructureTexts.All[i % StructureTexts.All.Length]);
            long start = Stopwatch.GetTimestamp();
            FileResult<LoadedStructure> result = StructureFile.Parse(bytes, "throat.toml", null, StructureTexts.Catalog);
            slowestMs = Math.Max(slowestMs, Stopwatch.GetElapsedTime(start).TotalMilliseconds);
            accepted += result.Succeeded ? 1 : 0;
            Assert.Equal(result.Succeeded, result.Problems.Count == 0);
            Assert.All(result.Problems, problem => Assert.DoesNotContain('\n', problem.ToString()));
            if (result.Succeeded)
                AssertSound(result.Value, bytes);
        }
        // The mutations must neither break all files nor leave all whole, or the test would show nothing.
        Assert.InRange(accepted, Mutations / 20, Mutations / 2);
        Assert.InRange(slowestMs, 0, 5000);
    }

    // Measured: at most 2 s each on a busy machine of two cores; the bound is there to catch work that grows with the square of the size.
    [Theory]
    [InlineData("[[layer]]\n")]
    [InlineData("[[layer]]\nform='film'\nthickness=5\n")]
    [InlineData("[[layer.body]]\n")]
    [InlineData("key# = 1\n")]
    [InlineData("[t#.u]\n")]
    [InlineData("= \n")]
    [InlineData("a.b.c.d.e.f.# = [[[{}]]]\n")]
    [InlineData("'")]
    [InlineData("{")]
    [InlineData("\"\"\"")]
    public void A_megabyte_of_one_thing_is_dealt_with_in_time(string piece)
    {
        var text = new StringBuilder("format = 1\n");
        for (int i = 0; text.Length < 990_000; i++)
            text.Append(piece.Replace("#", i.ToString(CultureInfo.InvariantCulture)));
        byte[] bytes = Encoding.UTF8.GetBytes(text.ToString());
        long start = Stopwatch.GetTimestamp();
        FileResult<LoadedStructure> result = StructureFile.Parse(bytes, "throat.toml", null, StructureTexts.Catalog);
        Assert.InRange(Stopwatch.GetElapsedTime(start).TotalSeconds, 0, 10);
        Assert.InRange(result.Problems.Count, 0, 21);
    }

    [Fact]
    public void Mutated_options_give_a_structure_or_problems()
    {
        var mutator = new StructureMutator(seed: 7);
        string[] options = ["layer1.diameter=100", "barbule.surround=water", "cortex.thickness={ mean = 5, sd = 1 }", "layer1.body2.x=0.5", "layer2.rows=[1, 2]"];
        for (int i = 0; i < 2000; i++)
        {
            string option = Encoding.UTF8.GetString(mutator.Mutate(options[i % options.Length]));
            FileResult<LoadedStructure> result = StructureTexts.Read(StructureTexts.All[i % StructureTexts.All.Length], option);
            Assert.Equal(result.Succeeded, result.Problems.Count == 0);
            Assert.All(result.Problems, problem => Assert.DoesNotContain('\n', problem.ToString()));
        }
    }

    // An accepted file is valid TOML to the parser's own check of keys written twice, and survives being written and read.
    private static void AssertSound(LoadedStructure loaded, byte[] bytes)
    {
        Assert.False(SyntaxParser.Parse(Encoding.UTF8.GetString(bytes).TrimStart('\uFEFF'), "throat.toml", validate: true).HasErrors);
        Assert.Equal(loaded.Barbule, StructureTexts.Good(StructureWriter.Write(loaded.Barbule)).Barbule);
    }
}
