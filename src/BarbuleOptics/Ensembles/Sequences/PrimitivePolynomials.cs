namespace BarbuleOptics.Ensembles.Sequences;

/// <summary>Primitive polynomials over the field of two elements, by ascending degree.</summary>
/// <remarks>Bit i of a number is the coefficient of x^i. A polynomial of degree d is primitive when x has the order 2^d - 1 modulo it.</remarks>
internal static class PrimitivePolynomials
{
    /// <summary>The polynomials from x + 1 on, without end.</summary>
    public static IEnumerable<uint> All()
    {
        for (int degree = 1; ; degree++)
        {
            for (uint polynomial = (1u << degree) | 1; polynomial < 2u << degree; polynomial += 2)
            {
                if (IsPrimitive(polynomial, degree))
                    yield return polynomial;
            }
        }
    }

    private static bool IsPrimitive(uint polynomial, int degree)
    {
        uint power = 1, order = (1u << degree) - 1;
        for (uint exponent = 1; exponent <= order; exponent++)
        {
            power <<= 1;
            if ((power >> degree) != 0)
                power ^= polynomial;
            if (power == 1)
                return exponent == order;
        }
        return false;
    }
}
