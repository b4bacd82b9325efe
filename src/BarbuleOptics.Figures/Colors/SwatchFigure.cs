using BarbuleOptics.Color;
using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Figures.Layout;
using BarbuleOptics.Prediction;
using BarbuleOptics.Spectra.Instruments;
using BarbuleOptics.Vision;

namespace BarbuleOptics.Figures.Colors;

/// <summary>The color over the angle of incidence as strips: to people, as computed and brightened, and to birds, in false colors.</summary>
public sealed class SwatchFigure
{
    /// <summary>Most eyes that are shown; the note says when there are more.</summary>
    internal const int MostEyes = 6;

    private const double MarginPt = 4;
    private const double StripPt = 15;
    private const double GapPt = 4;
    private const double TextGapPt = 2;

    private readonly StructurePrediction _prediction;
    private readonly IReadOnlyList<View> _views;
    private readonly List<PageElement> _elements = [];
    private readonly Box _strip;
    private readonly double _widthPt;
    private readonly double _column;
    private double _top = MarginPt;

    private SwatchFigure(StructurePrediction prediction, FigureSize size)
    {
        (_prediction, _views, _widthPt) = (prediction, prediction.Views, size.WidthPt);
        _strip = new Box(MarginPt, 0, _widthPt - MarginPt, StripPt);
        _column = _strip.Width / _views.Count;
    }

    /// <summary>Lays the figure out.</summary>
    /// <remarks>Human swatches are those of sRGB, adapted to its white by the Bradford transform, whatever the illuminant.</remarks>
    public static Figure Draw(StructurePrediction prediction, FigureSize size)
    {
        ArgumentNullException.ThrowIfNull(prediction);
        return new Figure(new SwatchFigure(prediction, size).Compose());
    }

    /// <summary>What is said of swatches where the light is not that of sRGB; begins with a comma.</summary>
    internal static string Adaptation(PredictionConditions conditions)
        => conditions.Illuminant == Illuminant.D65 ? "" : $", adapted to D65 ({ChromaticAdaptation.BradfordName} transform)";

    /// <summary>The eyes that figures show; the averages, empty, where none was asked for.</summary>
    internal static IReadOnlyList<VisualSystem> Eyes(PredictionConditions conditions)
        => [.. (conditions.Eyes.Count > 0 ? conditions.Eyes : VisualSystems.Averages).Take(MostEyes)];

    private Page Compose()
    {
        AddAngles();
        AddStrip("People, as computed", view => view.Color?.Srgb);
        AddStrip(FormattableString.Invariant($"People, brightened to L* {SrgbEncoder.BrightenedLightness}"), view => view.Color?.SrgbBrightened);
        foreach (VisualSystem eye in Eyes(_prediction.Conditions))
            AddStrip($"Birds, false color: {eye.Name}", view => view.Birds.FirstOrDefault(bird => bird.System == eye) is BirdColor color ? BirdFalseColor.Of(color) : null);
        double bottom = NoteBlock.Add(_elements, Notes(), MarginPt, _widthPt - MarginPt, _top + GapPt);
        return new Page($"Colors of {_prediction.Barbule.Name} over the angle of incidence", _widthPt, bottom + MarginPt, _elements);
    }

    private void AddAngles()
    {
        double middle = _top + Ink.LabelPt / 2;
        _elements.Add(TextRun.CenteredAt("Angle of incidence", new(_strip.Left, middle), Ink.LabelPt, TextAlign.Start, Ink.Text));
        _top += Ink.LabelPt + GapPt;
        string[] texts = [.. _views.Select(view => Degrees.Text(view.Incidence))];
        double widest = texts.Max(text => FigureFont.WidthPt(text, Ink.SmallPt));
        int every = (int)Math.Ceiling((widest + TextGapPt) / _column);
        for (int i = 0; i < texts.Length; i += every)
        {
            // Columns narrower than a number: the first and the last number may not leave the page.
            double half = FigureFont.WidthPt(texts[i], Ink.SmallPt) / 2;
            double x = Math.Clamp(_strip.Left + (i + 0.5) * _column, _strip.Left + half, _strip.Right - half);
            _elements.Add(TextRun.CenteredAt(texts[i], new(x, _top + Ink.SmallPt / 2), Ink.SmallPt, TextAlign.Middle, Ink.Text));
        }
        _top += Ink.SmallPt + GapPt;
    }

    private void AddStrip(string name, Func<View, SrgbColor?> color)
    {
        foreach (string line in TextWrap.Lines(name, Ink.SmallPt, _strip.Width).Take(1))
            _elements.Add(TextRun.CenteredAt(line, new(_strip.Left, _top + Ink.SmallPt / 2), Ink.SmallPt, TextAlign.Start, Ink.Text));
        _top += Ink.SmallPt + TextGapPt;
        double gap = _column > 8 ? 2 : 0;
        var outlines = new Shape();
        for (int i = 0; i < _views.Count; i++)
        {
            var box = new Box(_strip.Left + i * _column + (i > 0 ? gap / 2 : 0), _top, _strip.Left + (i + 1) * _column - (i < _views.Count - 1 ? gap / 2 : 0), _top + StripPt);
            // Without a gap the next one covers a hair of it, or the paper would shine through between.
            double under = gap == 0 && i < _views.Count - 1 ? 0.4 : 0;
            if (color(_views[i]) is SrgbColor found)
                _elements.Add(new FilledShape(Shape.Rectangle(box with { Right = box.Right + under }), found));
            if (gap > 0)
                outlines.AddRectangle(box);
        }
        if (gap == 0)
            outlines.AddRectangle(_strip.Moved(0, _top));
        _elements.Add(new StrokedShape(outlines, new Stroke(Ink.Outline, Ink.LinePt), "swatches"));
        _top += StripPt + GapPt;
    }

    /// <summary>What the color white stands for.</summary>
    public static string White(PredictionConditions conditions)
        => conditions.Instrument is { Reference: SignalReference.WhiteStandard } ? "a perfect matt white" : "a perfect mirror";

    private IEnumerable<string> Notes()
    {
        PredictionConditions conditions = _prediction.Conditions;
        yield return $"Illuminant {conditions.Illuminant.Name}{Adaptation(conditions)}; people: CIE 1931 2° observer; {White(conditions)} is white.";
        string[] outside = [.. _views.Where(view => view.Color is { InSrgbGamut: false }).Select(view => Degrees.Text(view.Incidence))];
        if (outside.Length > 0)
            yield return $"Outside sRGB and shown paler: {(outside.Length <= 4 ? string.Join(", ", outside) : $"{outside.Length} of {_views.Count}")}.";
        if (_views.Any(view => view.Birds.Count > 0))
            yield return BirdFalseColor.Note;
        if (_views.Any(view => view.Color is null))
            yield return "The wavelengths leave out visible light: no color to people.";
        if (conditions.Eyes.Count == 0)
            yield return "No eye was asked for.";
        else if (_views.Any(view => view.Birds.Count == 0))
            yield return "The wavelengths leave out what birds see, 300-700 nm: no color to them.";
        if (conditions.Eyes.Count > MostEyes)
            yield return FormattableString.Invariant($"{MostEyes} of {conditions.Eyes.Count} eyes are shown.");
    }
}
