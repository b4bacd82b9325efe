using System.Numerics;

namespace BarbuleOptics.Grating.Modal;

/// <summary>The harmonics -N..N of one wavelength and direction, the plane waves among them included.</summary>
internal sealed class ModalWaves
{
    private double _kx0;
    private double _periodNm = 1;

    /// <summary>Memory for harmonics up to N.</summary>
    public ModalWaves(int harmonics)
    {
        Harmonics = harmonics;
        Kx = new double[2 * harmonics + 1];
    }

    /// <summary>Largest harmonic, N.</summary>
    public int Harmonics { get; }

    /// <summary>Wave vectors across the rods, in 1/nm.</summary>
    public double[] Kx { get; }

    /// <summary>Vacuum wave number, in 1/nm.</summary>
    public double K0 { get; private set; }

    /// <summary>ky / k0.</summary>
    public double Alpha { get; private set; }

    /// <summary>Which fields are followed.</summary>
    public RodField Field { get; private set; }

    /// <summary>Takes wavelength and direction over.</summary>
    public void Set(GratingWaves waves)
    {
        (_kx0, _periodNm) = (waves.Kx0, waves.PeriodNm);
        K0 = waves.K0;
        Field = waves.Field;
        Alpha = waves.Field == RodField.Both ? waves.Ky / waves.K0 : 0;
        for (int n = -Harmonics; n <= Harmonics; n++)
            Kx[n + Harmonics] = KxOf(n);
    }

    /// <summary>Wave vector across the rods of a harmonic, also beyond N, in 1/nm.</summary>
    public double KxOf(int harmonic) => _kx0 + 2 * Math.PI * harmonic / _periodNm;

    /// <summary>1/(e - alpha^2) = k0^2/q of a medium.</summary>
    public Complex InverseAcross(Complex permittivity) => Complex.One / (permittivity - Alpha * Alpha);

    /// <summary>Wave vector in depth of a harmonic in a medium, Im >= 0, never zero, in 1/nm.</summary>
    public Complex KzIn(Complex permittivity, int harmonic)
    {
        double kx = KxOf(harmonic);
        Complex root = Complex.Sqrt(K0 * K0 * (permittivity - Alpha * Alpha) - kx * kx);
        if (root.Imaginary < 0 || (root.Imaginary == 0 && root.Real < 0))
            root = -root;
        return Math.Abs(root.Real) + Math.Abs(root.Imaginary) < GratingWaves.LeastKz * K0 ? new Complex(GratingWaves.LeastKz * K0, 0) : root;
    }

    /// <summary>What a flux in depth gains from dE/dz and from dH/dz in a medium: e/(e - alpha^2) and 1/(e - alpha^2).</summary>
    public (Complex Electric, Complex Magnetic) FluxFactors(Complex permittivity)
    {
        Complex inverse = InverseAcross(permittivity);
        return (Field == RodField.Electric ? Complex.One : permittivity * inverse, inverse);
    }
}
