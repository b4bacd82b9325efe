using BarbuleOptics.Quantities;

namespace BarbuleOptics.Layering;

/// <summary>The outline of a body or of its core: an ellipse or a rectangle, by its half axes in nm (x along the surface, z in depth).</summary>
public readonly record struct Outline
{
    /// <summary>An outline with half axes above zero.</summary>
    /// <exception cref="ArgumentOutOfRangeException">A half axis is not finite or not above zero.</exception>
    public Outline(OutlineShape shape, double halfWidthNm, double halfHeightNm)
    {
        Shape = shape;
        HalfWidthNm = Guard.Positive(halfWidthNm);
        HalfHeightNm = Guard.Positive(halfHeightNm);
    }

    /// <summary>Ellipse or rectangle.</summary>
    public OutlineShape Shape { get; }

    /// <summary>Half of the extent along the surface, in nm.</summary>
    public double HalfWidthNm { get; }

    /// <summary>Half of the extent in depth, in nm.</summary>
    public double HalfHeightNm { get; }

    /// <summary>Whether it is a circle.</summary>
    internal bool IsCircle => Shape == OutlineShape.Ellipse && HalfWidthNm == HalfHeightNm;

    /// <summary>Half of the chord along the surface at a depth below the center; 0 outside.</summary>
    public double HalfChordNm(double depthNm)
    {
        double u = depthNm / HalfHeightNm;
        if (Math.Abs(u) >= 1)
            return 0;
        // (1 - u)(1 + u) keeps the digits that 1 - u^2 loses near the ends.
        return Shape == OutlineShape.Ellipse ? HalfWidthNm * Math.Sqrt((1 - u) * (1 + u)) : HalfWidthNm;
    }

    /// <summary>Support function: how far the outline reaches from its center in a unit direction (ux, uz).</summary>
    internal double Reach(double ux, double uz)
        => Shape == OutlineShape.Ellipse
            ? Math.Sqrt(HalfWidthNm * HalfWidthNm * ux * ux + HalfHeightNm * HalfHeightNm * uz * uz)
            : HalfWidthNm * Math.Abs(ux) + HalfHeightNm * Math.Abs(uz);
}
