using BarbuleOptics.Color;

namespace BarbuleOptics.Figures.Drawing;

/// <summary>One line of text.</summary>
/// <param name="Text">The words.</param>
/// <param name="At">A point of the baseline.</param>
/// <param name="SizePt">Size of the type.</param>
/// <param name="Align">Which part of the text stands at <paramref name="At"/>.</param>
/// <param name="Color">Its color.</param>
/// <param name="Upward">Whether it runs from the bottom to the top.</param>
internal sealed record TextRun(string Text, Point At, double SizePt, TextAlign Align, SrgbColor Color, bool Upward = false) : PageElement
{
    public string Text { get; } = FigureFont.Printable(Text);

    /// <summary>Length along the baseline.</summary>
    public double LengthPt => FigureFont.WidthPt(Text, SizePt);

    /// <summary>Distance from the start to <see cref="At"/>.</summary>
    public double OffsetPt => Align switch { TextAlign.Start => 0, TextAlign.Middle => LengthPt / 2, _ => LengthPt };

    /// <summary>What it covers: from the top of its capitals to the bottom of its descenders.</summary>
    public Box Box
    {
        get
        {
            double before = OffsetPt, after = LengthPt - OffsetPt;
            double rise = FigureFont.CapHeight * SizePt, fall = FigureFont.Descent * SizePt;
            return Upward
                ? new Box(At.X - rise, At.Y - after, At.X + fall, At.Y + before)
                : new Box(At.X - before, At.Y - rise, At.X + after, At.Y + fall);
        }
    }

    /// <summary>A text whose box has its middle at a height.</summary>
    public static TextRun CenteredAt(string text, Point at, double sizePt, TextAlign align, SrgbColor color)
        => new(text, at with { Y = at.Y + FigureFont.CapHeight * sizePt / 2 }, sizePt, align, color);
}
