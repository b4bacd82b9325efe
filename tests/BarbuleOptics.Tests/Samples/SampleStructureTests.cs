using System.Reflection;
using System.Text;
using System.Text.RegularExpressions;
using BarbuleOptics.Anatomy;
using BarbuleOptics.Files;
using BarbuleOptics.Layering;
using Xunit;

namespace BarbuleOptics.Tests.Samples;

/// <summary>The sample structures that the command carries inside.</summary>
public partial class SampleStructureTests
{
    private static readonly Assembly Command = Assembly.Load("barbule");

    public static TheoryData<string> Names => [.. Command.GetManifestResourceNames().Where(name => name.StartsWith("samples/", StringComparison.Ordinal))];

    [Fact]
    public void There_are_samples_for_every_form()
    {
        Assert.True(Names.Count >= 11);
        MelanosomeForm[] forms = [.. Names.SelectMany(row => Load(row.Data).Barbule.Layers).SelectMany(layer => layer.Bodies).Select(body => body.Form)];
        Assert.Contains(forms, form => form is MelanosomeForm.Rod { Lumen: null });
        Assert.Contains(forms, form => form is MelanosomeForm.Rod { Lumen: not null });
        Assert.Contains(forms, form => form is MelanosomeForm.FlattenedRod { LumenHeight: not null });
        Assert.Contains(forms, form => form is MelanosomeForm.Platelet { Wall: null });
        Assert.Contains(forms, form => form is MelanosomeForm.Platelet { Wall: not null, CoreAir: < 1 });
        Assert.Contains(forms, form => form is MelanosomeForm.Film);
    }

    [Theory]
    [MemberData(nameof(Names))]
    public void A_sample_opens_with_what_it_is_for(string name)
    {
        string[] lines = Text(name).Split('\n');

        Assert.StartsWith("# ", lines[0], StringComparison.Ordinal);
        Assert.Contains(lines, line => line.StartsWith("# What to look at: ", StringComparison.Ordinal));
        Assert.All(lines, line => Assert.True(line.Length <= 140, line));
    }

    [Theory]
    [MemberData(nameof(Names))]
    public void A_sample_is_read_without_a_note_and_nothing_in_it_overlaps(string name)
    {
        LoadedStructure loaded = Load(name);

        Assert.Empty(loaded.Notes);
        bool stands = SectionBuilder.TryBuild(loaded.Barbule, out Section? _, out IReadOnlyList<AnatomyProblem> problems);
        Assert.True(stands, string.Join("; ", problems));
    }

    [Theory]
    [MemberData(nameof(Names))]
    public void Every_change_that_a_sample_proposes_can_be_made(string name)
    {
        foreach (Match match in Proposal().Matches(Text(name)))
        {
            Barbule changed = Load(name, match.Groups[1].Value).Barbule;
            Assert.NotEqual(Load(name).Barbule, changed);
            Assert.True(SectionBuilder.TryBuild(changed, out _, out _));
        }
    }

    // Touching circles: rows lie diameter sqrt(3)/2 apart (elementary geometry).
    [Fact]
    public void The_hexagonal_sample_is_hexagonal()
    {
        SectionRun run = Assert.Single(SectionOf("samples/solid-rods-hexagonal.toml").Runs);

        Assert.Equal(150, run.SpacingNm, 1e-9);
        Assert.Equal(150 * Math.Sqrt(3) / 2, run.PitchNm, 1e-6);
    }

    // By hand: centers 85 nm aside and 70 nm below.
    [Fact]
    public void The_nested_sample_nests()
    {
        Section section = SectionOf("samples/nested-runs.toml");
        SectionRow last = section.Runs[0].Rows[^1], first = section.Runs[1].Rows[0];

        Assert.Equal(70, first.CenterNm - last.CenterNm, 1e-9);
        Assert.Equal(85, Math.Abs(first.ShiftNm - last.ShiftNm), 1e-9);
    }

    [Fact]
    public void The_hollow_sample_has_every_kind_of_spread()
    {
        Barbule barbule = Load("samples/hollow-rods.toml").Barbule;
        BarbuleLayer layer = Assert.Single(barbule.Layers);
        var rod = (MelanosomeForm.Rod)layer.Bodies[0].Form;

        Assert.IsType<MeasuredLength.Summary>(barbule.Cortex);
        Assert.IsType<MeasuredLength.NestedReplicates>(rod.Diameter);
        Assert.IsType<MeasuredLength.Replicates>(rod.Lumen);
        Assert.NotNull(((MeasuredLength.Summary)layer.Lateral!.Distance).SdBetweenNm);
        Assert.True(layer.Rows.Counts.Distinct().Count() > 1);
    }

    private static Section SectionOf(string name)
    {
        Assert.True(SectionBuilder.TryBuild(Load(name).Barbule, out Section? section, out _));
        return section;
    }

    private static LoadedStructure Load(string name, params string[] sets)
    {
        FileResult<LoadedStructure> result = StructureFile.Parse(Encoding.UTF8.GetBytes(Text(name)), name, null, EmbeddedMaterials.Catalog, sets);
        Assert.True(result.Succeeded, string.Join("; ", result.Problems));
        return result.Value!;
    }

    [GeneratedRegex(@"--set ([^\s`]+)")]
    private static partial Regex Proposal();

    private static string Text(string name)
    {
        using Stream stream = Command.GetManifestResourceStream(name)!;
        using var reader = new StreamReader(stream);
        return reader.ReadToEnd();
    }
}
