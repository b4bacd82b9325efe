using System.Numerics;

namespace BarbuleOptics.Ensembles.Sequences;

/// <summary>Points that fill the unit cube evenly and are each random: Sobol's sequence under a nested uniform scrambling.</summary>
/// <remarks>
/// <para>Owen 1995, in Niederreiter and Shiue (eds), Monte Carlo and Quasi-Monte Carlo Methods in Scientific Computing, 299: every bit of a coordinate is
/// flipped or not by a coin that belongs to the bits before it. Each point is uniform by itself, so that averages have no bias; together they stay as even
/// as the sequence, so that the error of a smooth average of N points falls faster than 1/sqrt(N), up to N^(-3/2). Scramblings of different seeds are
/// independent: their scatter is an honest estimate of the error.</para>
/// <para>A point is a function of seed and number alone. Immutable and safe to share between threads.</para>
/// </remarks>
internal sealed class ScrambledNet
{
    private const double Unit = 1.0 / (1UL << 52);

    private readonly uint[][] _directions;
    private readonly ulong[] _keys;
    private readonly int _levels;

    /// <summary>The first points of a scrambled sequence.</summary>
    /// <param name="dimensions">0 to <see cref="DirectionNumbers.Most"/>.</param>
    /// <param name="points">Number of points that will be asked for, 1 or above.</param>
    /// <param name="seed">Names the scrambling.</param>
    public ScrambledNet(int dimensions, long points, ulong seed)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(points, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(points, 1L << DirectionNumbers.BitCount);
        _directions = DirectionNumbers.First(dimensions);
        _keys = [.. Enumerable.Range(0, dimensions).Select(dimension => Bits.Key(seed, (ulong)dimension))];
        Count = points;
        // So many leading bits tell the points apart in every dimension; the coins of all further bits are each thrown once.
        _levels = 64 - BitOperations.LeadingZeroCount((ulong)points - 1);
    }

    /// <summary>Number of dimensions.</summary>
    public int Dimensions => _directions.Length;

    /// <summary>Number of points.</summary>
    public long Count { get; }

    /// <summary>The coordinates of one point, each above 0 and below 1.</summary>
    public void Point(long number, Span<double> coordinates)
    {
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual((ulong)number, (ulong)Count, nameof(number));
        for (int dimension = 0; dimension < coordinates.Length; dimension++)
            coordinates[dimension] = Scrambled(Digits(_directions[dimension], (uint)number), _keys[dimension]);
    }

    private static uint Digits(uint[] directions, uint number)
    {
        uint digits = 0;
        for (; number != 0; number &= number - 1)
            digits ^= directions[BitOperations.TrailingZeroCount(number)];
        return digits;
    }

    private double Scrambled(uint digits, ulong key)
    {
        ulong flips = 0;
        for (int level = 0; level < _levels; level++)
        {
            // A one before the leading bits tells 0 from 00.
            ulong node = (1UL << level) | ((ulong)digits >> (DirectionNumbers.BitCount - level));
            flips = (flips << 1) | (Bits.Mix(key + node) >> 63);
        }
        int rest = 52 - _levels;
        ulong leading = ((ulong)digits >> (DirectionNumbers.BitCount - _levels)) ^ flips;
        ulong tail = Bits.Mix(~key + digits) >> (64 - rest);
        return (((leading << rest) | tail) + 0.5) * Unit;
    }
}
