using System.Numerics;
using BarbuleOptics.Grating;
using BarbuleOptics.Grating.Multipoles;
using MathNet.Numerics;
using Xunit;

namespace BarbuleOptics.Tests.Grating;

/// <summary>Lattice sums against two other ways to the same sums.</summary>
public class LatticeSumsTests
{
    private const int Top = 24;

    // With complex k the sum converges when its terms are simply added; Hankel functions by MathNet.Numerics.
    // Largest difference measured: 3e-14 of the sum.
    [Theory]
    [InlineData(2.4, 0.3, 500, 0.24, 170)]
    [InlineData(2.4, 0.3, 500, 0, 170)]
    [InlineData(2.4, 0.3, 500, -0.4, 1500)]
    [InlineData(2.4, 3, 50000, -0.25, 170)]
    [InlineData(2.4, 0.02, 500, 1.86, 450)]
    [InlineData(2.4, 0.02, 500, 1.549, 450)]
    [InlineData(1, 0.1, 500, -0.98, 260)]
    [InlineData(-4, 1, 500, 0.7, 200)]
    [InlineData(1, 0.1, 500, 1.9, 250)]
    public void Sums_match_plain_addition_where_it_converges(double real, double imaginary, double wavelengthNm, double across, double periodNm)
    {
        GratingWaves waves = Waves(new Complex(real, imaginary), wavelengthNm, across, periodNm);
        LatticeSums sums = Prepared(waves);
        double beta = waves.Kx0 * periodNm;
        int terms = (int)(42 / (sums.K.Imaginary * periodNm)) + 5;
        for (int p = 0; p <= Top; p++)
        {
            double parity = p % 2 == 0 ? 1 : -1;
            Complex sum = Complex.Zero;
            for (int j = terms; j >= 1; j--)
            {
                Complex phase = Complex.Exp(new Complex(0, beta * j));
                sum += SpecialFunctions.HankelH1(p, sums.K * j * periodNm) * (parity * phase + Complex.Conjugate(phase));
            }
            Expect(Complex.Pow(Complex.ImaginaryOne, p) * sum, waves, sums, p, 2e-13);
        }
    }

    // With real k: H_p(x) along the path of steepest descent, gamma = k (1 + i t^2), where the sum over rods is a geometric series.
    // The trapezoidal rule converges exponentially. Method: Yasumoto and Yoshitomi, IEEE Trans. Antennas Propag. 47 (1999) 1050 (from memory).
    // Largest difference measured: 4e-14 of the sum, or of 0.1 where it is less.
    [Theory]
    [InlineData(1.55, 500, 0, 140)]
    [InlineData(1, 1.7, 0.5, 1)]
    [InlineData(1.55, 500, 0.5, 1000)]
    [InlineData(1.55, 500, -1.2, 310)]
    [InlineData(1.55, 500, 0.3, 0.5)]
    public void Sums_match_the_contour_integral_for_real_wave_numbers(double index, double wavelengthNm, double across, double periodNm)
    {
        GratingWaves waves = Waves(index * index, wavelengthNm, across, periodNm);
        LatticeSums sums = Prepared(waves);
        double kP = sums.K.Real * periodNm, beta = waves.Kx0 * periodNm;
        for (int p = 0; p <= Top; p++)
        {
            double parity = p % 2 == 0 ? 1 : -1;
            Complex sum = OneSide(p, kP, -beta) + parity * OneSide(p, kP, beta);
            Expect(Complex.Pow(Complex.ImaginaryOne, p) * sum, waves, sums, p, 2e-13);
        }
    }

    [Fact]
    public void Orders_that_graze_the_row_are_told_apart()
    {
        GratingWaves waves = Waves(1, 500, 0, 500.0001);
        Assert.Equal([-1, 1], Prepared(waves).GrazingOrders.ToArray());
        Assert.Equal(0, Prepared(Waves(1, 500, 0.1, 500)).GrazingOrders.Length);
    }

    private static Complex OneSide(int p, double kP, double beta)
    {
        double step = 0.01 / Math.Sqrt(1 + kP / 10), last = Math.Sqrt((45 + 3 * p) / kP) + 1;
        step = Math.Max(step, last / 20000);
        Complex sum = Complex.Zero;
        for (int i = 0; i * step < last; i++)
        {
            double t = i * step;
            Complex root = Complex.Sqrt(new Complex(t * t, -2)), gamma = new(1, t * t), across = Complex.ImaginaryOne * t * root;
            Complex phase = Complex.Exp(new Complex(-kP * t * t, kP + beta));
            Complex value = (Complex.Pow(gamma + across, p) + Complex.Pow(gamma - across, p)) / root * phase / (1 - phase);
            sum += i == 0 ? value / 2 : value;
        }
        return new Complex(0, -2 * step / Math.PI) * Complex.Pow(-Complex.ImaginaryOne, p) * sum;
    }

    private static void Expect(Complex expected, GratingWaves waves, LatticeSums sums, int p, double tolerance)
    {
        double scale = Math.Exp(p * Math.Log(sums.K.Magnitude * waves.PeriodNm / 2) - SpecialFunctions.GammaLn(p + 1));
        Complex found = sums.Sums[p] / scale;
        foreach (int order in sums.GrazingOrders)
            found += 2 / (waves.PeriodNm * waves.KzIn(waves.Matrix, order)) * Complex.Cos(p * Complex.Acos(waves.KxOf(order) / sums.K));
        // Odd sums vanish at normal incidence, where rounding of the even ones is what they have.
        double size = Math.Max(expected.Magnitude, 1 / (Math.PI * Math.Max(p, 1) * scale) + 0.1);
        Assert.True((found - expected).Magnitude < tolerance * size, $"p = {p}: {found} against {expected}, error {(found - expected).Magnitude / size:e1}");
    }

    private static GratingWaves Waves(Complex permittivity, double wavelengthNm, double across, double periodNm)
    {
        var waves = new GratingWaves();
        waves.Set(wavelengthNm, across * 2 * Math.PI / wavelengthNm, 0, periodNm, [permittivity], 1, RodField.Electric);
        return waves;
    }

    private static LatticeSums Prepared(GratingWaves waves)
    {
        var sums = new LatticeSums();
        sums.Prepare(waves, Top);
        return sums;
    }
}
