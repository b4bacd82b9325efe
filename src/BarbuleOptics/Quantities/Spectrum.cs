namespace BarbuleOptics.Quantities;

/// <summary>One value at each wavelength of a grid; immutable, always finite. Two spectra meet only on one grid.</summary>
public sealed class Spectrum
{
    private readonly double[] _values;

    /// <summary>Copies <paramref name="values"/>, one for each wavelength of <paramref name="grid"/>.</summary>
    /// <exception cref="ArgumentException">The lengths differ, or a value is NaN or infinite.</exception>
    public Spectrum(WavelengthGrid grid, ReadOnlySpan<double> values)
    {
        ArgumentNullException.ThrowIfNull(grid);
        Guard.SameLength(grid.Count, values.Length, nameof(values));
        foreach (double value in values)
            Guard.Finite(value, nameof(values));
        Grid = grid;
        _values = values.ToArray();
    }

    /// <summary>The wavelengths.</summary>
    public WavelengthGrid Grid { get; }

    /// <summary>The values, in the order of the grid.</summary>
    public ReadOnlySpan<double> Values => _values;

    /// <summary>The value at position <paramref name="index"/> of the grid.</summary>
    public double this[int index] => _values[index];
}
