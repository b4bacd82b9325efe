namespace BarbuleOptics.Grating;

/// <summary>A spacing that was changed so that all layers have a common period.</summary>
/// <param name="LayerNumber">The layer of the structure, counted from 1.</param>
/// <param name="FromNm">Its spacing as given, in nm.</param>
/// <param name="ToNm">The spacing solved, in nm.</param>
public readonly record struct SpacingMove(int LayerNumber, double FromNm, double ToNm);
