namespace BarbuleOptics.Grating.Multipoles.Lanes;

/// <summary>Points on a quarter of an ellipse for closed integrals of waves of one mirror symmetry, and the waves' angular parts there.</summary>
/// <remarks>
/// The ellipse is x = a cos t, z = b sin t. The trapezoidal rule of periodic functions, in s with tan t = sqrt(a/b) tan s: that moves the points towards the
/// flat sides, where Hankel functions of the center are large, and doubles the strip in which the integrand is smooth. Normal
/// derivatives are taken along (dz/dt, -dx/dt), not along the unit normal, so that an integral is a plain sum over dt.
/// Derivatives come from (d/dx +- i d/dz) Z_m exp(i m phi) = -+ k Z_(m+-1) exp(i (m+-1) phi): that of Z_m cos(m phi) is
/// k/2 (<see cref="Lower"/> Z_(m-1) - <see cref="Upper"/> Z_(m+1)).
/// </remarks>
internal sealed class EllipseQuadrature
{
    private readonly int _terms;
    private readonly double[] _lower;
    private readonly double[] _upper;
    private readonly double[] _angular;
    private readonly double[] _series;

    /// <summary>Tables for multipoles and Fourier terms 0 to <paramref name="top"/>.</summary>
    public EllipseQuadrature(EllipseOutline outline, int top, int count)
    {
        (Count, _terms) = (count, top + 1);
        RadiiNm = new double[count];
        Weights = new double[count];
        _lower = new double[2 * _terms * count];
        _upper = new double[2 * _terms * count];
        _angular = new double[2 * _terms * count];
        _series = new double[2 * _terms * count];
        double a = outline.HalfWidthNm, b = outline.HalfHeightNm, stretch = Math.Sqrt(a / b);
        for (int q = 0; q < count; q++)
        {
            (double sine, double cosine) = Math.SinCos((q + 0.5) * Math.PI / (2 * count));
            double t = Math.Atan2(stretch * sine, cosine);
            Weights[q] = stretch / (cosine * cosine + stretch * stretch * sine * sine);
            double x = a * Math.Cos(t), z = b * Math.Sin(t), normalX = b * Math.Cos(t), normalZ = a * Math.Sin(t), phi = Math.Atan2(z, x);
            RadiiNm[q] = Math.Sqrt(x * x + z * z);
            for (int m = 0; m <= top; m++)
            {
                int even = m * count + q, odd = (_terms + m) * count + q;
                (_angular[even], _angular[odd]) = (Math.Cos(m * phi), Math.Sin(m * phi));
                (_series[even], _series[odd]) = (Math.Cos(m * t) * Weights[q], Math.Sin(m * t) * Weights[q]);
                _lower[even] = normalX * Math.Cos((m - 1) * phi) - normalZ * Math.Sin((m - 1) * phi);
                _upper[even] = normalX * Math.Cos((m + 1) * phi) + normalZ * Math.Sin((m + 1) * phi);
                _lower[odd] = normalX * Math.Sin((m - 1) * phi) + normalZ * Math.Cos((m - 1) * phi);
                _upper[odd] = normalX * Math.Sin((m + 1) * phi) - normalZ * Math.Cos((m + 1) * phi);
            }
        }
    }

    /// <summary>Points that make the error of the integrals about 1e-10 for multipoles 0 to <paramref name="top"/>; measured for aspects 1 to 4.</summary>
    public static int CountFor(EllipseOutline outline, int top)
    {
        double aspect = Math.Max(outline.HalfWidthNm / outline.HalfHeightNm, outline.HalfHeightNm / outline.HalfWidthNm);
        // Half width of the strip in s where the integrand is smooth, at most that of a hardly flattened circle.
        double strip = Math.Min(1.5, Math.Atanh(1 / Math.Sqrt(Math.Max(aspect, 1.02))));
        return (int)Math.Ceiling((2 * aspect * top - 8 + 23 / (0.68 * strip)) / 4);
    }

    /// <summary>Number of points.</summary>
    public int Count { get; }

    /// <summary>Distances of the points from the center, in nm.</summary>
    public double[] RadiiNm { get; }

    /// <summary>Weights of the points in a sum over dt.</summary>
    public double[] Weights { get; }

    /// <summary>Part of the derivative that goes with Z_(m-1), in nm, at each point.</summary>
    public ReadOnlySpan<double> Lower(bool sine, int m) => Row(_lower, sine, m);

    /// <summary>Part of the derivative that goes with Z_(m+1), in nm, at each point.</summary>
    public ReadOnlySpan<double> Upper(bool sine, int m) => Row(_upper, sine, m);

    /// <summary>cos(m phi) or sin(m phi) at each point.</summary>
    public ReadOnlySpan<double> Angular(bool sine, int m) => Row(_angular, sine, m);

    /// <summary>cos(m t) or sin(m t) at each point, times its weight.</summary>
    public ReadOnlySpan<double> Series(bool sine, int m) => Row(_series, sine, m);

    private ReadOnlySpan<double> Row(double[] table, bool sine, int m) => table.AsSpan(((sine ? _terms : 0) + m) * Count, Count);
}
