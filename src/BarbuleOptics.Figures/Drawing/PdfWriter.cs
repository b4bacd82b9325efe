using SkiaSharp;

namespace BarbuleOptics.Figures.Drawing;

/// <summary>A page as PDF, its media box in points, the font inside.</summary>
internal static class PdfWriter
{
    // Not the time of writing: the same input gives the same bytes.
    private static readonly DateTime Fixed = new(2000, 1, 1, 0, 0, 0, DateTimeKind.Utc);

    public static byte[] Write(Page page)
    {
        using var bytes = new MemoryStream();
        var about = new SKDocumentPdfMetadata
        {
            Title = page.Title,
            Creator = "Barbule Optics",
            Producer = "SkiaSharp",
            Creation = Fixed,
            Modified = Fixed,
            // Pages are rounded to whole dots of this size; nothing in a figure is turned into dots.
            RasterDpi = 7200,
            EncodingQuality = 101,
        };
        using (SKDocument document = SKDocument.CreatePdf(bytes, about) ?? throw new InvalidOperationException("The PDF document could not be begun."))
        {
            SKCanvas canvas = document.BeginPage((float)page.WidthPt, (float)page.HeightPt);
            SkiaPainter.Paint(page, canvas);
            document.EndPage();
            document.Close();
        }
        return bytes.ToArray();
    }
}
