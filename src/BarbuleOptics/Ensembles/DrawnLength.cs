namespace BarbuleOptics.Ensembles;

/// <summary>A length that was drawn, and what became of its draws.</summary>
/// <param name="Key">The measurement, as on the command line.</param>
/// <param name="CenterNm">Its central value, in nm.</param>
/// <param name="DeviationNm">Standard deviation, or standard error of the mean, of its law, in nm.</param>
/// <param name="Law">"t" for Student's, "normal", or "uniform" between bounds.</param>
/// <param name="TruncatedShare">Share of its draws that could not be and were moved to the nearest length that could.</param>
/// <param name="BiasNm">Mean change of all its draws by that, in nm.</param>
public sealed record DrawnLength(string Key, double CenterNm, double DeviationNm, string Law, double TruncatedShare, double BiasNm);
