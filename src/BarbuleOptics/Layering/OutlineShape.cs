namespace BarbuleOptics.Layering;

/// <summary>Shape of a body's section.</summary>
public enum OutlineShape
{
    /// <summary>Ellipse with its axes along the surface and in depth; a circle when they are equal.</summary>
    Ellipse,

    /// <summary>Rectangle with its sides along the surface and in depth.</summary>
    Rectangle,
}
