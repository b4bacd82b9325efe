namespace BarbuleOptics.Layering;

/// <summary>Place of one row.</summary>
/// <param name="CenterNm">Depth of its center below the surface, in nm.</param>
/// <param name="ShiftNm">Sideways shift of its cells, in nm.</param>
public readonly record struct SectionRow(double CenterNm, double ShiftNm);
