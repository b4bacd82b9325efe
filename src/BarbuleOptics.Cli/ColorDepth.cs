namespace BarbuleOptics.Cli;

/// <summary>How many colors a terminal shows.</summary>
internal enum ColorDepth
{
    /// <summary>None that is known of, or it is no terminal.</summary>
    None,

    /// <summary>The 256 colors of xterm.</summary>
    Palette,

    /// <summary>8 bits a channel.</summary>
    Full,
}
