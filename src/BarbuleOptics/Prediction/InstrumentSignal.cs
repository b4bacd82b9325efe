using BarbuleOptics.Quantities;

namespace BarbuleOptics.Prediction;

/// <summary>What an instrument reads at one angle of its arms.</summary>
/// <param name="Angle">The angle that was asked for.</param>
/// <param name="Signal">The reading: a share of what the reference gives.</param>
/// <param name="Scale">What the signal against a perfect mirror that faces the arms was multiplied with: 1 for the mirror as reference; from the solid angles of the
/// cones for a matt white.</param>
/// <param name="FacingShare">What facets that were perfect mirrors would give, as a share of one mirror that faces the arms; null where both cones are
/// thin lines, and the signal is that of the facets that face the arms.</param>
/// <param name="MeanIncidence">Mean angle of incidence on the facets that count.</param>
/// <param name="ErrorEstimate">Estimate of the largest error of the signal by integration over directions, on the scale of the signal.</param>
/// <param name="Directions">Number of directions solved for it.</param>
/// <param name="DiffractedShare">Part of the mean signal that orders other than the mirror's bring.</param>
public sealed record InstrumentSignal(
    Angle Angle, Spectrum Signal, double Scale, double? FacingShare, Angle MeanIncidence, double ErrorEstimate, int Directions, double DiffractedShare);
