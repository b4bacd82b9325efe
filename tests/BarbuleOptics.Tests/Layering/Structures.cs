using System.Text;
using BarbuleOptics.Files;
using BarbuleOptics.Layering;
using Xunit;

namespace BarbuleOptics.Tests.Layering;

/// <summary>Sections from the text of a structure file, with the materials that the program carries.</summary>
internal static class Structures
{
    public static LoadedStructure Load(string text, params string[] sets)
    {
        FileResult<LoadedStructure> result = StructureFile.Parse(Encoding.UTF8.GetBytes("format = 1\n" + text), "structure.toml", null, EmbeddedMaterials.Catalog, sets);
        Assert.True(result.Succeeded, string.Join('\n', result.Problems));
        return result.Value;
    }

    public static Section Section(string text)
    {
        Assert.True(SectionBuilder.TryBuild(Load(text).Barbule, out Section? section, out var problems), string.Join('\n', problems));
        return section;
    }

    /// <summary>The one problem of a structure that cannot exist.</summary>
    public static Anatomy.AnatomyProblem Problem(string text)
    {
        Assert.False(SectionBuilder.TryBuild(Load(text).Barbule, out _, out var problems));
        return Assert.Single(problems);
    }
}
