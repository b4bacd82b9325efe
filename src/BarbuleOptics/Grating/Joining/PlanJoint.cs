namespace BarbuleOptics.Grating.Joining;

/// <summary>Where rows of one spacing end and rows of another begin.</summary>
/// <param name="Upper">Number of the group above.</param>
/// <param name="ClearAboveNm">Matrix below the bodies above, down to the next film or body, in nm.</param>
/// <param name="ClearBelowNm">What lies between the bodies of both groups, in nm.</param>
internal readonly record struct PlanJoint(int Upper, double ClearAboveNm, double ClearBelowNm);
