using BarbuleOptics.Quantities;

namespace BarbuleOptics.Multilayer;

/// <summary>One call on a solver: a block of the structure's wavelengths at one direction and one polarization.</summary>
/// <param name="First">Position of the block's first wavelength.</param>
/// <param name="Count">Number of wavelengths in the block.</param>
/// <param name="Incidence">Angle of incidence in the surround, 0 to below 90 degrees.</param>
/// <param name="Polarization">S, P, or both for their mean.</param>
/// <param name="Outputs">What to fill beside the reflectance.</param>
public readonly record struct SolverRequest(int First, int Count, Angle Incidence, Polarizations Polarization, SolverOutputs Outputs);
