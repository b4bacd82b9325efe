using System.Numerics;

namespace BarbuleOptics.Grating.Multipoles;

/// <summary>Bessel functions J_m and Hankel functions H_m of the first kind of one complex argument, for m = 0, 1, ..., scaled so that
/// small arguments, large orders and strong absorption neither overflow nor underflow.</summary>
/// <remarks>
/// With s = |z|/2: J[m] = J_m(z) m!/s^m exp(-Im z), H[m] = H_m(z) s^m/m! exp(+Im z), and z times the derivatives on the same scale.
/// Products of a J and an H of one order need no scale. Needs Im z >= 0 and z not 0.
/// J by Miller's backward recurrence, normalized with exp(-iz) = J_0 + 2 sum (-i)^m J_m, whose terms do not cancel for Im z >= 0.
/// H_0 and H_1 by Neumann's series of J for small z, by the continued fraction of H_0'/H_0 and the Wronskian elsewhere; then upward.
/// Source: Abramowitz and Stegun, Handbook of Mathematical Functions, 9.1.16, 9.1.27, 9.1.42 to 9.1.45, 9.1.88; the continued fraction is
/// that of the confluent hypergeometric function, ibid. 13.1 (numbers from memory). Relative error below 1e-13 for |z| up to 100.
/// </remarks>
internal sealed class CylinderFunctions
{
    private const double EulerGamma = 0.57721566490153286061;

    private Complex[] _j = [];
    private Complex[] _zj = [];
    private Complex[] _h = [];
    private Complex[] _zh = [];

    // H_1 on its scale, apart because order 1 may lie beyond the orders asked for.
    private Complex _next;

    /// <summary>The argument.</summary>
    public Complex Argument { get; private set; }

    /// <summary>J_m(z), scaled.</summary>
    public ReadOnlySpan<Complex> J => _j;

    /// <summary>z J_m'(z), scaled like J_m.</summary>
    public ReadOnlySpan<Complex> JSlope => _zj;

    /// <summary>H_m(z), scaled.</summary>
    public ReadOnlySpan<Complex> H => _h;

    /// <summary>z H_m'(z), scaled like H_m.</summary>
    public ReadOnlySpan<Complex> HSlope => _zh;

    /// <summary>Fills J and its slope for orders 0 to <paramref name="most"/>.</summary>
    public void SetRegular(Complex z, int most) => FillRegular(z, most, out _, out _);

    /// <summary>Fills J, H and their slopes for orders 0 to <paramref name="most"/>.</summary>
    public void Set(Complex z, int most)
    {
        if (_h.Length < most + 1)
        {
            _h = new Complex[most + 1];
            _zh = new Complex[most + 1];
        }
        FillRegular(z, most, out Complex evenSum, out Complex oddSum);
        double s = Complex.Abs(z) / 2;
        if (z.Imaginary < 1 && s < 4)
            StartFromSeries(z, s, evenSum, oddSum, out _h[0], out _next);
        else
            StartFromFraction(z, s, out _h[0], out _next);
        FillUpward(z, s, most);
    }

    private void FillRegular(Complex z, int most, out Complex evenSum, out Complex oddSum)
    {
        Argument = z;
        if (_j.Length < most + 2)
        {
            _j = new Complex[most + 2];
            _zj = new Complex[most + 2];
        }
        double size = Complex.Abs(z), s = size / 2;
        Complex turn = Complex.Conjugate(z) / size;
        // Beyond this order J is below 1e-17, so that the normalization misses nothing.
        int start = Math.Max(most + 9, (int)(size + 4 + 12 * Math.Cbrt(size)));
        Complex above = Complex.Zero, value = 1e-30;
        // Nested sums of J_m s^m/m! with weights (-i)^m, with those of Neumann's series of Y_0 (even m), and of Y_1 (odd m).
        Complex total = Complex.Zero, even = Complex.Zero, odd = Complex.Zero;
        for (int m = start; m >= 0; m--)
        {
            double step = s / (m + 1);
            total = value + new Complex(total.Imaginary * step, -total.Real * step);
            double sign = (m >> 1) % 2 == 0 ? 1 : -1;
            double k = m >> 1;
            even *= step;
            odd *= step;
            if (m % 2 == 0 && m > 0)
                even += sign / k * value;
            else if (m > 1)
                odd += sign * m / (k * (k + 1)) * value;
            if (m <= most + 1)
                _j[m] = value;
            if (m > 0)
                (above, value) = (value, turn * value - s * s / (m * (m + 1.0)) * above);
        }

        // total = J_0 + sum of m > 0; the normalization counts those twice.
        Complex scale = Complex.FromPolarCoordinates(1, -z.Real) / (2 * total - _j[0]);
        evenSum = even * scale;
        oddSum = odd * scale;
        for (int m = 0; m <= most + 1; m++)
            _j[m] *= scale;
        for (int m = 0; m <= most; m++)
            _zj[m] = m * _j[m] - z * (s / (m + 1)) * _j[m + 1];
    }

    // Y_0 = (2/pi) ((ln(z/2) + gamma) J_0 - 2 sum (-1)^k J_2k / k), and Y_1 alike. The sums hold J exp(-Im z).
    private void StartFromSeries(Complex z, double s, Complex evenSum, Complex oddSum, out Complex h0, out Complex h1)
    {
        Complex logarithm = Complex.Log(z / 2) + EulerGamma;
        Complex j0 = _j[0], j1 = _j[1] * s;
        Complex y0 = 2 / Math.PI * (logarithm * j0 - 2 * evenSum);
        Complex y1 = 2 / Math.PI * ((logarithm - 1) * j1 - j0 / z - oddSum);
        double scale = Math.Exp(2 * z.Imaginary);
        h0 = scale * (j0 + Complex.ImaginaryOne * y0);
        h1 = scale * s * (j1 + Complex.ImaginaryOne * y1);
    }

    // H_0'/H_0 = -1/(2z) + i + (i/z) (1/2)^2 / (2 (z + i) + (3/2)^2 / (2 (z + 2 i) + ...)), then J_1 H_0 - J_0 H_1 = 2 i/(pi z).
    private void StartFromFraction(Complex z, double s, out Complex h0, out Complex h1)
    {
        // Lentz's forward evaluation.
        const int Most = 400;
        Complex b = 2 * (z + Complex.ImaginaryOne);
        Complex f = b, c = b, d = Complex.Zero;
        for (int n = 1; n < Most; n++)
        {
            double a = (n + 0.5) * (n + 0.5);
            b += new Complex(0, 2);
            d = 1 / (b + a * d);
            c = b + a / c;
            Complex factor = c * d;
            f *= factor;
            if (Math.Abs(factor.Real - 1) + Math.Abs(factor.Imaginary) < 5e-16)
                break;
        }
        Complex slope = -0.5 / z + Complex.ImaginaryOne + Complex.ImaginaryOne / z * 0.25 / f;
        Complex j0 = _j[0], j1 = _j[1] * s;
        h0 = new Complex(0, 2 / Math.PI) / (z * (j1 + slope * j0));
        h1 = -slope * h0 * s;
    }

    private void FillUpward(Complex z, double s, int most)
    {
        Complex turn = Complex.Conjugate(z) / (2 * s);
        if (most >= 1)
            _h[1] = _next;
        for (int m = 1; m < most; m++)
            _h[m + 1] = m / (m + 1.0) * turn * _h[m] - s * s / (m * (m + 1.0)) * _h[m - 1];
        _zh[0] = -z / s * _next;
        for (int m = 1; m <= most; m++)
            _zh[m] = z * (s / m) * _h[m - 1] - m * _h[m];
    }
}
