namespace BarbuleOptics.Multilayer.Kernels;

/// <summary>Where a film's factor is found.</summary>
/// <param name="RestNm">Thickness beyond the nearest node, in nm; may be negative.</param>
/// <param name="Node">Where that node begins.</param>
internal readonly record struct ThicknessPlace(double RestNm, int Node);
