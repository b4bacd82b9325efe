using System.Numerics;
using BarbuleOptics.Grating;

namespace BarbuleOptics.Tests.Grating;

/// <summary>Power through planes of constant z from amplitudes, by the definition in <see cref="GratingWaves"/>.</summary>
internal static class PlanePower
{
    /// <summary>Power in +z through a plane with downward and upward amplitudes there.</summary>
    public static double Through(GratingWaves waves, ReadOnlySpan<Complex> down, ReadOnlySpan<Complex> up)
    {
        Complex q = waves.MatrixAcross;
        double power = 0;
        for (int n = 0; n < waves.OrderCount; n++)
        {
            bool hasElectric = waves.Field != RodField.Magnetic, hasMagnetic = waves.Field != RodField.Electric;
            int shift = waves.Field == RodField.Both ? waves.OrderCount : 0;
            Complex e = hasElectric ? down[n] + up[n] : 0, de = hasElectric ? waves.Kz[n] * (down[n] - up[n]) : 0;
            Complex h = hasMagnetic ? down[n + shift] + up[n + shift] : 0, dh = hasMagnetic ? waves.Kz[n] * (down[n + shift] - up[n + shift]) : 0;
            Complex electricFlux = (waves.K0 * waves.K0 * waves.Matrix * de + waves.K0 * waves.Ky * waves.Kx[n] * h) / q;
            Complex magneticFlux = (waves.K0 * waves.K0 * dh - waves.K0 * waves.Ky * waves.Kx[n] * e) / q;
            power += (Complex.Conjugate(e) * electricFlux + Complex.Conjugate(h) * magneticFlux).Real;
        }
        return power;
    }

    /// <summary>Power that enters an element through both planes.</summary>
    public static double Entering(GratingWaves waves, ScatteringBlock block, Complex[] down, Complex[] up)
    {
        Complex[] above = Sum(block.ReflectTop, down, block.TransmitUp, up), below = Sum(block.TransmitDown, down, block.ReflectBottom, up);
        return Through(waves, down, above) - Through(waves, below, up);
    }

    /// <summary>What rounding of the amplitudes may add to the power through both planes: eps kz |amplitude|^2.</summary>
    public static double Rounding(GratingWaves waves, ScatteringBlock block, Complex[] down, Complex[] up)
    {
        Complex[] above = Sum(block.ReflectTop, down, block.TransmitUp, up), below = Sum(block.TransmitDown, down, block.ReflectBottom, up);
        double sum = 0;
        for (int c = 0; c < waves.ChannelCount; c++)
        {
            double size = above[c].Magnitude + below[c].Magnitude + down[c].Magnitude + up[c].Magnitude;
            sum += waves.Kz[c % waves.OrderCount].Magnitude * size * size;
        }
        return 2.2e-16 * sum;
    }

    /// <summary>Amplitudes with real and imaginary parts between -1/2 and 1/2.</summary>
    public static Complex[] Random(int count, Random random)
        => [.. Enumerable.Range(0, count).Select(_ => new Complex(random.NextDouble() - 0.5, random.NextDouble() - 0.5))];

    private static Complex[] Sum(ComplexMatrix first, Complex[] a, ComplexMatrix second, Complex[] b)
    {
        var one = new Complex[a.Length];
        var other = new Complex[a.Length];
        first.Apply(a, one);
        second.Apply(b, other);
        return [.. one.Zip(other, (x, y) => x + y)];
    }
}
