using System.Buffers.Binary;
using System.IO.Compression;
using System.Text;
using BarbuleOptics.Figures;
using BarbuleOptics.Figures.Curves;
using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Figures.Sections;
using SkiaSharp;
using Xunit;

namespace BarbuleOptics.Tests.Figures;

/// <summary>Figures as PNG, chunk by chunk as ISO/IEC 15948 (PNG) lays them out.</summary>
public sealed class PngTests
{
    // 300 dots an inch are 300/0.0254 = 11811.02 a meter; the unit 1 is the meter (section 11.3.5.3).
    [Theory]
    [InlineData(60)]
    [InlineData(85)]
    [InlineData(170)]
    public void Pixels_and_resolution_give_the_printed_size(double widthMm)
    {
        Figure figure = SectionFigure.Draw(FigureCases.Predict("hollow-rods"), FigureSize.FromWidth(widthMm));
        List<(string Name, byte[] Data, uint Crc)> chunks = Chunks(figure.Render(FigureFormat.Png));
        byte[] header = chunks[0].Data, physical = chunks.Single(chunk => chunk.Name == "pHYs").Data;

        Assert.Equal("IHDR", chunks[0].Name);
        Assert.Equal("IEND", chunks[^1].Name);
        Assert.Equal((int)Math.Round(widthMm / 25.4 * 300), BinaryPrimitives.ReadInt32BigEndian(header));
        Assert.Equal((int)Math.Round(figure.HeightMm / 25.4 * 300), BinaryPrimitives.ReadInt32BigEndian(header.AsSpan(4)));
        Assert.Equal(11811u, BinaryPrimitives.ReadUInt32BigEndian(physical));
        Assert.Equal(11811u, BinaryPrimitives.ReadUInt32BigEndian(physical.AsSpan(4)));
        Assert.Equal(1, physical[8]);
        // pHYs stands before the first IDAT (section 5.6).
        Assert.True(chunks.FindIndex(chunk => chunk.Name == "pHYs") < chunks.FindIndex(chunk => chunk.Name == "IDAT"));
        Assert.DoesNotContain(chunks, chunk => chunk.Name is "tIME" or "tEXt" or "iTXt");
    }

    // The same checksum is at the end of a gzip file (RFC 1952, section 2.3.1), computed there by the base library.
    [Fact]
    public void Every_chunk_has_its_checksum()
    {
        foreach ((string name, byte[] data, uint crc) in Chunks(ReflectanceFigure.Draw(FigureCases.Predict("cortex-over-sheet"), default).Render(FigureFormat.Png)))
        {
            using var packed = new MemoryStream();
            using (var gzip = new GZipStream(packed, CompressionLevel.Fastest, leaveOpen: true))
                gzip.Write([.. Encoding.ASCII.GetBytes(name), .. data]);
            Assert.Equal(BinaryPrimitives.ReadUInt32LittleEndian(packed.ToArray().AsSpan(^8)), crc);
        }
    }

    // What the fills stand for, by place: 0 nm across is the middle of a hollow rod of the first row.
    [Fact]
    public void Materials_lie_where_the_section_has_them()
    {
        var prediction = FigureCases.Predict("[cortex]\nthickness = 200\n[[layer]]\nform = \"rod\"\ndiameter = 200\nlumen = 100\nspacing = 250\ngap = 100", 45);
        Figure figure = SectionFigure.Draw(prediction, FigureSize.OneColumn);
        using SKBitmap picture = SKBitmap.Decode(figure.Render(FigureFormat.Png));
        Box bar = Extent(figure.Page.Lines.Single(line => line.Role == "scale-bar").Shape);
        double nm = bar.Width / 200, surface = SurfacePt(figure.Page), middle = Extent(figure.Page.Lines.Single(line => line.Role == "cell").Shape).Center.X;

        Assert.Contains(figure.Page.Texts, text => text.Text == "200 nm");
        AssertColor(0xff, 0xff, 0xff, picture, middle + 100 * nm, surface - 5);
        AssertColor(0xf1, 0xe3, 0xc4, picture, middle + 60 * nm, surface + 100 * nm);
        AssertColor(0xff, 0xff, 0xff, picture, middle, surface + 300 * nm);
        AssertColor(0x41, 0x30, 0x28, picture, middle, surface + 225 * nm);
        AssertColor(0x41, 0x30, 0x28, picture, middle - 75 * nm, surface + 300 * nm);
        AssertColor(0xf1, 0xe3, 0xc4, picture, middle, surface + 450 * nm);
    }

    private static void AssertColor(byte red, byte green, byte blue, SKBitmap picture, double xPt, double yPt)
        => Assert.Equal(new SKColor(red, green, blue), picture.GetPixel((int)(xPt * 300 / 72), (int)(yPt * 300 / 72)));

    /// <summary>Where the rays meet the surface.</summary>
    private static double SurfacePt(Page page) => page.Lines.First(line => line.Role == "specular").Shape.Steps[0].A.Y;

    private static Box Extent(Shape shape)
    {
        Point[] points = [.. shape.Steps.Where(step => step.Verb != Verb.Close).Select(step => step.A)];
        return new Box(points.Min(point => point.X), points.Min(point => point.Y), points.Max(point => point.X), points.Max(point => point.Y));
    }

    private static List<(string Name, byte[] Data, uint Crc)> Chunks(byte[] png)
    {
        Assert.Equal([0x89, (byte)'P', (byte)'N', (byte)'G', 0x0d, 0x0a, 0x1a, 0x0a], png[..8]);
        var chunks = new List<(string, byte[], uint)>();
        for (int at = 8; at < png.Length;)
        {
            int length = BinaryPrimitives.ReadInt32BigEndian(png.AsSpan(at));
            chunks.Add((Encoding.ASCII.GetString(png, at + 4, 4), png[(at + 8)..(at + 8 + length)], BinaryPrimitives.ReadUInt32BigEndian(png.AsSpan(at + 8 + length))));
            at += 12 + length;
        }
        return chunks;
    }
}
