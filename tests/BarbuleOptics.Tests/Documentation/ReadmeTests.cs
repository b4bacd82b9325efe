using System.Text;
using System.Text.RegularExpressions;
using BarbuleOptics.Color;
using BarbuleOptics.Files;
using BarbuleOptics.Layering.Mixing;
using BarbuleOptics.Prediction;
using BarbuleOptics.Tests.Cli;
using BarbuleOptics.Vision;
using Xunit;

namespace BarbuleOptics.Tests.Documentation;

/// <summary>The README says what the program does, word for word where it quotes it.</summary>
public sealed partial class ReadmeTests
{
    private static readonly string Readme = File.ReadAllText(Path.Combine(Repository.Root, "README.md")).ReplaceLineEndings("\n");

    [Fact]
    public async Task The_printed_answer_is_what_the_command_prints()
    {
        MatchCollection quoted = Printed().Matches(Readme);
        Assert.NotEmpty(quoted);
        foreach (Match block in quoted)
        {
            Outcome outcome = await Barbule.Run(block.Groups[1].Value.Split(' '), Repository.Root);
            Assert.Equal(outcome.Good().Output.ReplaceLineEndings("\n").Trim(), block.Groups[2].Value.Trim());
        }
    }

    [Fact]
    public void The_table_of_hue_terms_is_that_of_the_program()
    {
        List<string> rows = ["| term | h from | to below |", "|---|---|---|"];
        rows.AddRange(HueTerms.Sectors.Select(sector => FormattableString.Invariant($"| {sector.Term} | {sector.FromDegrees} | {sector.ToDegrees} |")));
        rows.AddRange(HueTerms.Achromatic.Select(band => FormattableString.Invariant($"| {band.Term} | C* below {HueTerms.AchromaticChroma}, {Lightness(band)} | |")));
        Assert.Equal(string.Join('\n', rows), Between("hue terms"));
    }

    [Fact]
    public void The_table_of_eyes_is_that_of_the_program()
    {
        List<string> rows = ["| eye | pigments, nm | most sensitive at, nm | media half, width, nm | cones | noise, long and double | from | obtained |", "|---|---|---|---|---|---|---|---|"];
        rows.AddRange(VisualSystems.All.Select(eye => FormattableString.Invariant(
            $"| `{eye.Name}` | {Joined(eye, cone => cone.PigmentNm)} | {Joined(eye, cone => Math.Round(cone.PeakNm(eye.Media)))} | {eye.Media.HalfNm}, {eye.Media.WidthNm} | {Joined(eye, cone => cone.Abundance)} | {eye.WeberFraction}, {eye.DoubleWeberFraction} | {eye.Source} | {eye.Obtained} |")));
        Assert.Equal(string.Join('\n', rows), Between("eyes"));

        static string Joined(VisualSystem eye, Func<Cone, double> value) => string.Join(' ', eye.SingleCones.Select(cone => FormattableString.Invariant($"{value(cone)}")));
    }

    [Fact]
    public void The_table_of_mixing_rules_is_that_of_the_program()
        => Assert.Equal(string.Join('\n', MixingRules.All.Select(rule => $"| `{rule.Name}` | {rule.Description} |")), Between("rules"));

    [Fact]
    public void The_structure_file_shown_can_be_read_and_predicted()
    {
        string text = StructureText().Match(Readme).Groups[1].Value;
        FileResult<LoadedStructure> read = StructureFile.Parse(Encoding.UTF8.GetBytes(text), "README.md", null, EmbeddedMaterials.Catalog);
        Assert.Empty(read.Problems);
        Assert.True(Predictor.TryPredict(read.Value!.Barbule, new PredictionConditions(), read.Value.Catalog, out _, out _, cancellation: TestContext.Current.CancellationToken));
    }

    [Fact]
    public void Every_warning_code_is_explained()
    {
        foreach (System.Reflection.FieldInfo code in typeof(WarningCodes).GetFields())
            Assert.Contains($"`{code.GetRawConstantValue()}`", Readme, StringComparison.Ordinal);
    }

    [Fact]
    public void Every_option_of_the_readme_is_one_of_the_program()
    {
        string folder = Path.Combine(Repository.Root, "src", "BarbuleOptics.Cli");
        string help = string.Join('\n', ((string[])["PredictCommand.cs", "BatchCommand.cs", "SensitivityCommand.cs", "ConditionOptions.cs", "InstrumentOptions.cs"]).Select(file => File.ReadAllText(Path.Combine(folder, file))));
        foreach (string option in Option().Matches(Readme).Select(match => match.Value).Distinct().Where(option => option is not ("--project" or "--help" or "--version" or "--global" or "--source")))
            Assert.Contains($"\"{option}\"", help, StringComparison.Ordinal);
    }

    private static string Lightness(LightnessBand band)
        => (double.IsFinite(band.FromLightness), double.IsFinite(band.ToLightness)) switch
        {
            (false, _) => FormattableString.Invariant($"L* below {band.ToLightness}"),
            (_, false) => FormattableString.Invariant($"L* {band.FromLightness} and above"),
            _ => FormattableString.Invariant($"L* {band.FromLightness} to below {band.ToLightness}"),
        };

    private static string Between(string name)
    {
        string start = $"<!-- {name} -->\n", end = $"\n<!-- end of {name} -->";
        int from = Readme.IndexOf(start, StringComparison.Ordinal) + start.Length, to = Readme.IndexOf(end, StringComparison.Ordinal);
        Assert.InRange(to, from, Readme.Length);
        return Readme[from..to];
    }

    [GeneratedRegex(@"<!-- printed: ([^\n]*) -->\n```text\n(.*?)```", RegexOptions.Singleline)]
    private static partial Regex Printed();

    [GeneratedRegex(@"```toml\n(.*?)```", RegexOptions.Singleline)]
    private static partial Regex StructureText();

    [GeneratedRegex(@"(?<![\w-])--[a-z]+(-[a-z]+)*")]
    private static partial Regex Option();
}
