using System.Numerics;

namespace BarbuleOptics.Layering;

/// <summary>Picks the root that a passive medium has.</summary>
internal static class PassiveRoot
{
    /// <summary>The passive root of e^2 - 2 b e - c = 0: Im e above zero, or for two real roots the positive one.</summary>
    public static Complex OfQuadratic(Complex b, Complex c)
    {
        Complex root = Complex.Sqrt(b * b + c);
        // The sum that adds equal signs loses no digits; the other root follows from the product, -c.
        Complex larger = b.Real * root.Real + b.Imaginary * root.Imaginary >= 0 ? b + root : b - root;
        if (larger == Complex.Zero)
            return Complex.Zero;
        Complex smaller = -c / larger;
        return IsBetter(larger, smaller) ? Passive(larger) : Passive(smaller);
    }

    /// <summary>Rounding below zero in the imaginary part is zero.</summary>
    public static Complex Passive(Complex value) => value.Imaginary > 0 ? value : new Complex(value.Real, 0);

    private static bool IsBetter(Complex first, Complex second)
    {
        double scale = 1e-14 * (Magnitude(first) + Magnitude(second));
        double difference = first.Imaginary - second.Imaginary;
        return Math.Abs(difference) > scale ? difference > 0 : first.Real > second.Real;
    }

    private static double Magnitude(Complex value) => Math.Abs(value.Real) + Math.Abs(value.Imaginary);
}
