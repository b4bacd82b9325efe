namespace BarbuleOptics.Anatomy;

/// <summary>How the rows of one layer lie above each other.</summary>
public enum Stacking
{
    /// <summary>Every row at the same place along the surface.</summary>
    Aligned,

    /// <summary>Every second row shifted by half a spacing.</summary>
    Staggered,
}
