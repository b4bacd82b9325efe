using System.Globalization;
using BarbuleOptics.Color;
using BarbuleOptics.Figures;
using BarbuleOptics.Figures.Colors;
using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Figures.Plots;
using BarbuleOptics.Prediction;
using BarbuleOptics.Vision;
using Xunit;

namespace BarbuleOptics.Tests.Figures;

/// <summary>Dots of the color figures lie where the color does, strips hold the colors, and false colors say that they are.</summary>
public sealed class ColorFigureTests
{
    public static TheoryData<string> Cases => FigureCases.All;

    // By hand: u' from 0 to 0.65 over the width and v' from 0 to 0.62 over the height, at one scale.
    [Theory]
    [MemberData(nameof(Cases))]
    public void Dots_of_the_diagram_lie_at_their_chromaticities(string name)
    {
        StructurePrediction prediction = FigureCases.Predict(name);
        Page page = ChromaticityFigure.Draw(prediction, FigureSize.OneColumn).Page;
        PlotPanel plot = Assert.Single(page.Plots);
        Assert.Equal(plot.Area.Width / 0.65, plot.Area.Height / 0.62, 1e-9);

        Point[] expected = [.. prediction.Views.Where(view => view.Color is not null).OrderBy(view => view.Incidence.Degrees).Select(view => view.Color!.UniformChromaticity)
            .Select(place => new Point(plot.Area.Left + place.U * plot.Area.Width / 0.65, plot.Area.Bottom - place.V * plot.Area.Height / 0.62))];
        if (expected.Length > 1)
            Assert.Equal(expected, Steps(page, AngleTrack.Role).Single(), Near);
        int dots = page.Lines.Count(line => line.Role == AngleTrack.DotRole);
        Assert.InRange(dots, expected.Length <= 18 ? expected.Length : 10, Math.Min(expected.Length, 19));
        Assert.All(expected, point => Assert.True(plot.Area.Holds(new Box(point.X, point.Y, point.X, point.Y))));
    }

    // The white of D65 in u', v', 0.1978 and 0.4683 (Published/LuvTests), and the red primary of sRGB, 0.4507 and 0.5229.
    [Fact]
    public void White_and_primaries_of_the_diagram_lie_where_they_were_published()
    {
        Page page = ChromaticityFigure.Draw(FigureCases.Predict("hollow-rods"), FigureSize.OneColumn).Page;
        Box plot = page.Plots.Single().Area;
        double scale = plot.Width / 0.65;
        Point[] white = Steps(page, "white").Single();
        Assert.Equal(plot.Left + 0.1978 * scale, white.Average(point => point.X), 0.05);
        Assert.Equal(plot.Bottom - 0.4683 * scale, white.Average(point => point.Y), 0.05);
        Point red = Steps(page, "sRGB").Single()[0];
        Assert.Equal(plot.Left + 0.4507 * scale, red.X, 0.05);
        Assert.Equal(plot.Bottom - 0.5229 * scale, red.Y, 0.05);
    }

    // Two views of one solid: x is the same in both, and corners lie 1.2247449 = sqrt(3/2) apart in x.
    [Theory]
    [MemberData(nameof(Cases))]
    public void Dots_of_the_space_lie_at_their_coordinates_in_both_views(string name)
    {
        StructurePrediction prediction = FigureCases.Predict(name);
        Page page = BirdSpaceFigure.Draw(prediction, FigureSize.OneColumn).Page;
        Point[][] tracks = [.. Steps(page, AngleTrack.Role)], crosses = [.. Steps(page, "gray")], edges = [.. Steps(page, "edge")];
        int eyes = prediction.Conditions.Eyes.Count == 0 ? 2 : prediction.Conditions.Eyes.Count;
        Assert.Equal((2 * eyes, 10 * eyes), (crosses.Length, edges.Length));
        View[] views = [.. prediction.Views.OrderBy(view => view.Incidence.Degrees)];
        if (views.Length < 2 || views[0].Birds.Count == 0)
            return;
        double scale = edges.Max(edge => Math.Abs(edge[1].X - edge[0].X)) / Math.Sqrt(1.5);
        for (int view = 0; view < 2 * eyes; view++)
        {
            var center = new Point(crosses[view].Average(point => point.X), crosses[view].Average(point => point.Y));
            TetrahedralColor[] places = [.. views.Select(seen => seen.Birds[view / 2].Place)];
            Assert.Equal(places.Select(place => new Point(center.X + scale * place.X, center.Y - scale * (view % 2 == 0 ? place.Y : place.Z))), tracks[view], Near);
        }
    }

    [Fact]
    public void Strips_hold_the_colors_of_people_and_false_colors_of_birds_and_say_so()
    {
        StructurePrediction prediction = FigureCases.Predict("hollow-rods");
        Page page = SwatchFigure.Draw(prediction, FigureSize.OneColumn).Page;
        SrgbColor[] filled = [.. page.Elements.OfType<FilledShape>().Select(shape => shape.Color)];
        SrgbColor[] expected =
        [
            .. prediction.Views.Select(view => view.Color!.Srgb), .. prediction.Views.Select(view => view.Color!.SrgbBrightened),
            .. prediction.Views.Select(view => BirdFalseColor.Of(view.Birds[0])), .. prediction.Views.Select(view => BirdFalseColor.Of(view.Birds[1])),
        ];
        Assert.Equal(expected, filled);
        string[] texts = [.. page.Texts.Select(text => text.Text)];
        Assert.Contains("Birds, false color: average-ultraviolet", texts);
        Assert.Contains("Birds, false color: average-violet", texts);
        Assert.Contains("false colors", string.Join(' ', texts), StringComparison.Ordinal);
        Assert.All(prediction.Views, view => Assert.Contains(view.Incidence.Degrees.ToString("0.##", CultureInfo.InvariantCulture) + "°", texts));
    }

    // Gray is gray, one cone alone is its channel: 0.75 of the light is 225 in sRGB, by hand (1.055 x 0.75^(1/2.4) - 0.055) x 255 = 224.6.
    [Theory]
    [InlineData("#e1e1e1", 1, 1, 1, 1)]
    [InlineData("#0000e1", 1, 0, 0, 0)]
    [InlineData("#00e100", 0, 1, 0, 0)]
    [InlineData("#e10000", 0, 0, 1, 1)]
    public void False_colors_stand_for_the_cones(string hex, double shortest, double second, double medium, double fourth)
    {
        double[] catches = [shortest, second, medium, fourth, 1];
        Assert.Equal(hex, BirdFalseColor.Of(new BirdColor(VisualSystems.Violet, catches, new ReceptorNoise(VisualSystems.Violet))).Hex);
    }

    [Fact]
    public void Another_light_is_adapted_by_a_transform_that_is_named()
    {
        foreach (Figure figure in FigureCases.Figures("four-eyes", FigureSize.OneColumn).Where((_, i) => i is 0 or 2 or 4))
            Assert.Contains("adapted to D65 (Bradford transform)", Words(figure), StringComparison.Ordinal);
        Assert.All(FigureCases.Figures("hollow-rods", FigureSize.OneColumn), figure => Assert.DoesNotContain("Bradford", Words(figure), StringComparison.Ordinal));
    }

    [Fact]
    public void What_cannot_be_seen_is_said()
    {
        Assert.All(FigureCases.ColorFigures("one-wavelength", FigureSize.OneColumn), figure => Assert.Contains("leave out", Words(figure), StringComparison.Ordinal));
        Assert.Contains("300-700 nm: no color", Words(FigureCases.ColorFigures("people-only", FigureSize.OneColumn).ElementAt(1)), StringComparison.Ordinal);
        Assert.Contains("No eye was asked for", Words(FigureCases.ColorFigures("no-eyes", FigureSize.OneColumn).ElementAt(1)), StringComparison.Ordinal);
    }

    private static string Words(Figure figure) => string.Join(' ', figure.Page.Texts.Select(text => text.Text));

    private static IEnumerable<Point[]> Steps(Page page, string role)
        => page.Lines.Where(line => line.Role == role).Select(line => line.Shape.Steps.Where(step => step.Verb != Verb.Close).Select(step => step.A).ToArray());

    private static bool Near(Point one, Point other) => Math.Abs(one.X - other.X) < 1e-9 && Math.Abs(one.Y - other.Y) < 1e-9;
}
