namespace BarbuleOptics.Anatomy;

/// <summary>The section of a melanosome, infinite along the rods.</summary>
public abstract record MelanosomeForm
{
    private MelanosomeForm()
    {
    }

    /// <summary>Circular section.</summary>
    /// <param name="Diameter">Outer diameter, above 0.</param>
    /// <param name="Lumen">Diameter of the concentric core, 0 to below the diameter; null or 0 is solid.</param>
    public sealed record Rod(MeasuredLength Diameter, MeasuredLength? Lumen) : MelanosomeForm;

    /// <summary>Elliptical section, axes along depth and surface.</summary>
    /// <param name="Height">Full axis in depth, above 0.</param>
    /// <param name="Width">Full axis along the surface, above 0.</param>
    /// <param name="LumenHeight">Full axis of the core in depth, below the height; null is solid.</param>
    /// <param name="LumenWidth">Full axis of the core along the surface, below the width; null is solid.</param>
    public sealed record FlattenedRod(MeasuredLength Height, MeasuredLength Width, MeasuredLength? LumenHeight, MeasuredLength? LumenWidth) : MelanosomeForm;

    /// <summary>Rectangular section.</summary>
    /// <param name="Thickness">Extent in depth, above 0.</param>
    /// <param name="Width">Extent along the surface, above 0.</param>
    /// <param name="Wall">Shell all round a core, above 0, below half of both extents; null is solid.</param>
    /// <param name="CoreAir">Share of the lumen material in the core, 0 to 1; the rest is melanin.</param>
    public sealed record Platelet(MeasuredLength Thickness, MeasuredLength Width, MeasuredLength? Wall, double CoreAir) : MelanosomeForm;

    /// <summary>A continuous film; it has no spacing.</summary>
    /// <param name="Thickness">Thickness, above 0.</param>
    public sealed record Film(MeasuredLength Thickness) : MelanosomeForm;
}
