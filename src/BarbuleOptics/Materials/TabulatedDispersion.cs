using BarbuleOptics.Quantities;
using MathNet.Numerics.Interpolation;

namespace BarbuleOptics.Materials;

/// <summary>A table joined by a shape-preserving cubic (Fritsch and Carlson 1980, SIAM J. Numer. Anal. 17:238): monotone
/// between neighbors, never above or below them, so no false k below zero and no invented absorption band.</summary>
public sealed class TabulatedDispersion : IDispersion
{
    private readonly CubicSpline? _spline;
    private readonly double[] _wavelengthsNm;
    private readonly double[] _values;

    /// <summary>From at least two rows with ascending wavelengths in nanometres; values 0 or above.</summary>
    /// <exception cref="ArgumentException">Fewer than two rows, unequal lengths, or wavelengths that do not ascend.</exception>
    public TabulatedDispersion(ReadOnlySpan<double> wavelengthsNm, ReadOnlySpan<double> values)
    {
        Guard.SameLength(wavelengthsNm.Length, values.Length, nameof(values));
        if (wavelengthsNm.Length < 2)
            throw new ArgumentException("Must have at least two rows.", nameof(wavelengthsNm));
        for (int i = 1; i < wavelengthsNm.Length; i++)
        {
            if (!(wavelengthsNm[i] > wavelengthsNm[i - 1]))
                throw new ArgumentException("Must ascend.", nameof(wavelengthsNm));
        }
        foreach (double value in values)
            Guard.NotNegative(value, nameof(values));
        _wavelengthsNm = wavelengthsNm.ToArray();
        _values = values.ToArray();
        // The library's three-point end formula needs three rows; two are a straight line.
        _spline = _values.Length > 2 ? CubicSpline.InterpolatePchipSorted(_wavelengthsNm, _values) : null;
    }

    /// <summary>The rows' wavelengths, in nanometres.</summary>
    public ReadOnlySpan<double> WavelengthsNm => _wavelengthsNm;

    /// <summary>The rows' values.</summary>
    public ReadOnlySpan<double> Values => _values;

    /// <inheritdoc/>
    public bool Extrapolates => false;

    /// <inheritdoc/>
    /// <remarks>Beyond the ends the end value holds; callers refuse such wavelengths first (<see cref="Material.Covers"/>).</remarks>
    public double At(double wavelengthNm)
    {
        if (wavelengthNm <= _wavelengthsNm[0])
            return _values[0];
        if (wavelengthNm >= _wavelengthsNm[^1])
            return _values[^1];
        if (_spline is null)
            return _values[0] + (_values[1] - _values[0]) * (wavelengthNm - _wavelengthsNm[0]) / (_wavelengthsNm[1] - _wavelengthsNm[0]);
        int upper = Array.BinarySearch(_wavelengthsNm, wavelengthNm);
        upper = upper >= 0 ? Math.Max(upper, 1) : ~upper;
        // Rounding may step over a neighbor by one unit in the last place; the promise is that it never does.
        return Math.Clamp(_spline.Interpolate(wavelengthNm), Math.Min(_values[upper - 1], _values[upper]), Math.Max(_values[upper - 1], _values[upper]));
    }
}
