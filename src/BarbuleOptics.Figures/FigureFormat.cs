namespace BarbuleOptics.Figures;

/// <summary>File formats of figures.</summary>
public enum FigureFormat
{
    /// <summary>Scalable vector graphics; its size in mm, text as outlines with the words beside them for screen readers.</summary>
    Svg,

    /// <summary>Portable document format of one page; text can be searched and copied, the font is inside.</summary>
    Pdf,

    /// <summary>Pixels at 300 dpi, which the file says.</summary>
    Png,
}
