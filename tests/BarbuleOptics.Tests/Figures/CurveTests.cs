using BarbuleOptics.Color;
using BarbuleOptics.Figures.Curves;
using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Figures.Plots;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;
using Xunit;

namespace BarbuleOptics.Tests.Figures;

/// <summary>Curves that are seen on white, told apart in gray, and true to the spectrum.</summary>
public sealed class CurveTests
{
    public static TheoryData<string> Cases => FigureCases.All;

    // Contrast (L1 + 0.05)/(L2 + 0.05) of at least 4.5: Web Content Accessibility Guidelines 2.1, criterion 1.4.3 and its definitions
    // of contrast ratio and relative luminance.
    [Theory]
    [MemberData(nameof(Cases))]
    public void Curves_stand_out_on_white(string name)
        => Assert.All(FigureCases.Predict(name).Views, view => Assert.True(1.05 / (Luminance(CurveStyle.InkOf(view.Color)) + 0.05) >= 4.5));

    [Fact]
    public void Twelve_curves_differ_without_color()
        => Assert.Equal(12, Enumerable.Range(0, 12).Select(i => CurveStyle.Of(i, null)).Select(stroke => (stroke.WidthPt, string.Join(' ', stroke.Dash ?? []))).Distinct().Count());

    // By hand: 0 to 100 % over the height, start to stop over the width.
    [Fact]
    public void A_curve_passes_through_its_samples()
    {
        var grid = WavelengthGrid.FromRange(Length.FromNanometres(400), Length.FromNanometres(700), Length.FromNanometres(100));
        var frame = PlotFrame.Within(grid, 0.95, new Box(0, 0, 200, 150));
        IReadOnlyList<Point> points = Points(new Spectrum(grid, [0, 0.5, 1, 0.25]), frame);

        Assert.Equal(100, frame.TopPercent);
        Assert.Equal(4, points.Count);
        for (int i = 0; i < 4; i++)
            Assert.Equal(frame.Plot.Left + frame.Plot.Width * i / 3, points[i].X, 1e-9);
        Assert.Equal(frame.Plot.Bottom, points[0].Y, 1e-9);
        Assert.Equal(frame.Plot.Center.Y, points[1].Y, 1e-9);
        Assert.Equal(frame.Plot.Top, points[2].Y, 1e-9);
    }

    // A printer's dot at 300 dpi is 0.24 pt.
    [Fact]
    public void A_long_spectrum_keeps_every_spike_and_few_points()
    {
        var grid = WavelengthGrid.FromRange(Length.FromNanometres(300), Length.FromNanometres(1299), Length.FromNanometres(0.01));
        double[] values = new double[grid.Count];
        values[61_803] = 1;
        var frame = PlotFrame.Within(grid, 1, new Box(0, 0, 240, 150));
        IReadOnlyList<Point> points = Points(new Spectrum(grid, values), frame);

        Assert.Equal(frame.X(918.03), points.MinBy(point => point.Y).X, 0.01);
        Assert.Equal(frame.Plot.Top, points.Min(point => point.Y), 1e-9);
        Assert.InRange(points.Count, 1000, 10_000);
    }

    [Fact]
    public void Swatches_hold_the_colors_of_the_prediction()
    {
        StructurePrediction prediction = FigureCases.Predict("hollow-rods");
        SrgbColor[] filled = [.. ReflectanceFigure.Draw(prediction, default).Page.Elements.OfType<FilledShape>().Select(shape => shape.Color)];

        foreach (View view in prediction.Views)
        {
            Assert.Contains(view.Color!.Srgb, filled);
            Assert.Contains(view.Color.SrgbBrightened, filled);
        }
    }

    [Fact]
    public void What_the_other_solver_says_is_dashed_and_named_and_has_its_swatches()
    {
        foreach (string rule in (string[])["", "mean-index"])
        {
            StructurePrediction prediction = FigureCases.Compared("hollow-rods", rule, 0, 40);
            Page page = ReflectanceFigure.Draw(prediction, default, overlays: true).Page;
            PlotCurve[] curves = [.. page.Plots.Single().Marks.OfType<PlotCurve>()];
            Assert.Equal([false, true, false, true], curves.Select(curve => curve.Line.Dash is not null));
            SrgbColor[] filled = [.. page.Elements.OfType<FilledShape>().Select(shape => shape.Color)];
            foreach (View view in prediction.Views)
            {
                Assert.Contains(view.LayerModelError!.OtherColor!.Srgb, filled);
                Assert.Contains(view.LayerModelError.OtherColor.SrgbBrightened, filled);
            }
            string[] texts = [.. page.Texts.Select(text => text.Text)];
            Assert.Contains(rule.Length == 0 ? "40° layer model" : "40° rigorous", texts);
            Assert.Contains("Dashed: ", string.Join(' ', texts), StringComparison.Ordinal);
            Assert.Equal(2, ReflectanceFigure.Draw(prediction, default).Page.Plots.Single().Marks.OfType<PlotCurve>().Count());
        }
    }

    [Fact]
    public void The_note_names_the_solver()
    {
        Assert.Contains("Rigorous for this section (infinite, flat, perfectly periodic).", Note(FigureCases.Compared("hollow-rods", "", 0)), StringComparison.Ordinal);
        Assert.Contains("Layer model, mean-index mixing.", Note(FigureCases.Compared("hollow-rods", "mean-index", 0)), StringComparison.Ordinal);
        Assert.Contains("Multilayer solver.", Note(FigureCases.Predict("deep-multilayer")), StringComparison.Ordinal);

        static string Note(StructurePrediction prediction) => string.Join(' ', ReflectanceFigure.Draw(prediction, default).Page.Texts.Select(text => text.Text));
    }

    private static IReadOnlyList<Point> Points(Spectrum spectrum, PlotFrame frame)
        => [.. CurveTrace.Of(spectrum, frame).Select(i => frame.At(spectrum.Grid.Nanometres[i], spectrum[i]))];

    private static double Luminance(SrgbColor color) => 0.2126 * Linear(color.Red) + 0.7152 * Linear(color.Green) + 0.0722 * Linear(color.Blue);

    private static double Linear(byte channel) => channel / 255.0 <= 0.03928 ? channel / 255.0 / 12.92 : Math.Pow((channel / 255.0 + 0.055) / 1.055, 2.4);
}
