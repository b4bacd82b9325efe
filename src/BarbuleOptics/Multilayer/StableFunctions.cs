using System.Numerics;

namespace BarbuleOptics.Multilayer;

/// <summary>Elementary functions in forms that keep their relative accuracy where the textbook form cancels.</summary>
internal static class StableFunctions
{
    // Above this 1 - exp(-x) by difference loses at most two bits.
    private const double SeriesLimit = 0.5;

    /// <summary>The square root in the first quadrant, for an argument whose imaginary part is 0 or above (-0 counts as +0).</summary>
    /// <remarks>Each part is accurate by itself: a weak absorption is not lost beside the real part.</remarks>
    public static Complex UpperSqrt(double real, double imaginary)
    {
        double modulus = Math.Sqrt(real * real + imaginary * imaginary);
        if (modulus == 0)
            return Complex.Zero;
        double larger = Math.Sqrt(0.5 * (modulus + Math.Abs(real)));
        double smaller = 0.5 * imaginary / larger;
        return real >= 0 ? new Complex(larger, smaller) : new Complex(smaller, larger);
    }

    /// <summary>exp(-x) and 1 - exp(-x) for x of 0 or above, each to its own last digits.</summary>
    public static (double Kept, double Faded) Decay(double x)
    {
        if (x == 0)
            return (1, 0);
        if (x >= SeriesLimit)
        {
            double kept = Math.Exp(-x);
            return (kept, 1 - kept);
        }
        // The half argument's hyperbolic tangent t, accurate near 0: 1 - exp(-x) = 2 t/(1 + t).
        double t = Math.Tanh(0.5 * x);
        double faded = 2 * t / (1 + t);
        return (1 - faded, faded);
    }

    /// <summary>(sinh(v)/v - sin(u)/u) / (u^2 + v^2) for u^2 + v^2 below 1, even at 0.</summary>
    /// <remarks>The divided difference of the series of sinh(sqrt(w))/sqrt(w) between w = v^2 and w = -u^2; its terms
    /// p(n) = (w1^n - w2^n)/(w1 - w2) follow p(n+1) = (w1 + w2) p(n) - w1 w2 p(n-1).</remarks>
    public static double SincGap(double u, double v)
    {
        double sum = v * v - u * u;
        double product = -(u * u) * (v * v);
        (double previous, double current) = (0, 1);
        double factorial = 6; // (2 n + 1)! of the term at hand
        double total = current / factorial;
        for (int n = 2; n <= 9; n++)
        {
            (previous, current) = (current, sum * current - product * previous);
            factorial *= 2 * n * (2 * n + 1);
            total += current / factorial;
        }
        return total;
    }

    /// <summary>Square of the modulus.</summary>
    public static double Norm(Complex value) => value.Real * value.Real + value.Imaginary * value.Imaginary;
}
