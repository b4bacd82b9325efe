namespace BarbuleOptics.Quantities;

/// <summary>Vacuum wavelengths at equal steps, in nanometres, ascending. Two grids are equal when start, step and count are.</summary>
public sealed class WavelengthGrid : IEquatable<WavelengthGrid>
{
    /// <summary>Shortest wavelength allowed, in nanometres.</summary>
    public const double LeastNm = 10;

    /// <summary>Longest wavelength allowed, in nanometres (100 micrometres).</summary>
    public const double MostNm = 100_000;

    /// <summary>Largest number of wavelengths allowed.</summary>
    public const int MostCount = 100_000;

    private readonly double[] _wavelengthsNm;

    private WavelengthGrid(double startNm, double stepNm, int count)
    {
        StartNm = startNm;
        StepNm = stepNm;
        _wavelengthsNm = new double[count];
        // A product, not a running sum: 0.1 nm steps must not drift. Rounding to 1e-9 nm keeps 300.3 from becoming 300.30000000000001.
        for (int i = 0; i < count; i++)
            _wavelengthsNm[i] = Math.Round(startNm + i * stepNm, 9);
    }

    /// <summary>First wavelength, in nanometres.</summary>
    public double StartNm { get; }

    /// <summary>Distance between neighbors, in nanometres; above zero even for a grid of one.</summary>
    public double StepNm { get; }

    /// <summary>Last wavelength, in nanometres.</summary>
    public double StopNm => _wavelengthsNm[^1];

    /// <summary>Number of wavelengths, at least one.</summary>
    public int Count => _wavelengthsNm.Length;

    /// <summary>The wavelengths, in nanometres, ascending.</summary>
    public ReadOnlySpan<double> Nanometres => _wavelengthsNm;

    /// <summary>A grid that runs from <paramref name="start"/> in equal steps to the last value not above <paramref name="stop"/>.</summary>
    /// <param name="start">First wavelength, 10 nm to 100 um.</param>
    /// <param name="stop">Upper end, not below <paramref name="start"/>, 10 nm to 100 um.</param>
    /// <param name="step">Distance between neighbors, above zero.</param>
    /// <exception cref="ArgumentOutOfRangeException">A value lies outside its range, or there would be over 100,000 wavelengths.</exception>
    public static WavelengthGrid FromRange(Length start, Length stop, Length step)
    {
        Guard.Within(start.Nanometres, LeastNm, MostNm, nameof(start));
        Guard.Within(stop.Nanometres, LeastNm, MostNm, nameof(stop));
        Guard.Positive(step.Nanometres, nameof(step));
        if (stop < start)
            throw new ArgumentOutOfRangeException(nameof(stop), stop.Nanometres, FormattableString.Invariant($"Must not be below the start, {start.Nanometres} nm."));

        // A billionth of a step forgives the rounding of decimal fractions: 300 to 301 in steps of 0.1 has 11 values.
        double steps = Math.Floor((stop.Nanometres - start.Nanometres) / step.Nanometres + 1e-9);
        if (steps + 1 > MostCount)
            throw new ArgumentOutOfRangeException(nameof(step), step.Nanometres, FormattableString.Invariant($"Gives {steps + 1} wavelengths; at most {MostCount} are allowed."));
        return new WavelengthGrid(start.Nanometres, step.Nanometres, (int)steps + 1);
    }

    /// <inheritdoc/>
    public bool Equals(WavelengthGrid? other)
        => other is not null && StartNm.Equals(other.StartNm) && StepNm.Equals(other.StepNm) && Count == other.Count;

    /// <inheritdoc/>
    public override bool Equals(object? obj) => Equals(obj as WavelengthGrid);

    /// <inheritdoc/>
    public override int GetHashCode() => HashCode.Combine(StartNm, StepNm, Count);
}
