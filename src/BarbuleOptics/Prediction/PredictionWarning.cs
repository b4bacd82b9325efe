using BarbuleOptics.Quantities;

namespace BarbuleOptics.Prediction;

/// <summary>Something a result leans on that is shaky.</summary>
/// <param name="Code">Short name of the kind of warning, fit for a program; see <see cref="WarningCodes"/>.</param>
/// <param name="Message">What is the matter and what to do, in plain words and one line.</param>
/// <param name="Incidence">The angle of incidence it belongs to; null when it holds for all.</param>
public sealed record PredictionWarning(string Code, string Message, Angle? Incidence = null);
