using System.Globalization;
using System.Text;
using BarbuleOptics.Anatomy;
using BarbuleOptics.Files;
using CsCheck;
using Xunit;

namespace BarbuleOptics.Tests.Files;

/// <summary>What is written reads back equal, in every culture.</summary>
public sealed class StructureRoundtripTests : IDisposable
{
    private readonly TemporaryFolder _folder = new();

    public StructureRoundtripTests()
        => File.WriteAllText(_folder["own.toml"], StructureTexts.TableText("own", "kind = \"constant\"\nvalue = 1.6", "kind = \"constant\"\nvalue = 0.1"));

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void Random_barbules_read_back_equal()
    {
        // Generated one by one: a sampling run keeps its seed for the first case only.
        var random = new PCG(1, 20260401);
        for (int i = 0; i < 1000; i++)
        {
            Barbule barbule = BarbuleGenerator.Barbules.Generate(random, null, out _);
            Assert.Equal(barbule, Reread(barbule));
        }
    }

    [Fact]
    public void The_samples_read_back_equal()
    {
        foreach (string text in StructureTexts.All)
        {
            Barbule barbule = StructureTexts.Good(text).Barbule;
            Assert.Equal(barbule, Reread(barbule));
        }
    }

    [Theory]
    [InlineData("de-DE")]
    [InlineData("fr-FR")]
    [InlineData("tr-TR")]
    [InlineData("ar-SA")]
    [InlineData("sv-SE")]
    public void Reading_writing_and_messages_are_the_same_in_every_culture(string name)
    {
        string wrong = StructureTexts.Rods.Replace("lumen    = 0", "lumen    = 130.5");
        string expectedText = StructureWriter.Write(StructureTexts.Good(StructureTexts.Mixed).Barbule);
        string expectedMessage = StructureTexts.Read(wrong).Problems[0].ToString();
        Barbule expected = StructureTexts.Good(StructureTexts.Mixed, "layer1.gap=-2.5").Barbule;
        CultureInfo before = CultureInfo.CurrentCulture;
        CultureInfo.CurrentCulture = WithDecimalComma(name);
        try
        {
            Assert.Equal("0,5 −1", $"{0.5} {-1}");
            Assert.Equal(expected, StructureTexts.Good(StructureTexts.Mixed, "layer1.gap=-2.5").Barbule);
            Assert.Equal(expectedText, StructureWriter.Write(StructureTexts.Good(StructureTexts.Mixed).Barbule));
            Assert.Equal(expectedMessage, StructureTexts.Read(wrong).Problems[0].ToString());
            Assert.Equal("diameter", NearMiss.Find("DIAMETER", ["diameter"]));
        }
        finally
        {
            CultureInfo.CurrentCulture = before;
        }
    }

    [Fact]
    public void A_kind_of_length_without_digits_after_the_point_stays_exact()
    {
        Barbule barbule = StructureTexts.Good("format = 1\ncortex.thickness = 0.1\n").Barbule with { Cortex = MeasuredLength.FromNanometres(0.1 + 0.2) };
        Assert.Contains("thickness = 0.30000000000000004", StructureWriter.Write(barbule));
        Assert.Equal(barbule, Reread(barbule));
    }

    private Barbule Reread(Barbule barbule)
    {
        string text = StructureWriter.Write(barbule);
        FileResult<LoadedStructure> result = StructureFile.Parse(Encoding.UTF8.GetBytes(text), "written.toml", _folder.Path, StructureTexts.Catalog);
        Assert.True(result.Succeeded, string.Join('\n', result.Problems) + "\n" + text);
        return result.Value.Barbule;
    }

    // The culture's own casing and order, and whatever the machine knows of its numbers, a decimal comma and a minus sign beyond ASCII.
    private static CultureInfo WithDecimalComma(string name)
    {
        var culture = (CultureInfo)CultureInfo.GetCultureInfo(name).Clone();
        culture.NumberFormat.NumberDecimalSeparator = ",";
        culture.NumberFormat.NumberGroupSeparator = ".";
        culture.NumberFormat.NegativeSign = "\u2212";
        return culture;
    }
}
