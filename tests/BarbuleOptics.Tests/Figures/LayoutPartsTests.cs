using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Figures.Layout;
using BarbuleOptics.Figures.Plots;
using BarbuleOptics.Figures.Sections;
using Xunit;

namespace BarbuleOptics.Tests.Figures;

/// <summary>The small parts that layouts are made of.</summary>
public sealed class LayoutPartsTests
{
    // Advance widths of Helvetica, in thousandths of the size: zero 556, H 722, i 222, space 278 (Adobe Font Metrics of Helvetica, from
    // memory); Liberation Sans has the same widths, rounded to 1/2048.
    [Theory]
    [InlineData("0", 556)]
    [InlineData("H", 722)]
    [InlineData("i", 222)]
    [InlineData(" ", 278)]
    [InlineData("0H", 1278)]
    public void Letters_are_as_wide_as_in_Helvetica(string text, double thousandths)
        => Assert.Equal(thousandths / 1000 * 7, FigureFont.WidthPt(text, 7), 0.005);

    // By hand: steps of 1, 2 or 5 times a power of ten, and no two numbers closer than the room they take.
    [Theory]
    [InlineData(300, 780, 176, 27, 100, 20, "300", "700")]
    [InlineData(300, 780, 400, 27, 50, 10, "300", "750")]
    [InlineData(0, 100, 130, 16, 20, 5, "0", "100")]
    [InlineData(0, 0.013, 150, 16, 0.005, 0.001, "0.000", "0.010")]
    [InlineData(0, 36.8, 100, 16, 10, 2, "0", "30")]
    [InlineData(0, 0.6, 100, 16, 0.2, 0.05, "0.0", "0.6")]
    public void Ticks_are_round_numbers_with_the_decimals_of_their_step(double from, double to, double lengthPt, double numberPt, double step, double minor, string first, string last)
    {
        var axis = new PlotAxis(from, to, lengthPt, numberPt);

        Assert.Equal(minor, axis.MinorStep, minor * 1e-9);
        Assert.Equal([first, last], [axis.Text(axis.Major[0]), axis.Text(axis.Major[^1])]);
        for (int i = 1; i < axis.Major.Count; i++)
            Assert.Equal(step, axis.Major[i] - axis.Major[i - 1], step * 1e-6);
        Assert.True(step / (to - from) * lengthPt > numberPt);
        Assert.All(axis.Major.Concat(axis.Minor), value => Assert.InRange(value, from, to));
        Assert.All(axis.Minor, value => Assert.Equal(0, Math.IEEERemainder(value, minor), minor * 1e-6));
    }

    [Fact]
    public void Labels_are_spread_apart_in_order_and_no_farther_than_needed()
    {
        var random = new Random(17);
        for (int round = 0; round < 200; round++)
        {
            int count = random.Next(1, 12);
            double[] wanted = [.. Enumerable.Range(0, count).Select(_ => random.NextDouble() * 100)];
            double[] heights = [.. Enumerable.Range(0, count).Select(_ => 2 + random.NextDouble() * 6)];
            double[] middles = LabelSpread.Middles(wanted, heights, 0, 100);
            int[] order = [.. Enumerable.Range(0, count).OrderBy(i => wanted[i])];

            for (int k = 0; k < count; k++)
            {
                int i = order[k];
                Assert.InRange(middles[i], heights[i] / 2 - 1e-9, 100 - heights[i] / 2 + 1e-9);
                if (k > 0)
                    Assert.True(middles[i] - heights[i] / 2 >= middles[order[k - 1]] + heights[order[k - 1]] / 2 - 1e-9);
                bool touches = (k > 0 && Touch(order[k - 1], i)) || (k < count - 1 && Touch(i, order[k + 1]));
                bool atEnd = middles[i] - heights[i] / 2 < 1e-9 || middles[i] + heights[i] / 2 > 100 - 1e-9;
                // One that nothing pushes stays where it wants to be.
                if (!touches && !atEnd)
                    Assert.Equal(wanted[i], middles[i], 1e-9);
            }

            bool Touch(int above, int below) => middles[below] - heights[below] / 2 - middles[above] - heights[above] / 2 < 1e-9;
        }
    }

    // By hand: two labels of height 10 that both want 50 share the way.
    [Fact]
    public void Two_labels_for_one_place_share_the_way()
        => Assert.Equal([45, 55], LabelSpread.Middles([50, 50], [10, 10], 0, 100));

    [Theory]
    [InlineData(0, 0, 10, 10, true)]
    [InlineData(-5, 5, 15, 5, true)]
    [InlineData(0, 9, 9, 0, true)]
    [InlineData(-1, 0, -1, 10, false)]
    [InlineData(0, 12, 12, 0, false)]
    [InlineData(-5, 5, -1, 5, false)]
    public void A_line_meets_a_box_where_it_runs_through_it(double x1, double y1, double x2, double y2, bool meets)
        => Assert.Equal(meets, new Box(2, 2, 6, 6).Meets(new(x1, y1), new(x2, y2)));

    [Fact]
    public void Long_words_are_cut_and_short_ones_wrapped()
    {
        IReadOnlyList<string> lines = TextWrap.Lines("one two " + new string('m', 40), 7, 50);

        Assert.Equal("one two", lines[0]);
        Assert.EndsWith("…", lines[1], StringComparison.Ordinal);
        Assert.All(lines, line => Assert.True(FigureFont.WidthPt(line, 7) <= 50));
    }

    [Theory]
    [InlineData(60, 50)]
    [InlineData(50, 50)]
    [InlineData(49.9, 20)]
    [InlineData(1234, 1000)]
    [InlineData(0.3, 0.2)]
    public void A_scale_bar_is_a_round_length(double mostNm, double barNm) => Assert.Equal(barNm, ScaleBar.RoundNm(mostNm), barNm * 1e-12);

    [Theory]
    [InlineData(182.04, "182\u00a0nm")]
    [InlineData(0.5, "0.5\u00a0nm")]
    [InlineData(9999, "9999\u00a0nm")]
    [InlineData(128635.5, "128.64\u00a0µm")]
    public void Lengths_are_written_in_nm_and_long_ones_in_um(double nm, string text) => Assert.Equal(text, LengthText.Of(nm));
}
