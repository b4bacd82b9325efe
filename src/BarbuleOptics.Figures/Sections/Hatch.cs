namespace BarbuleOptics.Figures.Sections;

/// <summary>Lines that tell fills apart in gray.</summary>
internal enum Hatch
{
    /// <summary>None.</summary>
    None,

    /// <summary>Rising from left to right.</summary>
    Rising,

    /// <summary>Falling from left to right.</summary>
    Falling,

    /// <summary>Level.</summary>
    Level,

    /// <summary>Rising and falling.</summary>
    Crossed,
}
