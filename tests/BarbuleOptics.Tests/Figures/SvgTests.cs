using System.Globalization;
using System.Text;
using System.Xml.Linq;
using BarbuleOptics.Color;
using BarbuleOptics.Figures;
using BarbuleOptics.Figures.Curves;
using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Figures.Plots;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;
using Xunit;

namespace BarbuleOptics.Tests.Figures;

/// <summary>Figures as SVG, read as any reader of XML does.</summary>
public sealed class SvgTests
{
    private static readonly XNamespace Svg = "http://www.w3.org/2000/svg";

    public static TheoryData<string> Cases => FigureCases.All;

    // SVG 1.1, section 7.10: with width and height in mm and a viewBox in points, a unit is a point if 72 of them are 25.4 mm.
    [Theory]
    [MemberData(nameof(Cases))]
    public void The_size_is_in_the_file_in_mm(string name)
    {
        foreach (Figure figure in FigureCases.Figures(name, FigureSize.OneColumn))
        {
            XElement root = Parse(figure);
            Assert.Equal("85mm", root.Attribute("width")!.Value);
            Assert.EndsWith("mm", root.Attribute("height")!.Value, StringComparison.Ordinal);
            double heightMm = Number(root.Attribute("height")!.Value[..^2]);
            double[] view = [.. root.Attribute("viewBox")!.Value.Split(' ').Select(Number)];
            Assert.Equal(figure.HeightMm, heightMm, 1e-3);
            Assert.Equal(85 / 25.4 * 72, view[2], 1e-3);
            Assert.Equal(heightMm / 25.4 * 72, view[3], 3e-3);
        }
    }

    [Theory]
    [MemberData(nameof(Cases))]
    public void Every_word_is_drawn_as_outlines(string name)
    {
        Figure figure = ReflectanceFigure.Draw(FigureCases.Predict(name), FigureSize.OneColumn);
        XElement[] paths = [.. Parse(figure).Descendants(Svg + "path")];

        Assert.Equal(figure.Page.Texts.Select(text => text.Text), paths.Select(path => path.Attribute("aria-label")?.Value).OfType<string>());
        Assert.All(paths.Where(path => path.Attribute("aria-label") is not null), path => Assert.StartsWith("M", path.Attribute("d")!.Value, StringComparison.Ordinal));
        Assert.DoesNotContain(Parse(figure).Descendants(), element => element.Name == Svg + "text");
    }

    // A curve with all its samples, in its color, its dashes and its place: the page's own mapping of the first and the last sample.
    [Theory]
    [MemberData(nameof(Cases))]
    public void There_is_one_line_a_curve_in_its_color_from_its_first_to_its_last_sample(string name)
    {
        StructurePrediction prediction = FigureCases.Predict(name);
        Figure figure = ReflectanceFigure.Draw(prediction, FigureSize.OneColumn);
        PlotPanel plot = Assert.Single(figure.Page.Plots);
        XElement[] curves = [.. Groups(figure, "curve")];

        Assert.Equal(prediction.Views.Count, curves.Length);
        for (int i = 0; i < curves.Length; i++)
        {
            XElement line = Assert.Single(curves[i].Elements());
            Stroke stroke = CurveStyle.Of(i, prediction.Views[i].Color);
            Spectrum reflectance = prediction.Views[i].Reflectance;
            Assert.Equal(stroke.Color, ColorOf(line.Attribute("stroke")!.Value));
            Assert.Equal(stroke.WidthPt, Number(line.Attribute("stroke-width")?.Value ?? "1"), 1e-6);
            if (reflectance.Grid.Count == 1)
                continue;
            Assert.Equal(stroke.Dash ?? [], (curves[i].Attribute("stroke-dasharray")?.Value.Split(' ') ?? []).Select(Number));
            double[] at = [.. line.Attribute("d")!.Value.Split(['M', 'L', ' '], StringSplitOptions.RemoveEmptyEntries).Select(Number)];
            double rise = plot.Area.Height / plot.Vertical.To * 100;
            Assert.Equal(plot.Area.Left, at[0], 1e-3);
            Assert.Equal(plot.Area.Bottom - rise * reflectance[0], at[1], 1e-3);
            Assert.Equal(plot.Area.Right, at[^2], 1e-3);
            Assert.Equal(plot.Area.Bottom - rise * reflectance[reflectance.Grid.Count - 1], at[^1], 1e-3);
        }
    }

    // Two lines of the frame, and a line a tick.
    [Theory]
    [MemberData(nameof(Cases))]
    public void Axes_have_their_ticks_and_peaks_their_rings(string name)
    {
        Figure figure = ReflectanceFigure.Draw(FigureCases.Predict(name), FigureSize.OneColumn);
        PlotPanel plot = Assert.Single(figure.Page.Plots);

        int ticks = plot.Horizontal.Major.Count + plot.Horizontal.Minor.Count + plot.Vertical.Major.Count + plot.Vertical.Minor.Count;
        Assert.Equal(2 + ticks, Assert.Single(Groups(figure, "axes")).Elements().Count());
        Assert.Equal(plot.Marks.OfType<PlotPeak>().Select(peak => peak.Color), Groups(figure, "peak").Select(ring => ColorOf(ring.Elements().Last().Attribute("stroke")!.Value)));
    }

    [Fact]
    public void Axes_angles_peaks_and_swatches_are_named()
    {
        StructurePrediction prediction = FigureCases.Predict("hollow-rods");
        string[] words = [.. ReflectanceFigure.Draw(prediction, FigureSize.OneColumn).Page.Texts.Select(text => text.Text)];

        Assert.Contains("Wavelength (nm)", words);
        Assert.Contains("Reflectance (%)", words);
        Assert.Contains("Color as computed", words);
        Assert.Contains("Brightened to L* 60", words);
        foreach (string angle in new[] { "0°", "30°", "60°" })
            Assert.Equal(2, words.Count(word => word == angle));
        foreach (View view in prediction.Views)
            Assert.Contains(words, word => word == view.Features.MainPeak!.WavelengthNm.ToString("0", CultureInfo.InvariantCulture) + " nm");
        Assert.Contains("D65", string.Join(' ', words), StringComparison.Ordinal);
        Assert.Contains("unpolarized", string.Join(' ', words), StringComparison.Ordinal);
    }

    // Words of a structure file may hold anything; XML 1.0 forbids most control characters.
    [Fact]
    public void Odd_names_leave_a_sound_document()
    {
        var page = new Page("a\u0001<b>&\"'\n\ud800 \u4e2d", 100, 50, [new TextRun("<x>&\u0000\"\u4e2d\ud83d\ude00", new(5, 20), 7, TextAlign.Start, Ink.Text)]);
        XElement root = Parse(new Figure(page));

        Assert.Equal("<x>& \"??", Assert.Single(root.Descendants(Svg + "path")).Attribute("aria-label")!.Value);
        Assert.Equal("a <b>&\"' \ufffd \u4e2d", root.Element(Svg + "title")!.Value);
    }

    // By hand: a quarter turn counter-clockwise puts the start of the text below its end.
    [Fact]
    public void Upward_text_runs_from_the_bottom_to_the_top()
    {
        var run = new TextRun("ll", new(50, 50), 10, TextAlign.Start, Ink.Text, Upward: true);
        Point[] points = [.. TextOutline.Of(run).Steps.Where(step => step.Verb != Verb.Close).Select(step => step.A)];

        Assert.All(points, point => Assert.True(run.Box.Grown(0.3).Holds(new Box(point.X, point.Y, point.X, point.Y)), $"{point} outside {run.Box}"));
        Assert.InRange(points.Min(point => point.Y), 45, 47);
        Assert.InRange(points.Max(point => point.X), 49.9, 50.1);
    }

    private static IEnumerable<XElement> Groups(Figure figure, string role)
        => Parse(figure).Descendants(Svg + "g").Where(group => group.Attribute("class")?.Value == role);

    private static SrgbColor ColorOf(string text)
    {
        System.Drawing.Color color = System.Drawing.ColorTranslator.FromHtml(text);
        return new SrgbColor(color.R, color.G, color.B);
    }

    private static XElement Parse(Figure figure) => XElement.Parse(Encoding.UTF8.GetString(figure.Render(FigureFormat.Svg)));

    private static double Number(string text) => double.Parse(text, CultureInfo.InvariantCulture);
}
