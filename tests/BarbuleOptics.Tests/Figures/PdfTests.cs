using System.Globalization;
using System.Text;
using System.Text.RegularExpressions;
using BarbuleOptics.Figures;
using BarbuleOptics.Figures.Drawing;
using Xunit;

namespace BarbuleOptics.Tests.Figures;

/// <summary>Figures as PDF (ISO 32000-1), by what stands in the file unpacked.</summary>
public sealed partial class PdfTests
{
    public static TheoryData<string> Cases => FigureCases.All;

    // A unit of user space is 1/72 inch (ISO 32000-1, 8.3.2.3).
    [Theory]
    [MemberData(nameof(Cases))]
    public void The_page_has_the_printed_size(string name)
    {
        foreach (Figure figure in FigureCases.Figures(name, FigureSize.OneColumn))
        {
            string text = Encoding.Latin1.GetString(figure.Render(FigureFormat.Pdf));
            double[] box = [.. MediaBox().Match(text).Groups[1].Value.Split(' ').Select(value => double.Parse(value, CultureInfo.InvariantCulture))];

            Assert.StartsWith("%PDF-1.", text, StringComparison.Ordinal);
            Assert.EndsWith("%%EOF", text.TrimEnd(), StringComparison.Ordinal);
            Assert.Equal([0, 0], box[..2]);
            Assert.Equal(85 / 25.4 * 72, box[2], 1e-2);
            Assert.Equal(figure.HeightMm / 25.4 * 72, box[3], 1e-2);
        }
    }

    [Fact]
    public void The_font_is_inside_and_the_date_is_fixed()
    {
        string text = Encoding.Latin1.GetString(FigureCases.Figures("hollow-rods", default).First().Render(FigureFormat.Pdf));

        Assert.Contains("LiberationSans", text, StringComparison.Ordinal);
        Assert.Contains("/FontFile2", text, StringComparison.Ordinal);
        Assert.All(Date().Matches(text).Select(match => match.Groups[1].Value), date => Assert.Equal("20000101", date));
    }

    // A text string in UTF-16BE begins with FE FF (ISO 32000-1, 7.9.2.2); U+4E2D U+6587 are 4E 2D 65 87.
    [Fact]
    public void A_title_keeps_characters_that_the_font_lacks()
    {
        string text = Encoding.Latin1.GetString(new Figure(new Page("\u4e2d\u6587", 100, 50, [])).Render(FigureFormat.Pdf));

        Assert.Contains("/Title <FEFF4E2D6587>", text, StringComparison.OrdinalIgnoreCase);
    }

    [GeneratedRegex(@"/MediaBox \[([^\]]*)\]")]
    private static partial Regex MediaBox();

    [GeneratedRegex(@"D:(\d{8})")]
    private static partial Regex Date();
}
