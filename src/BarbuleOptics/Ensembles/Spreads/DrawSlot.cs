using BarbuleOptics.Anatomy;

namespace BarbuleOptics.Ensembles.Spreads;

/// <summary>One place of a structure that takes a length: drawn, or kept.</summary>
/// <param name="Key">The measurement, as on the command line; rows drawn by themselves share one.</param>
/// <param name="Row">The row it belongs to, from 1 on, where rows are drawn by themselves; 0 otherwise.</param>
/// <param name="Length">As measured.</param>
/// <param name="Law">How it is drawn; null where it is kept.</param>
internal sealed record DrawSlot(string Key, int Row, MeasuredLength Length, LengthLaw? Law);
