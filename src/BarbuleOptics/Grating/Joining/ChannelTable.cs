using System.Numerics;

namespace BarbuleOptics.Grating.Joining;

/// <summary>How every channel travels in every medium of the stack, for one period.</summary>
/// <remarks>
/// Outside the elements waves are told apart by their polarization in each order's own plane, that of z and (kx, ky): phi is the field normal
/// to the plane, E in s and H in p, psi = eta (down - up) the other tangential one, eta = kz/k0 in s and kz/(k0 e) in p, and
/// the power through a plane is the sum of Re(conj(phi) psi). No medium mixes these. Within a plane of incidence across the
/// rods s is Ey and p is Hy. Otherwise, with (c, s) = (kx, ky)/|(kx, ky)|,
/// Ey = c S + s eta P and Hy = c P - s zeta S for downward amplitudes S and P, eta = kz/(k0 e), zeta = kz/k0, and both
/// negative for upward ones. The determinant is q/(k0^2 e).
/// </remarks>
internal sealed class ChannelTable
{
    private Complex[] _kz = [];
    private Complex[] _eta = [];
    private Complex[] _permittivities = [];
    private double[] _cosines = [];
    private double[] _sines = [];

    /// <summary>The waves in the matrix, as elements take them.</summary>
    public GratingWaves Waves { get; } = new();

    /// <summary>Number of channels.</summary>
    public int Channels => Waves.ChannelCount;

    /// <summary>Number of orders.</summary>
    public int Orders => Waves.OrderCount;

    /// <summary>Channel of the incident light, in s or p.</summary>
    public int Incident(bool isP) => Waves.MostOrder + (isP && Waves.Field == RodField.Both ? Orders : 0);

    /// <summary>Order of a channel, from -M to M.</summary>
    public int OrderOf(int channel) => channel % Orders - Waves.MostOrder;

    /// <summary>Whether a channel is of p.</summary>
    public bool IsP(int channel) => Waves.Field == RodField.Magnetic || channel >= Orders;

    /// <summary>Admittances of the channels in a medium.</summary>
    public ReadOnlySpan<Complex> Eta(int medium) => _eta.AsSpan(medium * Channels, Channels);

    /// <summary>Wave vectors in depth of the orders in a medium, in 1/nm.</summary>
    public ReadOnlySpan<Complex> Kz(int medium) => _kz.AsSpan(medium * Orders, Orders);

    /// <summary>Permittivity of a medium.</summary>
    public Complex Permittivity(int medium) => _permittivities[medium];

    /// <summary>(kx^2 + ky^2)/k0^2 of a channel.</summary>
    public double LateralSquared(int channel)
    {
        double kx = Waves.Kx[channel % Orders] / Waves.K0, ky = Waves.Ky / Waves.K0;
        return kx * kx + ky * ky;
    }

    /// <summary>Describes one wavelength and direction.</summary>
    /// <param name="light">The incident light.</param>
    /// <param name="periodNm">The period, in nm.</param>
    /// <param name="media">Permittivities of all media, those of the section first.</param>
    /// <param name="materials">Number of materials of the section.</param>
    /// <param name="mostOrder">Largest order.</param>
    /// <param name="field">Which fields are followed.</param>
    public void Set(in PointLight light, double periodNm, ReadOnlySpan<Complex> media, int materials, int mostOrder, RodField field)
    {
        Waves.Set(light.WavelengthNm, light.Kx0, light.Ky, periodNm, media[..materials], mostOrder, field);
        Reserve(media.Length);
        media.CopyTo(_permittivities);
        for (int medium = 0; medium < media.Length; medium++)
        {
            Span<Complex> kz = _kz.AsSpan(medium * Orders, Orders);
            for (int order = 0; order < Orders; order++)
                kz[order] = Waves.KzIn(media[medium], order - mostOrder);
            Complex squared = light.ZerothDepthSquared(media[medium]);
            Complex zeroth = Multilayer.StableFunctions.UpperSqrt(squared.Real, squared.Imaginary);
            if (zeroth.Real + zeroth.Imaginary > GratingWaves.LeastKz)
                kz[mostOrder] = zeroth * light.K0;
            for (int channel = 0; channel < Channels; channel++)
            {
                Complex depth = kz[channel % Orders] / light.K0;
                _eta[medium * Channels + channel] = IsP(channel) ? depth / media[medium] : depth;
            }
        }
        SetDirections(light);
    }

    /// <summary>Turns a block of (Ey, Hy) amplitudes into one of (s, p) amplitudes.</summary>
    public void ToPolarizations(ScatteringBlock block)
    {
        if (Waves.Field != RodField.Both)
            return;
        ColumnsFromRods(block.ReflectTop, 1);
        RowsToPolarizations(block.ReflectTop, -1);
        ColumnsFromRods(block.TransmitDown, 1);
        RowsToPolarizations(block.TransmitDown, 1);
        ColumnsFromRods(block.TransmitUp, -1);
        RowsToPolarizations(block.TransmitUp, -1);
        ColumnsFromRods(block.ReflectBottom, -1);
        RowsToPolarizations(block.ReflectBottom, 1);
    }

    /// <summary>Turns (s, p) amplitudes in the matrix, downward or upward, into those of the fields along the rods.</summary>
    public void ToRods(ReadOnlySpan<Complex> amplitudes, bool isUp, Span<Complex> rods)
    {
        amplitudes.CopyTo(rods);
        if (Waves.Field != RodField.Both)
            return;
        for (int order = 0; order < Orders; order++)
        {
            (double c, Complex eta, Complex zeta) = Directions(order, isUp ? -1 : 1);
            Complex s = amplitudes[order], p = amplitudes[order + Orders];
            rods[order] = c * s + eta * p;
            rods[order + Orders] = c * p - zeta * s;
        }
    }

    private void Reserve(int media)
    {
        if (_eta.Length < media * Channels)
            _eta = new Complex[media * Channels];
        if (_kz.Length < media * Orders)
            _kz = new Complex[media * Orders];
        if (_permittivities.Length < media)
            _permittivities = new Complex[media];
        if (_cosines.Length < Orders)
            (_cosines, _sines) = (new double[Orders], new double[Orders]);
    }

    private void SetDirections(in PointLight light)
    {
        if (Waves.Field != RodField.Both)
            return;
        for (int order = 0; order < Orders; order++)
        {
            // The zeroth's own direction stands at any angle, however small its wave vector.
            (double x, double y) = order == Waves.MostOrder ? (light.Across, light.Along) : (Waves.Kx[order], Waves.Ky);
            double lateral = double.Hypot(x, y);
            _cosines[order] = x / lateral;
            _sines[order] = y / lateral;
        }
    }

    // c, s eta and s zeta, the last two with the sign of the direction.
    private (double C, Complex Eta, Complex Zeta) Directions(int order, int sign)
    {
        Complex zeta = sign * _sines[order] / Waves.K0 * _kz[Layering.Section.Matrix * Orders + order];
        return (_cosines[order], zeta / Waves.Matrix, zeta);
    }

    private void ColumnsFromRods(ComplexMatrix matrix, int sign)
    {
        for (int order = 0; order < Orders; order++)
        {
            (double c, Complex eta, Complex zeta) = Directions(order, sign);
            for (int row = 0; row < matrix.Rows; row++)
            {
                Complex e = matrix[row, order], h = matrix[row, order + Orders];
                matrix[row, order] = c * e - zeta * h;
                matrix[row, order + Orders] = eta * e + c * h;
            }
        }
    }

    private void RowsToPolarizations(ComplexMatrix matrix, int sign)
    {
        Complex scale = Waves.K0 * Waves.K0 * Waves.Matrix / Waves.MatrixAcross;
        for (int order = 0; order < Orders; order++)
        {
            (double c, Complex eta, Complex zeta) = Directions(order, sign);
            Span<Complex> es = matrix.Row(order), hs = matrix.Row(order + Orders);
            for (int column = 0; column < es.Length; column++)
            {
                Complex e = es[column], h = hs[column];
                es[column] = scale * (c * e - eta * h);
                hs[column] = scale * (zeta * e + c * h);
            }
        }
    }
}
