using System.Numerics;

namespace BarbuleOptics.Grating.Multipoles;

/// <summary>Plane waves as multipoles: the parts even and odd in z, on the scale of <see cref="RodScatterer"/>.</summary>
/// <remarks>
/// With kx = k cos(a), kz = k sin(a), exp(i (kx x +- kz z)) = sum of eps_m i^m J_m(kr) (cos(m a) cos(m theta) +- sin(m a) sin(m theta)), eps_0 = 1, else 2;
/// the field of a row of rods with amplitudes b_m i^m H_m cos(m theta) is on either side the sum over orders of
/// 2/(P kz) cos(m a) b_m, and with sines likewise, the sign turned above. So one table serves both ways.
/// </remarks>
internal sealed class MultipoleWaves
{
    private Complex[] _even = [];
    private Complex[] _odd = [];
    private int _stride;

    /// <summary>cos(m a) s^m/m! of one wave, times its amplitude, m = 0, 1, ...</summary>
    public ReadOnlySpan<Complex> Even(int wave) => _even.AsSpan(wave * _stride, _stride);

    /// <summary>sin(m a) s^m/m! of one wave, times its amplitude, m = 0, 1, ...</summary>
    public ReadOnlySpan<Complex> Odd(int wave) => _odd.AsSpan(wave * _stride, _stride);

    /// <summary>Makes room for <paramref name="waves"/> waves and multipoles 0 to <paramref name="top"/>.</summary>
    public void Resize(int waves, int top)
    {
        _stride = top + 1;
        if (_even.Length < waves * _stride)
        {
            _even = new Complex[waves * _stride];
            _odd = new Complex[waves * _stride];
        }
    }

    /// <summary>Fills the tables of one wave by the recurrence of cos(m a) and sin(m a), which loses nothing at grazing incidence.</summary>
    /// <param name="wave">Number of the wave.</param>
    /// <param name="amplitude">Its amplitude at the center.</param>
    /// <param name="cosine">cos(a).</param>
    /// <param name="sine">sin(a).</param>
    /// <param name="s">Half of |k| times the radius.</param>
    public void Fill(int wave, Complex amplitude, Complex cosine, Complex sine, double s)
    {
        Span<Complex> even = _even.AsSpan(wave * _stride, _stride), odd = _odd.AsSpan(wave * _stride, _stride);
        even[0] = amplitude;
        odd[0] = Complex.Zero;
        if (_stride == 1)
            return;
        even[1] = s * cosine * amplitude;
        odd[1] = s * sine * amplitude;
        Complex step = 2 * s * cosine;
        for (int m = 1; m + 1 < _stride; m++)
        {
            double next = 1.0 / (m + 1), back = s * s / (m * (m + 1.0));
            even[m + 1] = next * (step * even[m]) - back * even[m - 1];
            odd[m + 1] = next * (step * odd[m]) - back * odd[m - 1];
        }
    }

    /// <summary>Makes one wave hold no multipoles.</summary>
    public void Clear(int wave)
    {
        _even.AsSpan(wave * _stride, _stride).Clear();
        _odd.AsSpan(wave * _stride, _stride).Clear();
    }
}
