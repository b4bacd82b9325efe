using BarbuleOptics.Color;
using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Figures.Layout;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Figures.Sections;

/// <summary>Where light comes from and where the specular part of it goes.</summary>
/// <remarks>The drawing shows the plane across the rods. Where the plane of incidence is another, directions are drawn as seen in it.</remarks>
internal sealed class LightArrows
{
    private const double MostLengthPt = 36;
    private const double LabelPt = 26;
    private const double HeadPt = 4.5;
    private const double HeadShare = 0.55;
    private const double WidthPt = 0.7;
    private const int MostDrawn = 5;

    private static readonly Stroke Normal = new(Ink.Note, Ink.HairPt, [2, 2]);

    private readonly List<PageElement> _elements;
    private readonly Point _spot;
    private readonly List<Box> _taken = [];
    private readonly SrgbColor _ground;
    private readonly double _lengthPt;
    private int _drawn;

    private LightArrows(List<PageElement> elements, Point spot, double lengthPt, SrgbColor ground) => (_elements, _spot, _lengthPt, _ground) = (elements, spot, lengthPt, ground);

    /// <summary>Draws the rays, each with its angle; the number of angles drawn.</summary>
    public static int Draw(List<PageElement> elements, SectionLayout layout, IReadOnlyList<Angle> angles, SrgbColor ground)
    {
        Box box = layout.Box;
        var spot = new Point(box.Center.X, layout.Depth.At(0));
        // A grazing ray and its angle must fit beside the middle.
        double length = Math.Min(MostLengthPt, box.Width / 2 - LabelPt);
        var arrows = new LightArrows(elements, spot, length, ground);
        arrows.Write(new TextRun("incident", new(box.Left + 3, box.Top + 8), Ink.SmallPt, TextAlign.Start, Ink.Text));
        arrows.Write(new TextRun("specular", new(box.Right - 3, box.Top + 8), Ink.SmallPt, TextAlign.End, Ink.Text));
        elements.Add(new StrokedShape(Shape.Line(spot, spot with { Y = spot.Y - length }), Normal));
        if (layout.Section.IsAlong)
            arrows.Pair(0, string.Join(", ", angles.Count <= 3 ? angles.Select(Degrees.Text) : [Range(angles)]));
        else
            arrows.Fan(angles, layout.Section.Axis);
        return arrows._drawn;
    }

    /// <summary>The least and the greatest of many angles.</summary>
    public static string Range(IReadOnlyList<Angle> angles)
        => $"{Degrees.Text(angles.MinBy(angle => angle.Degrees))} to {Degrees.Text(angles.MaxBy(angle => angle.Degrees))}";

    private void Fan(IReadOnlyList<Angle> angles, Angle axis)
    {
        Angle[] sorted = [.. angles.OrderBy(angle => angle.Degrees)];
        int count = Math.Min(sorted.Length, MostDrawn);
        // The least and the greatest first: they keep their labels.
        IEnumerable<int> picked = Enumerable.Range(0, count).Select(i => count == 1 ? 0 : (int)Math.Round((double)i * (sorted.Length - 1) / (count - 1)));
        foreach (int i in picked.OrderBy(i => i != 0 && i != sorted.Length - 1).ThenBy(i => i))
            Pair(Math.Atan(Math.Tan(sorted[i].Radians) * Math.Cos(axis.Radians)), Degrees.Text(sorted[i]));
    }

    private void Pair(double tilt, string text)
    {
        // Along the normal both would lie on one line.
        double aside = tilt < 0.05 ? 2.2 : 0;
        (double sin, double cos) = Math.SinCos(tilt);
        var from = new Point(_spot.X - sin * _lengthPt - aside, _spot.Y - cos * _lengthPt);
        var to = new Point(_spot.X + sin * _lengthPt + aside, from.Y);
        TextRun label = Label(text, from, sin, cos, aside > 0);
        // A ray without its angle says nothing.
        if (_drawn > 0 && IsTaken(label))
            return;
        // The head half way: at the surface the heads of several angles would run together.
        var hit = new Point(_spot.X - aside, _spot.Y);
        Arrow.DrawThrough(_elements, from, hit, HeadShare, Ink.Text, WidthPt, HeadPt, "incident");
        Arrow.Draw(_elements, new(_spot.X + aside, _spot.Y), to, Ink.Text, WidthPt, HeadPt, "specular");
        Write(label);
        _drawn++;
    }

    /// <summary>Writes on a plain ground, unless another text is there.</summary>
    private void Write(TextRun text)
    {
        if (IsTaken(text))
            return;
        _taken.Add(text.Box);
        _elements.Add(new FilledShape(Shape.Rectangle(text.Box.Grown(0.6)), _ground));
        _elements.Add(text);
    }

    private bool IsTaken(TextRun text) => _taken.Any(text.Box.Grown(0.8).Overlaps);

    /// <summary>The label beyond the tail of the arrow, above the surface in any case.</summary>
    private TextRun Label(string text, Point tail, double sin, double cos, bool upright)
    {
        if (upright)
            return TextRun.CenteredAt(text, new(tail.X - 2, tail.Y + 3), Ink.SmallPt, TextAlign.End, Ink.Text);
        double y = Math.Min(tail.Y - 2 - 2 * cos, _spot.Y - 5);
        return TextRun.CenteredAt(text, new(tail.X - 1 - sin, y), Ink.SmallPt, TextAlign.End, Ink.Text);
    }
}
