using BarbuleOptics.Multilayer;

namespace BarbuleOptics.Prediction;

/// <summary>What becomes of one incident beam beside the four parts of its power: by order, by material, and how well it is known.</summary>
internal sealed class BeamAccount(int angle, Polarizations polarization, OrderFan reflected, OrderFan transmitted, int materials, int wavelengths)
{
    /// <summary>Number of the angle of incidence.</summary>
    public int Angle { get; } = angle;

    /// <summary>Polarization of the incident light, s or p.</summary>
    public Polarizations Polarization { get; } = polarization;

    /// <summary>Both sides with the efficiency of each order at each wavelength.</summary>
    public IReadOnlyList<(OrderFan Fan, double[][] Efficiencies)> Sides { get; } = [(reflected, Zeros(reflected.Count, wavelengths)), (transmitted, Zeros(transmitted.Count, wavelengths))];

    /// <summary>Power lost in each material at each wavelength.</summary>
    public double[][] Losses { get; } = Zeros(materials, wavelengths);

    /// <summary>Estimate of the largest error at each wavelength.</summary>
    public double[] Errors { get; } = new double[wavelengths];

    private static double[][] Zeros(int rows, int columns) => [.. Enumerable.Range(0, rows).Select(_ => new double[columns])];
}
