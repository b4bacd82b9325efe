using System.Buffers.Binary;
using SkiaSharp;

namespace BarbuleOptics.Figures.Drawing;

/// <summary>A page as PNG at 300 dpi on white, with the resolution in the file.</summary>
internal static class PngWriter
{
    /// <summary>Dots per inch.</summary>
    public const int Dpi = 300;

    // Signature of 8 bytes, then IHDR: length, name, 13 bytes of data, checksum (ISO/IEC 15948).
    private const int HeaderEnd = 8 + 4 + 4 + 13 + 4;
    private const double MetersInInch = 0.0254;

    public static byte[] Write(Page page)
    {
        const double Scale = Dpi / 72.0;
        var info = new SKImageInfo(Pixels(page.WidthPt), Pixels(page.HeightPt), SKColorType.Rgba8888, SKAlphaType.Opaque);
        using SKSurface surface = SKSurface.Create(info) ?? throw new InvalidOperationException("There is no memory for the picture.");
        surface.Canvas.Clear(SKColors.White);
        surface.Canvas.Scale((float)Scale);
        SkiaPainter.Paint(page, surface.Canvas);
        using SKImage image = surface.Snapshot();
        using SKData data = image.Encode(SKEncodedImageFormat.Png, 100);
        return WithResolution(data.AsSpan());
    }

    /// <summary>Pixels along a length in points.</summary>
    public static int Pixels(double lengthPt) => (int)Math.Round(lengthPt / 72 * Dpi);

    /// <summary>Puts a pHYs chunk (pixels a meter, ISO/IEC 15948 section 11.3.5.3) right after the header.</summary>
    private static byte[] WithResolution(ReadOnlySpan<byte> png)
    {
        Span<byte> chunk = stackalloc byte[4 + 4 + 9 + 4];
        BinaryPrimitives.WriteUInt32BigEndian(chunk, 9);
        "pHYs"u8.CopyTo(chunk[4..]);
        uint perMeter = (uint)Math.Round(Dpi / MetersInInch);
        BinaryPrimitives.WriteUInt32BigEndian(chunk[8..], perMeter);
        BinaryPrimitives.WriteUInt32BigEndian(chunk[12..], perMeter);
        chunk[16] = 1;
        BinaryPrimitives.WriteUInt32BigEndian(chunk[17..], Checksum(chunk[4..17]));
        return [.. png[..HeaderEnd], .. chunk, .. png[HeaderEnd..]];
    }

    /// <summary>The cyclic redundancy check of ISO/IEC 15948, annex D (polynomial 0xedb88320, all bits inverted).</summary>
    private static uint Checksum(ReadOnlySpan<byte> bytes)
    {
        uint crc = uint.MaxValue;
        foreach (byte value in bytes)
        {
            crc ^= value;
            for (int bit = 0; bit < 8; bit++)
                crc = (crc & 1) == 0 ? crc >> 1 : (crc >> 1) ^ 0xedb88320;
        }
        return ~crc;
    }
}
