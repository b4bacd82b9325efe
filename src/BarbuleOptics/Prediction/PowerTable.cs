using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Prediction;

/// <summary>Where the power of every beam goes, one beam an angle and polarization; filled piece by piece from several threads.</summary>
internal sealed class PowerTable
{
    private const int Quantities = 4;

    private readonly PredictionConditions _conditions;
    private readonly double[][] _values;

    /// <summary>A table of zeros.</summary>
    public PowerTable(PredictionConditions conditions)
    {
        _conditions = conditions;
        _values = [.. Enumerable.Range(0, 2 * Quantities * conditions.Incidences.Count).Select(i => new double[conditions.Wavelengths.Count])];
    }

    /// <summary>The polarizations that results need: both, or the one asked for alone.</summary>
    public static IReadOnlyList<Polarizations> Solved(PredictionConditions conditions)
        => conditions.AllPolarizations || conditions.Polarization == Polarizations.Unpolarized
            ? [Polarizations.S, Polarizations.P] : [conditions.Polarization];

    /// <summary>For each angle s, p and their mean, or the polarization asked for alone.</summary>
    public IEnumerable<SpectralResponse> All => Enumerable.Range(0, _conditions.Incidences.Count).SelectMany(
        angle => Written(_conditions).Select(polarization => Of(angle, polarization)));

    /// <summary>For each angle the polarization that is looked at.</summary>
    public IEnumerable<SpectralResponse> Seen => Enumerable.Range(0, _conditions.Incidences.Count).Select(angle => Of(angle, _conditions.Polarization));

    /// <summary>The polarizations that are written into files.</summary>
    public static IReadOnlyList<Polarizations> Written(PredictionConditions conditions)
        => conditions.AllPolarizations ? [Polarizations.S, Polarizations.P, Polarizations.Unpolarized] : [conditions.Polarization];

    /// <summary>Where a solver writes a block of one beam.</summary>
    public SolverResponse Block(int angle, Polarizations polarization, int first, int length) => new()
    {
        Reflectance = Values(angle, polarization, 0).AsSpan(first, length),
        Transmittance = Values(angle, polarization, 1).AsSpan(first, length),
        Absorptance = Values(angle, polarization, 2).AsSpan(first, length),
        DiffractedReflectance = Values(angle, polarization, 3).AsSpan(first, length),
    };

    /// <summary>The spectrum of s, of p, or their mean.</summary>
    public static Spectrum Of(WavelengthGrid grid, Polarizations polarization, double[] s, double[] p) => polarization switch
    {
        Polarizations.S => new Spectrum(grid, s),
        Polarizations.P => new Spectrum(grid, p),
        _ => new Spectrum(grid, [.. s.Zip(p, (one, other) => (one + other) / 2)]),
    };

    private SpectralResponse Of(int angle, Polarizations polarization)
        => new(_conditions.Incidences[angle], polarization, Part(angle, polarization, 0), Part(angle, polarization, 1), Part(angle, polarization, 2), Part(angle, polarization, 3));

    private Spectrum Part(int angle, Polarizations polarization, int quantity) => Of(
        _conditions.Wavelengths, polarization, Values(angle, Polarizations.S, quantity), Values(angle, Polarizations.P, quantity));

    private double[] Values(int angle, Polarizations polarization, int quantity)
        => _values[(2 * angle + (polarization == Polarizations.P ? 1 : 0)) * Quantities + quantity];
}
