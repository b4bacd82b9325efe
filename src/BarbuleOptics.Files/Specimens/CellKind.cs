namespace BarbuleOptics.Files.Specimens;

/// <summary>What the cells of a column hold.</summary>
internal enum CellKind
{
    /// <summary>A length in nm, with columns for its spread.</summary>
    Length,

    /// <summary>A factor without unit, with columns for its spread.</summary>
    Factor,

    /// <summary>A word or the name of a material.</summary>
    Text,

    /// <summary>A number, or a list of them.</summary>
    Number,

    /// <summary>A word or a number.</summary>
    TextOrNumber,

    /// <summary>true or false.</summary>
    Flag,
}
