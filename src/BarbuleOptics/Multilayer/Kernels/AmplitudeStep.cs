namespace BarbuleOptics.Multilayer.Kernels;

/// <summary>One film on the way up, as places in a <see cref="DirectionTable"/>.</summary>
/// <param name="ThicknessNm">Thickness, in nm.</param>
/// <param name="Rates">Where its medium's rates begin, in doubles from the vector's own beginning.</param>
/// <param name="Face">Where the reflections of its lower face begin.</param>
/// <param name="IsLossy">Whether waves in it decay.</param>
internal readonly record struct AmplitudeStep(double ThicknessNm, int Rates, int Face, bool IsLossy);
