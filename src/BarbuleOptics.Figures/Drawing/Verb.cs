namespace BarbuleOptics.Figures.Drawing;

/// <summary>Kinds of steps along an outline.</summary>
internal enum Verb
{
    /// <summary>Starts a new part.</summary>
    Move,

    /// <summary>Straight line.</summary>
    Line,

    /// <summary>Quadratic curve with one control point.</summary>
    Quad,

    /// <summary>Cubic curve with two control points.</summary>
    Cubic,

    /// <summary>Back to the start of the part.</summary>
    Close,
}
