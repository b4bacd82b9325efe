namespace BarbuleOptics.Multilayer.Kernels;

/// <summary>One film of all stacks of an ensemble.</summary>
/// <param name="Coefficients">Where its medium's coefficients begin.</param>
/// <param name="Face">Where the reflections of its lower face begin, in the polarization wanted.</param>
internal readonly record struct EnsembleStep(int Coefficients, int Face);
