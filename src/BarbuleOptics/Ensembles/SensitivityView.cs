using BarbuleOptics.Quantities;

namespace BarbuleOptics.Ensembles;

/// <summary>What decides peak, hue and chroma at one angle.</summary>
/// <param name="Incidence">Angle of incidence in the surround.</param>
/// <param name="Outcomes">Those that vary and that every draw has often enough.</param>
/// <param name="KeptShare">Share of the points in which all draws have the peak; the others are left out of its shares.</param>
public sealed record SensitivityView(Angle Incidence, ValueList<OutcomeShares> Outcomes, double KeptShare);
