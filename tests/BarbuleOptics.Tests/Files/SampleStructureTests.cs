using System.Reflection;
using BarbuleOptics.Files;
using BarbuleOptics.Layering;
using Xunit;

namespace BarbuleOptics.Tests.Files;

/// <summary>The structures that the program hands out can be read, laid out, and written and read again.</summary>
public sealed class SampleStructureTests
{
    private const string Folder = "samples/";

    private static readonly Assembly Command = Assembly.Load("barbule");

    public static TheoryData<string> Samples
        => [.. Command.GetManifestResourceNames().Where(name => name.StartsWith(Folder, StringComparison.Ordinal) && name.EndsWith(".toml", StringComparison.Ordinal))];

    [Theory]
    [MemberData(nameof(Samples))]
    public void A_sample_can_be_read_laid_out_and_written(string resource)
    {
        using Stream stream = Command.GetManifestResourceStream(resource)!;
        using var bytes = new MemoryStream();
        stream.CopyTo(bytes);
        FileResult<LoadedStructure> result = StructureFile.Parse(bytes.ToArray(), resource, null, EmbeddedMaterials.Catalog);
        Assert.True(result.Succeeded, string.Join('\n', result.Problems));
        Assert.True(SectionBuilder.TryBuild(result.Value.Barbule, out _, out var problems), string.Join('\n', problems));
        Assert.Equal(result.Value.Barbule, StructureTexts.Good(StructureWriter.Write(result.Value.Barbule), EmbeddedMaterials.Catalog).Barbule);
    }
}
