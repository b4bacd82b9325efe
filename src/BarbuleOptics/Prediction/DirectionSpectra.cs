namespace BarbuleOptics.Prediction;

/// <summary>What a section reflects from one direction.</summary>
/// <param name="Specular">Into the mirror's direction, at each wavelength.</param>
/// <param name="Orders">Into each other order that travels somewhere, at each wavelength.</param>
internal sealed record DirectionSpectra(double[] Specular, IReadOnlyDictionary<int, double[]> Orders);
