namespace BarbuleOptics.Figures.Drawing;

/// <summary>Which part of a text stands at its place.</summary>
internal enum TextAlign
{
    /// <summary>Its start.</summary>
    Start,

    /// <summary>Its middle.</summary>
    Middle,

    /// <summary>Its end.</summary>
    End,
}
