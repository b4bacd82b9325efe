using BarbuleOptics.Quantities;

namespace BarbuleOptics.Ensembles;

/// <summary>What decides one outcome at one angle.</summary>
/// <param name="Name">The outcome: <c>peak_nm</c>, <c>h_deg</c>, <c>C</c>.</param>
/// <param name="StandardDeviation">Its standard deviation over the draws; for an angle the root of the variance of its unit vector, in degrees.</param>
/// <param name="Inputs">One a measurement, the one with the largest total share first.</param>
public sealed record OutcomeShares(string Name, double StandardDeviation, ValueList<InputShare> Inputs);
