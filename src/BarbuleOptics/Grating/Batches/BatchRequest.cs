using BarbuleOptics.Grating.Joining;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Batches;

/// <summary>What an <see cref="IBatchSolver"/> is asked for: a block of wavelengths at one direction without a wave vector along the rods.</summary>
/// <param name="Structure">The structure.</param>
/// <param name="First">Position of the first wavelength.</param>
/// <param name="Count">Number of wavelengths.</param>
/// <param name="Sine">Sine of the angle of incidence.</param>
/// <param name="Cosine">Its cosine.</param>
/// <param name="Accuracy">Largest absolute error asked for.</param>
/// <param name="FindsTransmitted">Whether transmitted powers are asked for.</param>
/// <param name="FindsLost">Whether lost powers are.</param>
/// <param name="Layout">Where the answers for one wavelength stand.</param>
internal readonly record struct BatchRequest(
    SectionPermittivities Structure, int First, int Count, double Sine, double Cosine, double Accuracy, bool FindsTransmitted, bool FindsLost,
    OutcomeLayout Layout);
