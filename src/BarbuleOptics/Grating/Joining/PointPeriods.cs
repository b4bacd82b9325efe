namespace BarbuleOptics.Grating.Joining;

/// <summary>The periods at one wavelength and direction.</summary>
/// <param name="PeriodNm">The period of all rows, in nm; null when each group keeps its own and the zeroth order joins them.</param>
/// <param name="OrderPeriodNm">The period orders are counted by, in nm; 0 without rows.</param>
/// <param name="MostOrder">Largest order that travels in any medium, counted by the period of the waves.</param>
internal readonly record struct PointPeriods(double? PeriodNm, double OrderPeriodNm, int MostOrder);
