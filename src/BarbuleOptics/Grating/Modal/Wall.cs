namespace BarbuleOptics.Grating.Modal;

/// <summary>A crossing of a wall between two materials with one depth.</summary>
/// <param name="XNm">Place along the surface within the period, in nm.</param>
/// <param name="NormalXX">Square of the x component of the wall's unit normal.</param>
/// <param name="NormalXZ">Product of its x and z components.</param>
internal readonly record struct Wall(double XNm, double NormalXX, double NormalXZ);
