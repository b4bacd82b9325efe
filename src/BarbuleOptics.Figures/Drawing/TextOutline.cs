using SkiaSharp;

namespace BarbuleOptics.Figures.Drawing;

/// <summary>The outlines of the letters of a text, for formats that cannot carry a font to every reader.</summary>
internal static class TextOutline
{
    public static Shape Of(TextRun text)
    {
        using SKFont font = FigureFont.OfSize(text.SizePt);
        using SKPath path = font.GetTextPath(text.Text, new SKPoint(0, 0));
        using SKPath.RawIterator steps = path.CreateRawIterator();
        var shape = new Shape();
        var points = new SKPoint[4];
        for (SKPathVerb verb = steps.Next(points); verb != SKPathVerb.Done; verb = steps.Next(points))
        {
            // A step's first point is where the one before ended.
            switch (verb)
            {
                case SKPathVerb.Move:
                    shape.MoveTo(Placed(text, points[0]));
                    break;
                case SKPathVerb.Line:
                    shape.LineTo(Placed(text, points[1]));
                    break;
                case SKPathVerb.Quad:
                    shape.Add(new Step(Verb.Quad, Placed(text, points[1]), Placed(text, points[2])));
                    break;
                case SKPathVerb.Cubic:
                    shape.Add(new Step(Verb.Cubic, Placed(text, points[1]), Placed(text, points[2]), Placed(text, points[3])));
                    break;
                case SKPathVerb.Close:
                    shape.Close();
                    break;
            }
        }
        return shape;
    }

    private static Point Placed(TextRun text, SKPoint point)
    {
        double along = point.X - text.OffsetPt;
        return text.Upward ? new Point(text.At.X + point.Y, text.At.Y - along) : new Point(text.At.X + along, text.At.Y + point.Y);
    }
}
