using System.Numerics;

namespace BarbuleOptics.Ensembles.Sequences;

/// <summary>The generating matrices of Sobol's sequence, one a dimension, made as far as they are asked for.</summary>
/// <remarks>
/// <para>Sobol' 1967, USSR Comput. Math. Math. Phys. 7:86: a primitive polynomial a dimension and odd numbers to start its recurrence; the first
/// dimension is van der Corput's. The start numbers are free. They are chosen here as Joe and Kuo 2008, SIAM J. Sci. Comput. 30:2635, 10.1137/070709359,
/// propose: so that the points spread evenly in pairs of dimensions. Of a few random candidates the one is kept whose pairs with
/// the first dimensions, which carry most, and with its neighbors have the least sum of squared quality parameters t (2^t boxes too few are filled
/// evenly) at 1,024 points. Any choice keeps each single dimension perfectly even.</para>
/// <para>Made once, the same in every run.</para>
/// </remarks>
internal static class DirectionNumbers
{
    /// <summary>Bits of a coordinate, and of a point's number.</summary>
    public const int BitCount = 32;

    /// <summary>Most dimensions.</summary>
    public const int Most = 2000;

    private const int Candidates = 12;
    private const int Partners = 6;
    private const int TestedBits = 10;
    private const ulong Seed = 0x5EED;

    private static readonly Lock Gate = new();
    private static readonly List<uint[]> Made = [];
    private static readonly IEnumerator<uint> Polynomials = PrimitivePolynomials.All().GetEnumerator();

    /// <summary>The direction numbers of the first dimensions: element i of a dimension belongs to bit i of a point's number.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Below 0 or above <see cref="Most"/>.</exception>
    public static uint[][] First(int dimensions)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(dimensions);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(dimensions, Most);
        lock (Gate)
        {
            while (Made.Count < dimensions)
                Made.Add(Next());
            return [.. Made.Take(dimensions)];
        }
    }

    private static uint[] Next()
    {
        if (Made.Count == 0)
            return [.. Enumerable.Range(0, BitCount).Select(bit => 1u << (BitCount - 1 - bit))];
        Polynomials.MoveNext();
        uint polynomial = Polynomials.Current;
        int degree = BitOperations.Log2(polynomial);
        int[] partners = [.. Enumerable.Range(0, Made.Count).Where(dimension => dimension < Partners || dimension >= Made.Count - Partners)];
        uint[] best = [];
        int least = int.MaxValue;
        for (int candidate = 0; candidate < Candidates; candidate++)
        {
            uint[] numbers = Continue(polynomial, degree, candidate);
            int badness = 0;
            foreach (int partner in partners)
            {
                int quality = PairQuality(numbers, Made[partner]);
                badness += quality * quality;
            }
            if (badness < least)
                (least, best) = (badness, numbers);
        }
        return best;
    }

    // v_i = a_1 v_(i-1) + ... + a_(s-1) v_(i-s+1) + v_(i-s) + v_(i-s)/2^s, sums without carry.
    private static uint[] Continue(uint polynomial, int degree, int candidate)
    {
        var numbers = new uint[BitCount];
        for (int i = 0; i < BitCount; i++)
        {
            if (i < degree)
            {
                ulong random = Bits.Key(Bits.Key(Seed, (ulong)Made.Count), (ulong)(candidate * BitCount + i));
                uint odd = ((uint)random & ((2u << i) - 1)) | 1;
                numbers[i] = odd << (BitCount - 1 - i);
                continue;
            }
            uint sum = numbers[i - degree] ^ (numbers[i - degree] >> degree);
            for (int back = 1; back < degree; back++)
            {
                if (((polynomial >> (degree - back)) & 1) != 0)
                    sum ^= numbers[i - back];
            }
            numbers[i] = sum;
        }
        return numbers;
    }

    /// <summary>The quality parameter t of two dimensions at 2^10 points: every box of 2^(t - 10) of the square, whatever its sides, holds 2^t of them.</summary>
    /// <remarks>t = m - k, k the largest number for which any j leading rows of one matrix and k - j of the other are independent
    /// (Niederreiter 1992, Random Number Generation and Quasi-Monte Carlo Methods, theorem 4.28, number from memory).</remarks>
    internal static int PairQuality(uint[] first, uint[] second)
    {
        Span<uint> one = stackalloc uint[TestedBits], other = stackalloc uint[TestedBits];
        for (int row = 0; row < TestedBits; row++)
            (one[row], other[row]) = (Row(first, row), Row(second, row));
        for (int k = TestedBits; k > 0; k--)
        {
            if (AreIndependent(one, other, k))
                return TestedBits - k;
        }
        return TestedBits;
    }

    private static uint Row(uint[] numbers, int row)
    {
        uint bits = 0;
        for (int i = 0; i < TestedBits; i++)
            bits |= ((numbers[i] >> (BitCount - 1 - row)) & 1) << i;
        return bits;
    }

    private static bool AreIndependent(ReadOnlySpan<uint> one, ReadOnlySpan<uint> other, int rows)
    {
        Span<uint> byLeadingBit = stackalloc uint[BitCount];
        for (int ofOne = 0; ofOne <= rows; ofOne++)
        {
            byLeadingBit.Clear();
            for (int i = 0; i < rows; i++)
            {
                uint row = i < ofOne ? one[i] : other[i - ofOne];
                while (row != 0 && byLeadingBit[BitOperations.Log2(row)] != 0)
                    row ^= byLeadingBit[BitOperations.Log2(row)];
                if (row == 0)
                    return false;
                byLeadingBit[BitOperations.Log2(row)] = row;
            }
        }
        return true;
    }
}
