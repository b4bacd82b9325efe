using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Prediction;

/// <summary>The power that one incident beam loses in one material.</summary>
/// <param name="Incidence">Angle of incidence in the surround.</param>
/// <param name="Polarization">Polarization of the incident light.</param>
/// <param name="Material">Name of the material; of an averaged core, what it is made of.</param>
/// <param name="Absorptance">Share of the incident power.</param>
public sealed record MaterialLoss(Angle Incidence, Polarizations Polarization, string Material, Spectrum Absorptance)
{
    /// <summary>Average over 300-700 nm or the part of it that the grid covers; null where it covers none.</summary>
    public double? MeanAbsorptance => PowerSummary.Mean(Absorptance);
}
