using BarbuleOptics.Figures;
using BarbuleOptics.Figures.Curves;
using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Figures.Plots;
using Xunit;

namespace BarbuleOptics.Tests.Figures;

/// <summary>What an editor sends a figure back for: cut words, words over words, type too small, lines too thin.</summary>
public sealed class FigureLayoutTests
{
    public static TheoryData<string> Cases => FigureCases.All;

    [Theory]
    [MemberData(nameof(Cases))]
    public void Words_lie_on_the_page_and_not_over_one_another(string name)
    {
        foreach (double widthMm in new[] { 60.0, 85, 170, 200 })
        {
            foreach (Figure figure in FigureCases.Figures(name, FigureSize.FromWidth(widthMm)))
            {
                TextRun[] texts = [.. figure.Page.Texts];
                Assert.All(texts, text => Assert.True(figure.Page.Box.Holds(text.Box), $"'{text.Text}' leaves the page of {widthMm} mm"));
                for (int i = 0; i < texts.Length; i++)
                {
                    TextRun? covered = texts.Skip(i + 1).FirstOrDefault(other => other.Box.Overlaps(texts[i].Box));
                    Assert.True(covered is null, $"'{texts[i].Text}' and '{covered?.Text}' overlap at {widthMm} mm");
                }
            }
        }
    }

    // Type of 7 to 8 points, lines of 0.35 to 1.5 points (common practice of journals, no source).
    [Theory]
    [MemberData(nameof(Cases))]
    public void Type_and_lines_have_the_sizes_of_print(string name)
    {
        foreach (Figure figure in FigureCases.Figures(name, FigureSize.OneColumn))
        {
            Assert.All(figure.Page.Texts, text => Assert.InRange(text.SizePt, 7, 8));
            Assert.All(figure.Page.Lines, line => Assert.InRange(line.Stroke.WidthPt, 0.35, 1.6));
            Assert.All(figure.Page.Plots.SelectMany(plot => plot.Marks).Select(mark => mark.Stroke).OfType<Stroke>(), stroke => Assert.InRange(stroke.WidthPt, 0.35, 1.6));
            Assert.InRange(figure.HeightMm, 40, 230);
        }
    }

    [Theory]
    [MemberData(nameof(Cases))]
    public void Lines_stay_within_the_page(string name)
    {
        foreach (Figure figure in FigureCases.Figures(name, FigureSize.OneColumn))
        {
            IEnumerable<Point> points = figure.Page.Lines.Where(line => line.Role is "incident" or "specular" or "leader" or "scale-bar")
                .SelectMany(line => line.Shape.Steps).Where(step => step.Verb is Verb.Move or Verb.Line).Select(step => step.A);
            Assert.All(points, point => Assert.True(figure.Page.Box.Holds(new Box(point.X, point.Y, point.X, point.Y)), $"{point} leaves the page"));
        }
    }

    [Theory]
    [MemberData(nameof(Cases))]
    public void Curves_stay_within_their_axes_and_these_within_the_page(string name)
    {
        Figure figure = ReflectanceFigure.Draw(FigureCases.Predict(name), FigureSize.OneColumn);
        PlotPanel plot = Assert.Single(figure.Page.Plots);

        Assert.True(figure.Page.Box.Holds(plot.Area.Grown(PlotPanel.TickPt)));
        Assert.All(plot.Marks.OfType<PlotCurve>().SelectMany(curve => curve.Points), point =>
        {
            Assert.InRange(point.X, plot.Horizontal.From, plot.Horizontal.To);
            Assert.InRange(point.Y, plot.Vertical.From, plot.Vertical.To * (1 + 1e-12));
        });
    }
}
