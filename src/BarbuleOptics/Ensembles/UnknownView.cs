using BarbuleOptics.Quantities;

namespace BarbuleOptics.Ensembles;

/// <summary>What may be seen at one angle, as far as things are not known.</summary>
/// <param name="Incidence">Angle of incidence in the surround.</param>
/// <param name="Sweeps">One for each thing not known.</param>
/// <param name="ReachableTerms">Every hue term met over all of them together, most frequent first; how often says how much room it has between the bounds, not how probable it is.
/// Empty without color.</param>
public sealed record UnknownView(Angle Incidence, ValueList<UnknownSweep> Sweeps, ValueList<TermShare> ReachableTerms);
