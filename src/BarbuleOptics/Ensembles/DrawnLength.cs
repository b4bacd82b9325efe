namespace BarbuleOptics.Ensembles;

/// <summary>A length, or a factor that corrects lengths, that was drawn, and what became of its draws.</summary>
/// <param name="Key">The measurement, as on the command line.</param>
/// <param name="Unit">Unit of the numbers: "nm", "deg", or empty.</param>
/// <param name="Center">Its central value.</param>
/// <param name="Deviation">Standard deviation, or standard error of the mean, of its law.</param>
/// <param name="Law">"t" for Student's, "normal", or "uniform" between bounds.</param>
/// <param name="TruncatedShare">Share of its draws that could not be and were moved to the nearest value that could.</param>
/// <param name="Bias">Mean change of all its draws by that.</param>
public sealed record DrawnLength(string Key, string Unit, double Center, double Deviation, string Law, double TruncatedShare, double Bias);
