namespace BarbuleOptics.Layering;

/// <summary>A body as an interval of depth meets it.</summary>
/// <param name="Body">The body.</param>
/// <param name="XNm">Place of its center along the surface, in nm.</param>
/// <param name="CenterNm">Depth of its center below the interval's top, in nm; may be negative.</param>
internal readonly record struct PlacedOutline(CellBody Body, double XNm, double CenterNm);
