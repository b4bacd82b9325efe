using BarbuleOptics.Color;
using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Figures.Layout;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;
using BarbuleOptics.Vision;

namespace BarbuleOptics.Figures.Colors;

/// <summary>The tetrahedral color space of birds in two views, as a technical drawing has them, with the track of the color over the angle of incidence.</summary>
public sealed class BirdSpaceFigure
{
    private const double MarginPt = 4;
    private const double GapPt = 6;
    private const double TitlePt = Ink.LabelPt + 4;

    // Room for the names of corners above, beside and under a view.
    private const double NamePt = Ink.SmallPt + 3;
    private const double AsidePt = 9;
    private const double MostPanelPt = 118;
    private const int MostLabels = 6;

    private readonly StructurePrediction _prediction;
    private readonly IReadOnlyList<VisualSystem> _eyes;
    private readonly List<PageElement> _elements = [];
    private readonly double _widthPt;
    private bool _allNamed = true;

    private BirdSpaceFigure(StructurePrediction prediction, FigureSize size)
    {
        (_prediction, _widthPt) = (prediction, size.WidthPt);
        _eyes = SwatchFigure.Eyes(prediction.Conditions);
    }

    private bool HasColor => _prediction.Views.Any(view => view.Birds.Count > 0);

    /// <summary>Lays the figure out.</summary>
    public static Figure Draw(StructurePrediction prediction, FigureSize size)
    {
        ArgumentNullException.ThrowIfNull(prediction);
        return new Figure(new BirdSpaceFigure(prediction, size).Compose());
    }

    private Page Compose()
    {
        // Two eyes stand side by side where the page is wide enough.
        int across = _widthPt >= 4 * 90 && _eyes.Count > 1 ? 2 : 1;
        double block = (_widthPt - 2 * MarginPt - (across - 1) * 2 * GapPt) / across;
        double panel = Math.Min(MostPanelPt, (block - GapPt) / 2);
        double bottom = MarginPt;
        for (int i = 0; i < _eyes.Count; i++)
        {
            double left = MarginPt + i % across * (block + 2 * GapPt), top = i % across == 0 ? bottom : bottom - BlockHeight(panel) - GapPt;
            DrawEye(_eyes[i], left, top, panel, block);
            bottom = i % across == 0 ? top + BlockHeight(panel) + GapPt : bottom;
        }
        bottom = NoteBlock.Add(_elements, Notes(), MarginPt, _widthPt - MarginPt, bottom);
        return new Page($"Color of {_prediction.Barbule.Name} to birds", _widthPt, bottom + MarginPt, _elements);
    }

    private static double BlockHeight(double panel) => TitlePt + 2 * NamePt + Scale(panel) * SpaceView.Height;

    private static double Scale(double panel) => (panel - 2 * AsidePt) / SpaceView.Width;

    private void DrawEye(VisualSystem eye, double left, double top, double panel, double block)
    {
        string title = TextWrap.Lines(eye.Name, Ink.LabelPt, block)[0];
        _elements.Add(TextRun.CenteredAt(title, new(left, top + Ink.LabelPt / 2), Ink.LabelPt, TextAlign.Start, Ink.Text));
        double height = 2 * NamePt + Scale(panel) * SpaceView.Height;
        var plan = new Box(left, top + TitlePt, left + panel, top + TitlePt + height);
        DrawView(SpaceView.FromAbove(eye), eye, plan, Scale(panel));
        DrawView(SpaceView.FromFront(eye), eye, plan.Moved(panel + GapPt, 0), Scale(panel));
    }

    private void DrawView(SpaceView view, VisualSystem eye, Box room, double scale)
    {
        var center = new Point(room.Center.X, room.Top + NamePt + scale * view.Above);
        foreach ((TetrahedralColor from, TetrahedralColor to, bool hidden) in view.Edges)
            _elements.Add(new StrokedShape(Shape.Line(At(from), At(to)), new Stroke(hidden ? Ink.Outline : Ink.Axis, Ink.LinePt, hidden ? [2, 1.6] : null), "edge"));
        var taken = new List<Box>();
        foreach ((string name, TetrahedralColor corner, bool under) in view.Names)
        {
            Point at = At(corner);
            double middle = under ? at.Y + NamePt / 2 + 1 : at.Y - NamePt / 2 - 1;
            // Names at the sides stay within the view's own room.
            double half = FigureFont.WidthPt(name, Ink.SmallPt) / 2;
            var text = TextRun.CenteredAt(name, new(Math.Clamp(at.X, room.Left + half, room.Right - half), middle), Ink.SmallPt, TextAlign.Middle, Ink.Note);
            _elements.Add(text);
            taken.Add(text.Box);
        }
        var cross = new Shape();
        cross.AddLine(center with { X = center.X - 2.5 }, center with { X = center.X + 2.5 }).AddLine(center with { Y = center.Y - 2.5 }, center with { Y = center.Y + 2.5 });
        _elements.Add(new StrokedShape(cross, new Stroke(Ink.Axis, Ink.LinePt), "gray"));
        taken.Add(Box.Around(center, 5, 5));
        (Angle Angle, Point At, SrgbColor Fill)[] stops = [.. from seen in _prediction.Views
                                                             from bird in seen.Birds
                                                             where bird.System == eye
                                                             select (seen.Incidence, At(bird.Place), BirdFalseColor.Of(bird))];
        IEnumerable<IReadOnlyList<Point>> lines = view.Edges.Select(edge => (IReadOnlyList<Point>)[At(edge.From), At(edge.To)]);
        _allNamed &= AngleTrack.Draw(_elements, room with { Bottom = room.Bottom - NamePt }, stops, lines, taken, MostLabels);

        Point At(TetrahedralColor place) => new(center.X + scale * place.X, center.Y - scale * view.Up(place));
    }

    private IEnumerable<string> Notes()
    {
        PredictionConditions conditions = _prediction.Conditions;
        if (conditions.Eyes.Count == 0)
            yield return "No eye was asked for.";
        yield return "Tetrahedral color space of each eye, left seen from the corner of the shortest cone, right from the front; corners: one kind of cone excited alone; cross: gray.";
        if (HasColor)
            yield return $"Dots over the angle of incidence in false colors: blue the shortest cone, green the short, red the medium and long. Light {conditions.Illuminant.Name}, background {conditions.Background?.Name ?? "flat"}; the ultraviolet of real daylight varies most.";
        else if (conditions.Eyes.Count > 0)
            yield return "The wavelengths leave out what birds see, 300-700 nm: no color to them.";
        if (!_allNamed)
            yield return "Not every angle is written.";
        if (conditions.Eyes.Count > _eyes.Count)
            yield return FormattableString.Invariant($"{_eyes.Count} of {conditions.Eyes.Count} eyes are shown.");
    }
}
