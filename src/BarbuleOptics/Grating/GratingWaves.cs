using System.Numerics;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating;

/// <summary>The plane waves in the matrix that rows of one period couple, at one wavelength and direction.</summary>
/// <remarks>
/// Rods lie along y; x runs across them along the surface, z into the barbule (the frame of the rods, not of the plane of incidence).
/// Fields go as exp(i (kx x + ky y) - i w t); H stands for the magnetic field times the vacuum impedance, so that
/// curl E = i k0 H and curl H = -i k0 e E. Order n has kx = kx0 + 2 pi n / P, kz = sqrt(k0^2 e - ky^2 - kx^2) with Im kz >= 0.
/// Every wave is described by its field components along the rods, Ey and Hy. From them, with q = k0^2 e - ky^2,
/// F_E = (k0^2 e dEy/dz + k0 ky dHy/dx) / q = -i k0 Hx and F_H = (k0^2 dHy/dz - k0 ky dEy/dx) / q = i k0 Ex
/// are continuous through every plane of constant z, and the power through such a plane, in units used throughout this folder, is
/// the sum over orders of Im(conj(Ey) F_E + conj(Hy) F_H).
/// Channels: with one field, channel n + M is order n; with both, the orders of Ey come first, then those of Hy.
/// </remarks>
internal sealed class GratingWaves
{
    /// <summary>Smallest |kz|/k0 a wave is given: a grazing order is given this much, as if the wavelength were changed by about its
    /// square, one part in 1e14.</summary>
    internal const double LeastKz = 1e-7;

    private double[] _kx = [];
    private Complex[] _kz = [];
    private Complex[] _permittivities = [];

    /// <summary>Vacuum wavelength, in nm.</summary>
    public double WavelengthNm { get; private set; }

    /// <summary>Vacuum wave number, in 1/nm.</summary>
    public double K0 { get; private set; }

    /// <summary>Wave vector of the incident light across the rods, in 1/nm.</summary>
    public double Kx0 { get; private set; }

    /// <summary>Wave vector along the rods, in 1/nm; the same for all orders.</summary>
    public double Ky { get; private set; }

    /// <summary>The period, in nm.</summary>
    public double PeriodNm { get; private set; }

    /// <summary>The largest order kept, M: orders run from -M to M.</summary>
    public int MostOrder { get; private set; }

    /// <summary>Number of orders, 2 M + 1.</summary>
    public int OrderCount => 2 * MostOrder + 1;

    /// <summary>Which fields are followed.</summary>
    public RodField Field { get; private set; }

    /// <summary>Number of amplitudes: one for each order and field.</summary>
    public int ChannelCount => Field == RodField.Both ? 2 * OrderCount : OrderCount;

    /// <summary>Wave vectors across the rods, one an order, in 1/nm.</summary>
    public ReadOnlySpan<double> Kx => _kx.AsSpan(0, OrderCount);

    /// <summary>Wave vectors in depth in the matrix, one an order, in 1/nm; Im >= 0, never zero.</summary>
    public ReadOnlySpan<Complex> Kz => _kz.AsSpan(0, OrderCount);

    /// <summary>Permittivities by the number of the material in the section; number <see cref="Section.Matrix"/> is the matrix.</summary>
    public ReadOnlySpan<Complex> Permittivities => _permittivities;

    /// <summary>Permittivity of the matrix.</summary>
    public Complex Matrix => _permittivities[Section.Matrix];

    /// <summary>k0^2 e - ky^2 in the matrix, in 1/nm^2.</summary>
    public Complex MatrixAcross => AcrossSquared(Matrix);

    /// <summary>k0^2 e - ky^2 in a medium, in 1/nm^2.</summary>
    public Complex AcrossSquared(Complex permittivity) => K0 * K0 * permittivity - Ky * Ky;

    /// <summary>Wave vector of an order across the rods, in 1/nm; also beyond the orders kept.</summary>
    public double KxOf(int order) => Kx0 + 2 * Math.PI * order / PeriodNm;

    /// <summary>Wave vector in depth of an order in a medium, in 1/nm; Im >= 0, never zero; also beyond the orders kept.</summary>
    public Complex KzIn(Complex permittivity, int order)
    {
        double kx = KxOf(order);
        Complex root = Complex.Sqrt(AcrossSquared(permittivity) - kx * kx);
        if (root.Imaginary < 0 || (root.Imaginary == 0 && root.Real < 0))
            root = -root;
        return Math.Abs(root.Real) + Math.Abs(root.Imaginary) < LeastKz * K0 ? new Complex(LeastKz * K0, 0) : root;
    }

    /// <summary>Describes the waves of one wavelength and direction.</summary>
    /// <param name="wavelengthNm">Vacuum wavelength, in nm.</param>
    /// <param name="kx0">Wave vector of the incident light across the rods, in 1/nm.</param>
    /// <param name="ky">Wave vector along the rods, in 1/nm; zero unless both fields are followed.</param>
    /// <param name="periodNm">The period, in nm.</param>
    /// <param name="permittivities">By the number of the material.</param>
    /// <param name="mostOrder">The largest order kept, 0 or above.</param>
    /// <param name="field">Which fields are followed.</param>
    public void Set(
        double wavelengthNm, double kx0, double ky, double periodNm, ReadOnlySpan<Complex> permittivities, int mostOrder, RodField field)
    {
        WavelengthNm = wavelengthNm;
        K0 = 2 * Math.PI / wavelengthNm;
        Kx0 = kx0;
        Ky = ky;
        PeriodNm = periodNm;
        MostOrder = mostOrder;
        Field = field;
        if (_kx.Length < OrderCount)
        {
            _kx = new double[OrderCount];
            _kz = new Complex[OrderCount];
        }
        if (_permittivities.Length != permittivities.Length)
            _permittivities = new Complex[permittivities.Length];
        permittivities.CopyTo(_permittivities);
        for (int n = -mostOrder; n <= mostOrder; n++)
        {
            _kx[n + mostOrder] = KxOf(n);
            _kz[n + mostOrder] = KzIn(Matrix, n);
        }
    }
}
