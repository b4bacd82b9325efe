namespace BarbuleOptics.Grating.Joining;

/// <summary>Which rows are solved by multipoles; the rest are modal slabs.</summary>
internal enum RowMethods
{
    /// <summary>Rows of round rods.</summary>
    RoundRods,

    /// <summary>Rows of round and of flattened rods.</summary>
    AllRods,

    /// <summary>None, as a second method.</summary>
    SlabsOnly,
}
