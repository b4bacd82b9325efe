using System.Globalization;
using BarbuleOptics.Figures;
using BarbuleOptics.Prediction;
using Xunit;

namespace BarbuleOptics.Tests.Figures;

/// <summary>Same input, same bytes.</summary>
public sealed class DeterminismTests
{
    [Theory]
    [InlineData("hollow-rods")]
    [InlineData("three-spacings")]
    public void Figures_drawn_again_and_at_once_are_the_same_bytes(string name)
    {
        StructurePrediction prediction = FigureCases.Predict(name);
        var first = PredictionFigures.Render(prediction, default, cancellation: TestContext.Current.CancellationToken).ToDictionary(file => file.FileName, file => file.Bytes);

        Assert.Equal(PredictionFigures.FileNames, first.Keys);
        Parallel.For(0, 4, _ => Assert.All(PredictionFigures.Render(FigureCases.Predict(name), default, cancellation: TestContext.Current.CancellationToken), file => Assert.Equal(first[file.FileName], file.Bytes)));
    }

    [Fact]
    public void The_language_of_the_user_changes_nothing()
    {
        CultureInfo before = CultureInfo.CurrentCulture;
        StructurePrediction prediction = FigureCases.Predict("porous-platelets");
        (string, byte[])[] usual = [.. PredictionFigures.Render(prediction, default, cancellation: TestContext.Current.CancellationToken)];
        try
        {
            // Decimal commas as in much of Europe.
            var comma = (CultureInfo)CultureInfo.InvariantCulture.Clone();
            comma.NumberFormat.NumberDecimalSeparator = ",";
            comma.NumberFormat.NegativeSign = "~";
            CultureInfo.CurrentCulture = comma;
            foreach (((string name, byte[] expected), (string again, byte[] found)) in usual.Zip(PredictionFigures.Render(prediction, default, cancellation: TestContext.Current.CancellationToken)))
            {
                Assert.Equal(name, again);
                Assert.Equal(expected, found);
            }
        }
        finally
        {
            CultureInfo.CurrentCulture = before;
        }
    }

    [Theory]
    [InlineData(59.9)]
    [InlineData(200.1)]
    [InlineData(double.NaN)]
    public void Widths_that_no_page_has_are_refused(double widthMm) => Assert.Throws<ArgumentOutOfRangeException>(() => FigureSize.FromWidth(widthMm));

    [Fact]
    public void A_size_without_a_word_is_one_column() => Assert.Equal((85, 85, 170), (default(FigureSize).WidthMm, FigureSize.OneColumn.WidthMm, FigureSize.TwoColumns.WidthMm));
}
