using BarbuleOptics.Figures.Drawing;

namespace BarbuleOptics.Figures;

/// <summary>A figure that has been laid out; it can be rendered in every format. Same input, same bytes.</summary>
public sealed class Figure
{
    internal Figure(Page page) => Page = page;

    /// <summary>Width, in mm.</summary>
    public double WidthMm => Page.WidthMm;

    /// <summary>Height, in mm.</summary>
    public double HeightMm => Page.HeightMm;

    internal Page Page { get; }

    /// <summary>The bytes of a file.</summary>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="format"/> is no member of the enumeration.</exception>
    public byte[] Render(FigureFormat format) => format switch
    {
        FigureFormat.Svg => SvgWriter.Write(Page),
        FigureFormat.Pdf => PdfWriter.Write(Page),
        FigureFormat.Png => PngWriter.Write(Page),
        _ => throw new ArgumentOutOfRangeException(nameof(format), format, "Must be a member of FigureFormat."),
    };
}
