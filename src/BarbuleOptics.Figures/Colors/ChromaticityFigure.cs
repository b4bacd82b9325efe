using BarbuleOptics.Color;
using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Figures.Layout;
using BarbuleOptics.Figures.Plots;
using BarbuleOptics.Prediction;

namespace BarbuleOptics.Figures.Colors;

/// <summary>The CIE 1976 chromaticity diagram (u', v') with the track of the color over the angle of incidence.</summary>
public sealed class ChromaticityFigure
{
    private const double MarginPt = 4;
    private const double GapPt = 6;
    private const double MostPlotPt = 260;
    private const double WidestU = 0.65;
    private const double HighestV = 0.62;
    private const double AxisGapPt = 2.5;
    private const double LeastNotePt = 110;
    private const int MostLabels = 12;

    // Wavelengths named along the locus where they do not crowd.
    private static readonly int[] NamedNm = [460, 480, 500, 520, 560, 600, 640];

    private readonly StructurePrediction _prediction;
    private readonly double _widthPt;
    private readonly List<PageElement> _elements = [];
    private readonly Box _plot;
    private readonly PlotAxis _horizontal;
    private readonly PlotAxis _vertical;

    private ChromaticityFigure(StructurePrediction prediction, FigureSize size)
    {
        (_prediction, _widthPt) = (prediction, size.WidthPt);
        double left = MarginPt + Ink.LabelPt + AxisGapPt + FigureFont.WidthPt("0.6", Ink.SmallPt) + AxisGapPt + PlotPanel.TickPt;
        // One scale for both axes: distances mean something here.
        double scale = Math.Min(MostPlotPt, _widthPt - MarginPt - left) / WidestU;
        double top = MarginPt + Ink.SmallPt / 2;
        _plot = new Box(left, top, left + scale * WidestU, top + scale * HighestV);
        _horizontal = new PlotAxis(0, WidestU, _plot.Width, 27);
        _vertical = new PlotAxis(0, HighestV, _plot.Height, 16);
    }

    /// <summary>Lays the figure out.</summary>
    public static Figure Draw(StructurePrediction prediction, FigureSize size)
    {
        ArgumentNullException.ThrowIfNull(prediction);
        return new Figure(new ChromaticityFigure(prediction, size).Compose());
    }

    private Page Compose()
    {
        CieColor[] colors = [.. _prediction.Views.Select(view => view.Color).OfType<CieColor>()];
        Point[] locus = [.. SpectralLocus.Of(_prediction.Conditions.Observer).Points.Select(point => At(UniformChromaticity.Of(point)))];
        _elements.Add(new PlotPanel(_plot, _horizontal, _vertical, []));
        WriteAxes();
        _elements.Add(new StrokedShape(Shape.Polyline(locus, closed: true), new Stroke(Ink.Axis, Ink.LinePt), "locus"));
        Point[] primaries = [At(0.64, 0.33), At(0.30, 0.60), At(0.15, 0.06)];
        _elements.Add(new StrokedShape(Shape.Polyline(primaries, closed: true), new Stroke(Ink.Outline, Ink.LinePt, [2, 1.6]), "sRGB"));
        NameWavelengths(locus);
        bool allNamed = true;
        if (colors.Length > 0)
        {
            Point white = At(UniformChromaticity.Of(colors[0].White, colors[0].White));
            var cross = new Shape();
            cross.AddLine(white with { X = white.X - 3 }, white with { X = white.X + 3 }).AddLine(white with { Y = white.Y - 3 }, white with { Y = white.Y + 3 });
            _elements.Add(new StrokedShape(cross, new Stroke(Ink.Axis, Ink.LinePt), "white"));
            allNamed = AngleTrack.Draw(
                _elements, _plot, [.. _prediction.Views.Where(view => view.Color is not null).Select(view => (view.Incidence, At(view.Color!.UniformChromaticity), view.Color.SrgbBrightened))],
                [[.. locus, locus[0]], [.. primaries, primaries[0]]], [.. _elements.OfType<TextRun>().Select(text => text.Box), Box.Around(white, 6, 6)], MostLabels);
        }
        double axesBottom = _plot.Bottom + 26, aside = _plot.Right + 2 * GapPt;
        bool hasRoomAside = _widthPt - MarginPt - aside >= LeastNotePt;
        double bottom = NoteBlock.Add(_elements, Notes(colors.Length > 0, allNamed), hasRoomAside ? aside : MarginPt, _widthPt - MarginPt, hasRoomAside ? _plot.Top : axesBottom + GapPt);
        bottom = Math.Max(bottom, axesBottom);
        return new Page($"Chromaticity of {_prediction.Barbule.Name}", _widthPt, bottom + MarginPt, _elements);
    }

    private IEnumerable<string> Notes(bool hasColor, bool allNamed)
    {
        PredictionConditions conditions = _prediction.Conditions;
        string observer = conditions.Observer == StandardObserver.Cie1931TwoDegree ? "CIE 1931 2°" : "CIE 1964 10°";
        if (!hasColor)
        {
            yield return $"The wavelengths leave out visible light: no color. Outline: single wavelengths in nm, {observer} observer; dashed: sRGB.";
            yield break;
        }
        yield return $"Color over the angle of incidence, in CIE 1976 u′, v′. Outline: single wavelengths in nm, {observer} observer; dashed: sRGB; cross: a perfect mirror under illuminant {conditions.Illuminant.Name}.";
        yield return FormattableString.Invariant($"Dots in the predicted color, brightened to L* {SrgbEncoder.BrightenedLightness} where darker{SwatchFigure.Adaptation(conditions)}.");
        if (!allNamed)
            yield return "Not every angle is written.";
    }

    private void NameWavelengths(Point[] locus)
    {
        foreach (int nm in NamedNm)
        {
            int i = nm - SpectralLocus.FirstNm;
            // The locus runs clockwise on the page: outward is to the left of its course.
            double dx = locus[i + 4].Y - locus[i - 4].Y, dy = locus[i - 4].X - locus[i + 4].X, length = Math.Sqrt(dx * dx + dy * dy);
            (dx, dy) = (dx / length, dy / length);
            // On the left the axis leaves no room outside.
            if (!TryName(nm, locus[i], dx, dy) && nm <= 520)
                TryName(nm, locus[i], -dx, -dy);
        }
    }

    private bool TryName(int nm, Point at, double dx, double dy)
    {
        string text = FormattableString.Invariant($"{nm}");
        Box box = TextRun.CenteredAt(text, at, Ink.SmallPt, TextAlign.Middle, Ink.Note).Box;
        // The box clears the tick in the direction that it lies in.
        double reach = 3.5 + Math.Abs(dx) * box.Width / 2 + Math.Abs(dy) * box.Height / 2;
        var name = TextRun.CenteredAt(text, new(at.X + dx * reach, at.Y + dy * reach), Ink.SmallPt, TextAlign.Middle, Ink.Note);
        if (!_plot.Grown(-2).Holds(name.Box) || _elements.OfType<TextRun>().Any(other => other.Box.Grown(1).Overlaps(name.Box)))
            return false;
        _elements.Add(new StrokedShape(Shape.Line(at, new(at.X + 2.5 * dx, at.Y + 2.5 * dy)), new Stroke(Ink.Axis, Ink.LinePt)));
        _elements.Add(name);
        return true;
    }

    private void WriteAxes()
    {
        foreach (double value in _vertical.Major)
            _elements.Add(TextRun.CenteredAt(_vertical.Text(value), new(_plot.Left - PlotPanel.TickPt - AxisGapPt, At(new UniformChromaticity(0, value)).Y), Ink.SmallPt, TextAlign.End, Ink.Text));
        double baseline = _plot.Bottom + PlotPanel.TickPt + AxisGapPt + FigureFont.CapHeight * Ink.SmallPt;
        foreach (double value in _horizontal.Major)
            _elements.Add(new TextRun(_horizontal.Text(value), new(At(new UniformChromaticity(value, 0)).X, baseline), Ink.SmallPt, TextAlign.Middle, Ink.Text));
        double x = _plot.Left - PlotPanel.TickPt - 2 * AxisGapPt - _vertical.Major.Max(value => FigureFont.WidthPt(_vertical.Text(value), Ink.SmallPt)) - FigureFont.Descent * Ink.LabelPt;
        _elements.Add(new TextRun("v′", new(x, _plot.Center.Y), Ink.LabelPt, TextAlign.Middle, Ink.Text, Upward: true));
        _elements.Add(new TextRun("u′", new(_plot.Center.X, baseline + AxisGapPt + Ink.LabelPt), Ink.LabelPt, TextAlign.Middle, Ink.Text));
    }

    private Point At(double x, double y) => At(UniformChromaticity.Of(new Chromaticity(x, y)));

    private Point At(UniformChromaticity place) => new(_plot.Left + place.U / WidestU * _plot.Width, _plot.Bottom - place.V / HighestV * _plot.Height);
}
