using BarbuleOptics.Color;
using BarbuleOptics.Figures.Plots;
using SkiaSharp;

namespace BarbuleOptics.Figures.Drawing;

/// <summary>Draws a page on a canvas whose unit is the point.</summary>
internal static class SkiaPainter
{
    public static void Paint(Page page, SKCanvas canvas) => Paint(page.Elements, canvas);

    private static void Paint(IEnumerable<PageElement> elements, SKCanvas canvas)
    {
        foreach (PageElement element in elements)
            Paint(element, canvas);
    }

    private static void Paint(PageElement element, SKCanvas canvas)
    {
        switch (element)
        {
            case FilledShape filled:
                Fill(filled, canvas);
                break;
            case StrokedShape stroked:
                Line(stroked, canvas);
                break;
            case TextRun text:
                Write(text, canvas);
                break;
            case PlotPanel panel:
                PlotPainter.Paint(panel, canvas);
                break;
            case ClippedGroup group:
                using (SKPath window = PathOf(group.Window))
                {
                    canvas.Save();
                    canvas.ClipPath(window, SKClipOperation.Intersect, antialias: true);
                    Paint(group.Elements, canvas);
                    canvas.Restore();
                }
                break;
        }
    }

    private static void Fill(FilledShape filled, SKCanvas canvas)
    {
        using SKPaint paint = PaintOf(filled.Color);
        using SKPath path = PathOf(filled.Shape);
        canvas.DrawPath(path, paint);
    }

    private static void Line(StrokedShape stroked, SKCanvas canvas)
    {
        using SKPaint paint = PaintOf(stroked.Stroke.Color);
        paint.Style = SKPaintStyle.Stroke;
        paint.StrokeWidth = (float)stroked.Stroke.WidthPt;
        paint.StrokeJoin = SKStrokeJoin.Round;
        using SKPathEffect? dash = stroked.Stroke.Dash is null ? null : SKPathEffect.CreateDash([.. stroked.Stroke.Dash.Select(length => (float)length)], 0);
        paint.PathEffect = dash;
        using SKPath path = PathOf(stroked.Shape);
        canvas.DrawPath(path, paint);
    }

    private static void Write(TextRun text, SKCanvas canvas)
    {
        using SKPaint paint = PaintOf(text.Color);
        using SKFont font = FigureFont.OfSize(text.SizePt);
        canvas.Save();
        canvas.Translate((float)text.At.X, (float)text.At.Y);
        if (text.Upward)
            canvas.RotateDegrees(-90);
        canvas.DrawText(text.Text, (float)-text.OffsetPt, 0, SKTextAlign.Left, font, paint);
        canvas.Restore();
    }

    private static SKPaint PaintOf(SrgbColor color) => new() { Color = new SKColor(color.Red, color.Green, color.Blue), IsAntialias = true };

    private static SKPath PathOf(Shape shape)
    {
        var path = new SKPath();
        foreach (Step step in shape.Steps)
        {
            switch (step.Verb)
            {
                case Verb.Move:
                    path.MoveTo(At(step.A));
                    break;
                case Verb.Line:
                    path.LineTo(At(step.A));
                    break;
                case Verb.Quad:
                    path.QuadTo(At(step.A), At(step.B));
                    break;
                case Verb.Cubic:
                    path.CubicTo(At(step.A), At(step.B), At(step.C));
                    break;
                default:
                    path.Close();
                    break;
            }
        }
        return path;
    }

    private static SKPoint At(Point point) => new((float)point.X, (float)point.Y);
}
