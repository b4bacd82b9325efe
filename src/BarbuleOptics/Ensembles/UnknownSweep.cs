using BarbuleOptics.Quantities;

namespace BarbuleOptics.Ensembles;

/// <summary>Hue against one thing that is not known, all others at their middle.</summary>
/// <param name="Key">The measurement, as on the command line.</param>
/// <param name="Unit">"nm", "deg", "rows" or empty.</param>
/// <param name="Points">From its least value to its most.</param>
public sealed record UnknownSweep(string Key, string Unit, ValueList<UnknownPoint> Points);
