namespace BarbuleOptics.Layering;

/// <summary>One body in a cut: the shares of the period that its shell and its core take.</summary>
/// <param name="Material">Number of the shell's material.</param>
/// <param name="CoreMaterial">Number of the core's material.</param>
/// <param name="ShellShare">Share of the period within the outline but outside the core.</param>
/// <param name="CoreShare">Share of the period within the core.</param>
public readonly record struct CutBody(int Material, int CoreMaterial, double ShellShare, double CoreShare);
