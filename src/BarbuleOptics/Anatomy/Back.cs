using BarbuleOptics.Materials;

namespace BarbuleOptics.Anatomy;

/// <summary>The far side of a finite barbule: the backing ends after a thickness.</summary>
/// <param name="Thickness">Thickness of the backing, above 0.</param>
/// <param name="Behind">What lies behind it.</param>
/// <param name="Coherent">False: averaged over thickness; true: one film among the others.</param>
public sealed record Back(MeasuredLength Thickness, MaterialReference Behind, bool Coherent);
