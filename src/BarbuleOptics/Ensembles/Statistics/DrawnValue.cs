namespace BarbuleOptics.Ensembles.Statistics;

/// <summary>How one outcome scatters over the draws. For an angle all is taken around its circle, and an interval that runs through 0 has its end below its start.</summary>
/// <param name="Median">Half of the draws lie below.</param>
/// <param name="From50">Start of the interval that holds the middle 50 %.</param>
/// <param name="To50">Its end.</param>
/// <param name="From95">Start of the interval that holds the middle 95 %.</param>
/// <param name="To95">Its end.</param>
/// <param name="Mean">Mean; for an angle the direction of the sum of unit vectors.</param>
/// <param name="StandardDeviation">Standard deviation of the draws; for an angle sqrt(-2 ln r) in degrees, r the length of the mean unit vector
/// (Mardia 1972, Statistics of Directional Data).</param>
/// <param name="Share">Share of the draws that have it, 0 to 1: not every spectrum has a peak.</param>
/// <param name="MedianError">Standard error of the median from too few draws, by independent scramblings; so below. 0 where draws are too few to tell.</param>
/// <param name="From95Error">Standard error of the start of the 95 % interval.</param>
/// <param name="To95Error">Standard error of its end.</param>
/// <param name="MeanError">Standard error of the mean.</param>
public sealed record DrawnValue(
    double Median, double From50, double To50, double From95, double To95, double Mean, double StandardDeviation, double Share,
    double MedianError, double From95Error, double To95Error, double MeanError);
