using System.Text;
using BarbuleOptics.Anatomy;
using BarbuleOptics.Files;
using Xunit;

namespace BarbuleOptics.Tests.Files;

/// <summary>Preparation and preservation in the structure file.</summary>
public sealed class FactorTests
{
    private const string Head = "format = 1\n[cortex]\nthickness = 100\n";

    [Fact]
    public void Every_kind_of_factor_reads_back_equal()
    {
        const string text = Head + """
            [preparation]
            obliquity = 12.5
            keratin_scale = { mean = 1.08, sd = 0.02 }
            melanin_scale = { min = 1, max = 1.1 }
            [preservation]
            melanosome_shrinkage = { mean = 0.2, sd = 0 }
            cortex_shrinkage = 0
            """;
        Barbule barbule = Read(text).Value!.Barbule;
        Assert.Equal(new Preparation(new MeasuredFactor.Exact(12.5), new MeasuredFactor.Summary(1.08, 0.02), new MeasuredFactor.Interval(1, 1.1)), barbule.Preparation);
        Assert.Equal(new Preservation(new MeasuredFactor.Summary(0.2, 0), new MeasuredFactor.Exact(0)), barbule.Preservation);
        Assert.Equal(barbule, Read(StructureWriter.Write(barbule)).Value!.Barbule);
        Barbule part = barbule with { Preparation = null, Preservation = new Preservation(null, barbule.Preservation!.CortexShrinkage) };
        Assert.Equal(part, Read(StructureWriter.Write(part)).Value!.Barbule);
    }

    [Fact]
    public void Factors_can_be_set_from_the_command_line()
    {
        Barbule barbule = Read(Head, "preparation.obliquity=20", "preservation.cortex_shrinkage={ min = 0.1, max = 0.3 }").Value!.Barbule;
        Assert.Equal(new MeasuredFactor.Exact(20), barbule.Preparation!.ObliquityDegrees);
        Assert.Equal(new MeasuredFactor.Interval(0.1, 0.3), barbule.Preservation!.CortexShrinkage);
    }

    /// <summary>Text, line (counted by hand), key, words of the message.</summary>
    public static TheoryData<string, int, string, string> Wrong => new()
    {
        { "preparation = 5\n", 4, "", "" },
        { "[preparation]\nobliqity = 5\n", 5, "preparation.obliqity", "did you mean \"obliquity\"" },
        { "[preparation]\nobliquity = 90\n", 5, "preparation.obliquity", "found 90; allowed 0 to 80 degrees" },
        { "[preparation]\nobliquity = -1\n", 5, "preparation.obliquity", "allowed 0 to 80 degrees" },
        { "[preparation]\nobliquity = 'steep'\n", 5, "preparation.obliquity", "{ mean, sd } or { min, max }" },
        { "[preparation]\nkeratin_scale = 0\n", 5, "preparation.keratin_scale", "allowed 0.1 to 10" },
        { "[preparation]\nmelanin_scale = [1, 1.1]\n", 5, "preparation.melanin_scale", "a number, { mean, sd }" },
        { "[preparation]\nmelanin_scale = { mean = 1 }\n", 5, "preparation.melanin_scale.sd", "needed a number" },
        { "[preparation]\nmelanin_scale = { mean = 1, sd = 0.1, n = 5 }\n", 5, "preparation.melanin_scale.n", "allowed mean, sd" },
        { "[preparation]\nmelanin_scale = { mean = 1, max = 2 }\n", 5, "preparation.melanin_scale", "allowed a number" },
        { "[preparation]\nmelanin_scale = { min = 1.2, max = 1.1 }\n", 5, "preparation.melanin_scale.max", "allowed min or above, 1.2" },
        { "[preservation]\nmelanosome_shrinkage = 1\n", 5, "preservation.melanosome_shrinkage", "allowed -0.9 to 0.9" },
        { "[preservation]\ncortex_shrinkage = { mean = 0.1, sd = -0.1 }\n", 5, "preservation.cortex_shrinkage.sd", "allowed 0 to 0.9" },
        { "[preservation]\nspacing_shrinkage = 0.1\n", 5, "preservation.spacing_shrinkage", "allowed melanosome_shrinkage, cortex_shrinkage" },
    };

    [Theory]
    [MemberData(nameof(Wrong))]
    public void A_wrong_factor_is_refused_at_its_line(string text, int line, string key, string words)
    {
        if (key.Length == 0)
        {
            // Before the first table.
            text = "format = 1\npreparation = 5\n[cortex]\nthickness = 100\n";
            (line, key, words) = (2, "preparation", "allowed a table");
        }
        else
        {
            text = Head + text;
        }
        FileProblem problem = Assert.Single(Read(text).Problems);
        Assert.Equal((line, key), (problem.Location.Line, problem.Key));
        Assert.Contains(words, problem.Message, StringComparison.Ordinal);
    }

    private static FileResult<LoadedStructure> Read(string text, params string[] sets)
        => StructureFile.Parse(Encoding.UTF8.GetBytes(text), "structure.toml", null, EmbeddedMaterials.Catalog, sets);
}
