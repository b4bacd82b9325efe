using BarbuleOptics.Color;
using BarbuleOptics.Figures;
using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Figures.Layout;
using BarbuleOptics.Figures.Sections;
using BarbuleOptics.Layering;
using BarbuleOptics.Prediction;
using Xunit;

namespace BarbuleOptics.Tests.Figures;

/// <summary>Sections to scale, with everything named and nothing left out in silence.</summary>
public sealed class SectionDrawingTests
{
    public static TheoryData<string> Cases => FigureCases.All;

    [Theory]
    [MemberData(nameof(Cases))]
    public void Every_material_is_named(string name)
    {
        StructurePrediction prediction = FigureCases.Predict(name);
        string words = string.Join('|', SectionFigure.Draw(prediction, default).Page.Texts.Select(text => text.Text.Replace('\u00a0', ' ')));
        Section section = prediction.Section;

        foreach (var material in section.Materials.Select(material => material.Main).Append(section.Surround).Append(section.Backing))
            Assert.Contains(SectionLabels.NameOf(material).Replace('\u00a0', ' ').Split(',')[0], words, StringComparison.Ordinal);
    }

    [Theory]
    [MemberData(nameof(Cases))]
    public void What_is_drawn_and_what_is_left_out_make_up_the_depth(string name)
    {
        Section section = FigureCases.Predict(name).Section;
        SectionLayout layout = SectionLayout.Fit(section, 4, 4, 165, 200);
        IEnumerable<(double FromNm, double ToNm)> parts = layout.Depth.Stretches.Select(stretch => (stretch.FromNm, stretch.ToNm)).Concat(layout.Depth.Cuts).Order();

        double reachedNm = layout.Depth.Stretches[0].FromNm;
        foreach ((double fromNm, double toNm) in parts)
        {
            Assert.Equal(reachedNm, fromNm, 1e-6);
            Assert.True(toNm > fromNm);
            reachedNm = toNm;
        }
        Assert.True(reachedNm > section.DepthNm);
        // Breaks beside the 200 pt of depth, the 52 pt of surround and the 22 pt of backing.
        Assert.InRange(layout.Box.Height, 52 + 22, 52 + 22 + 200 + 3 * SectionAxis.BreakPt + 14);
    }

    [Fact]
    public void A_break_says_how_many_rows_are_missing()
    {
        StructurePrediction prediction = FigureCases.Predict("deep");
        SectionLayout layout = SectionLayout.Fit(prediction.Section, 4, 4, 165, 200);
        (double fromNm, double toNm) = Assert.Single(layout.Depth.Cuts);
        int missing = prediction.Section.Runs[0].Rows.Count(row => row.CenterNm > fromNm && row.CenterNm < toNm);

        Assert.InRange(missing, 150, 199);
        SectionLabel label = Assert.Single(SectionLabels.Of(layout, prediction.Barbule), label => label.Name == "not drawn");
        Assert.StartsWith($"{missing}\u00a0rows", label.Detail, StringComparison.Ordinal);
    }

    [Theory]
    [MemberData(nameof(Cases))]
    public void The_label_of_a_core_stands_right_under_that_of_its_body(string name)
    {
        StructurePrediction prediction = FigureCases.Predict(name);
        IReadOnlyList<SectionLabel> labels = SectionLabels.Of(SectionLayout.Fit(prediction.Section, 4, 4, 140, 200), prediction.Barbule);
        var elements = new List<PageElement>();
        LabelColumn.Draw(elements, labels, new Box(4, 4, 144, 300), 237);
        string[] drawn = [.. elements.OfType<TextRun>().OrderBy(text => text.Box.Top).Select(text => text.Text)];

        Assert.Equal(prediction.Section.Runs.SelectMany(run => run.Cell).Any(body => body.Core is not null), labels.Any(label => label.IsCore));
        for (int i = 0; i < labels.Count; i++)
        {
            if (!labels[i].IsCore)
                continue;
            Assert.Matches("^(rods|flattened rods|platelets), ", labels[i - 1].Detail);
            string[] pair = [.. Lines(labels[i - 1]), .. Lines(labels[i])];
            Assert.Contains(Enumerable.Range(0, drawn.Length - pair.Length + 1), first => drawn.Skip(first).Take(pair.Length).SequenceEqual(pair));
        }

        static string[] Lines(SectionLabel label)
            => [.. new[] { label.Name, label.Detail }.SelectMany(text => TextWrap.Lines(text, Ink.SmallPt, 237 - 144 - LabelColumn.LeaderPt))];
    }

    [Fact]
    public void Cores_go_with_the_rods_that_hold_them()
    {
        StructurePrediction prediction = FigureCases.Predict("two-sizes-along");
        string[] details = [.. SectionLabels.Of(SectionLayout.Fit(prediction.Section, 4, 4, 140, 200), prediction.Barbule).Select(label => label.Detail.Replace('\u00a0', ' '))];

        // From the sample's file.
        Assert.Equal(["rods, Ø 140 nm, 3 rows", "core, Ø 70 nm", "rods, Ø 110 nm, 3 rows", "core, Ø 50 nm"], details.Where(detail => detail.Contains('Ø', StringComparison.Ordinal)));
    }

    [Theory]
    [InlineData("[[layer]]\nform = \"film\"\nthickness = 60\nrows = 12\npitch = 165", "12 films, 60 nm")]
    [InlineData("[[layer]]\nform = \"film\"\nthickness = 60\n[[layer]]\nform = \"rod\"\ndiameter = 90\nspacing = 100\n[[layer]]\nform = \"film\"\nthickness = 60", "2 films, 60 nm")]
    [InlineData("[[layer]]\nform = \"rod\"\ndiameter = 100\nspacing = 120\nrows = 2\npitch = 130\ngap = 50\n[[layer]]\nform = \"rod\"\ndiameter = 100\nspacing = 140\nrows = 2\npitch = 130", "rods, Ø 100 nm, 4 rows")]
    public void Films_and_rows_that_are_alike_are_counted(string layers, string expected)
    {
        StructurePrediction prediction = FigureCases.Predict("[cortex]\nthickness = 100\n" + layers, 0);
        IEnumerable<string> details = SectionLabels.Of(SectionLayout.Fit(prediction.Section, 4, 4, 165, 200), prediction.Barbule).Select(label => label.Detail.Replace('\u00a0', ' '));

        Assert.Single(details, detail => detail == expected);
    }

    [Fact]
    public void Every_ray_has_its_angle_and_the_note_counts_the_rays()
    {
        StructurePrediction prediction = FigureCases.Predict("ninety-angles");
        foreach (double widthMm in new[] { 60.0, 85, 170 })
        {
            Page page = SectionFigure.Draw(prediction, FigureSize.FromWidth(widthMm)).Page;
            int rays = page.Lines.Count(line => line.Role == "incident");

            Assert.InRange(rays, 2, 5);
            Assert.Equal(rays, page.Texts.Count(text => text.Text.EndsWith('°') && !text.Text.Contains(' ', StringComparison.Ordinal) && text.Box.Bottom < 60));
            Assert.Contains($"{rays} are drawn", string.Join(' ', page.Texts.Select(text => text.Text)), StringComparison.Ordinal);
        }
    }

    // By hand: the rows end 120 + 2 * 130 + 100 = 480 nm below the surface; with 150 nm on either side of the break 780 nm are drawn.
    [Fact]
    public void A_thick_back_leaves_the_page_to_the_rows()
    {
        StructurePrediction prediction = FigureCases.Predict("thick-back");
        SectionLayout layout = SectionLayout.Fit(prediction.Section, 4, 4, 165, 200);
        (double fromNm, double toNm) = Assert.Single(layout.Depth.Cuts);

        Assert.Equal(480 + 150, fromNm, 1e-6);
        Assert.Equal(480 + 30000 - 150, toNm, 1e-6);
        Assert.Equal(200.0 / 780, layout.PtPerNm, 1e-6);
        Assert.Contains(SectionLabels.Of(layout, prediction.Barbule), label => label.Name == "not drawn" && label.Detail == "29.7\u00a0µm");
    }

    // Reflection: both rays make the angle of incidence with the normal, on either side of it.
    [Theory]
    [InlineData(10)]
    [InlineData(30)]
    [InlineData(75)]
    [InlineData(89)]
    public void Rays_make_the_angle_of_incidence(double degrees)
    {
        Page page = SectionFigure.Draw(FigureCases.Predict("[cortex]\nthickness = 100", degrees), default).Page;
        Point[] incident = Ends(page, "incident"), specular = Ends(page, "specular");

        // z grows into the barbule: light comes from the upper left and goes to the upper right.
        Assert.Equal(degrees, double.RadiansToDegrees(Math.Atan2(incident[1].X - incident[0].X, incident[1].Y - incident[0].Y)), 1e-6);
        Assert.Equal(degrees, double.RadiansToDegrees(Math.Atan2(specular[1].X - specular[0].X, specular[0].Y - specular[1].Y)), 1e-6);
    }

    [Fact]
    public void A_cell_is_one_spacing_wide_and_a_rod_as_wide_as_it_is_high()
    {
        StructurePrediction prediction = FigureCases.Predict("[cortex]\nthickness = 200\n[[layer]]\nform = \"rod\"\ndiameter = 100\nspacing = 180", 0);
        Page page = SectionFigure.Draw(prediction, default).Page;
        Box cell = Extent(page.Lines.Single(line => line.Role == "cell").Shape), bar = Extent(page.Lines.Single(line => line.Role == "scale-bar").Shape);
        double ptPerNm = bar.Width / 100;

        Assert.Contains(page.Texts, text => text.Text == "100 nm");
        Assert.Contains(page.Texts, text => text.Text == "period 180\u00a0nm");
        Assert.Equal(180, cell.Width / ptPerNm, 1e-6);
        Step[] first = [.. page.Lines.First(line => line.Role == "bodies").Shape.Steps.Take(5)];
        // An ellipse starts at its right end; the ends of its quarters are bottom, left and top.
        Assert.Equal(100, (first[0].A.X - first[2].C.X) / ptPerNm, 1e-6);
        Assert.Equal(100, (first[1].C.Y - first[3].C.Y) / ptPerNm, 1e-6);
    }

    // By hand: the second row of a staggered layer lies half a spacing aside, a second layer by its own shift; rows count from the first body.
    [Fact]
    public void Rows_lie_aside_as_stacking_and_shift_say()
    {
        Section section = FigureCases.Predict(
            "[cortex]\nthickness = 100\n[[layer]]\nform = \"rod\"\ndiameter = 80\nspacing = 200\nrows = 2\npitch = 100\nstacking = \"staggered\"\n[[layer]]\nform = \"rod\"\ndiameter = 80\nspacing = 200\nshift = 0.25", 0).Section;
        double[] First(int run, int row) => [.. BodyPlaces.Within(section, section.Runs[run], section.Runs[run].Rows[row], section.Runs[run].Cell[0], -1, 399)];

        Assert.Equal([0, 200], First(0, 0));
        Assert.Equal([100, 300], First(0, 1));
        Assert.Equal([50, 250], First(1, 0));
    }

    // A difference of 5 in L* of neighbors is seen at a glance (common practice, no source); hatches are another mark.
    [Fact]
    public void Fills_differ_in_gray()
    {
        Section section = FigureCases.Predict("many-films").Section;
        var fills = new MaterialFills(section);
        (double Lightness, Hatch Hatch)[] looks = [.. section.Materials.Select(fills.Of).Select(fill => (Lightness(fill.Color), fill.Hatch))];

        for (int i = 0; i < looks.Length; i++)
        {
            for (int j = 0; j < i; j++)
                Assert.True(Math.Abs(looks[i].Lightness - looks[j].Lightness) >= 5 || looks[i].Hatch != looks[j].Hatch, $"fills {j} and {i}");
        }
    }

    private static Point[] Ends(Page page, string role)
    {
        Shape shape = page.Lines.First(line => line.Role == role).Shape;
        return [shape.Steps[0].A, shape.Steps[^1].A];
    }

    private static Box Extent(Shape shape)
    {
        Point[] points = [.. shape.Steps.Where(step => step.Verb != Verb.Close).Select(step => step.A)];
        return new Box(points.Min(point => point.X), points.Min(point => point.Y), points.Max(point => point.X), points.Max(point => point.Y));
    }

    // ISO/CIE 11664-4 for a gray of the same luminance.
    private static double Lightness(SrgbColor color)
    {
        double y = 0.2126 * Linear(color.Red) + 0.7152 * Linear(color.Green) + 0.0722 * Linear(color.Blue);
        return 116 * Math.Cbrt(y) - 16;
    }

    private static double Linear(byte channel) => channel / 255.0 <= 0.04045 ? channel / 255.0 / 12.92 : Math.Pow((channel / 255.0 + 0.055) / 1.055, 2.4);
}
