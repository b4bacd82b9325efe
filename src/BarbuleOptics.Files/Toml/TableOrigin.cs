namespace BarbuleOptics.Files.Toml;

/// <summary>How a table came to be, which decides whether it may be written again.</summary>
internal enum TableOrigin
{
    /// <summary>By its own <c>[header]</c>, or the whole file.</summary>
    Header,

    /// <summary>On the way to a deeper header; its own header may still follow.</summary>
    Implicit,

    /// <summary>By a dotted key; further dotted keys may add to it.</summary>
    Dotted,

    /// <summary>Between braces; complete.</summary>
    Inline,
}
