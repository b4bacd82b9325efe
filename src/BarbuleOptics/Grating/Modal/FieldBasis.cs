using System.Numerics;

namespace BarbuleOptics.Grating.Modal;

/// <summary>Combinations of the harmonics -N..N of one field: all of them, or the even or odd ones about x = 0.</summary>
/// <remarks>Even: u_0, (u_n + u_-n)/sqrt 2; odd: (u_n - u_-n)/sqrt 2, n = 1..N. Orthonormal.</remarks>
internal readonly struct FieldBasis
{
    private static readonly double Half = Math.Sqrt(0.5);

    private readonly int _harmonics;
    private readonly int _parity;

    private FieldBasis(int harmonics, int parity, int count)
    {
        _harmonics = harmonics;
        _parity = parity;
        Count = count;
    }

    /// <summary>Number of combinations.</summary>
    public int Count { get; }

    /// <summary>Whether combinations hold a harmonic and its opposite.</summary>
    public bool HasPairs => _parity != 0;

    /// <summary>No combination: the field is absent.</summary>
    public static FieldBasis None => new(0, 0, 0);

    /// <summary>Every harmonic by itself.</summary>
    public static FieldBasis All(int harmonics) => new(harmonics, 0, 2 * harmonics + 1);

    /// <summary>The even combinations.</summary>
    public static FieldBasis Even(int harmonics) => new(harmonics, 1, harmonics + 1);

    /// <summary>The odd combinations.</summary>
    public static FieldBasis Odd(int harmonics) => new(harmonics, -1, harmonics);

    /// <summary>The harmonic that a combination holds; of even and odd ones the positive one.</summary>
    public int HarmonicOf(int combination) => _parity switch { 0 => combination - _harmonics, 1 => combination, _ => combination + 1 };

    /// <summary>The combination that holds a harmonic; -1 where none does.</summary>
    public int CombinationOf(int harmonic) => _parity switch
    {
        0 => harmonic + _harmonics,
        1 => Math.Abs(harmonic),
        _ => Math.Abs(harmonic) - 1,
    };

    /// <summary>Share of a harmonic in its combination.</summary>
    public double ShareOf(int harmonic)
        => _parity == 0 ? 1 : harmonic == 0 ? (_parity > 0 ? 1 : 0) : harmonic < 0 ? _parity * Half : Half;

    /// <summary>Adds factor times a matrix over all harmonics, between the combinations of <paramref name="rows"/> and
    /// <paramref name="columns"/>, to a block of <paramref name="target"/>.</summary>
    public static void AddBetween(
        in FieldBasis rows, in FieldBasis columns, ComplexMatrix full, Complex factor, ComplexMatrix target, int firstRow, int firstColumn)
    {
        int center = rows._harmonics;
        for (int r = 0; r < rows.Count; r++)
        {
            Span<Complex> sums = target.Row(firstRow + r).Slice(firstColumn, columns.Count);
            int m = rows.HarmonicOf(r);
            ReadOnlySpan<Complex> row = full.Row(center + m);
            if (columns._parity == 0)
            {
                for (int c = 0; c < sums.Length; c++)
                    sums[c] += factor * row[c];
                continue;
            }
            ReadOnlySpan<Complex> opposite = full.Row(center - m);
            double rowShare = rows.ShareOf(m) * (m == 0 ? 0.5 : 1);
            for (int c = 0; c < sums.Length; c++)
            {
                int n = columns.HarmonicOf(c);
                Complex same = row[center + n] + columns._parity * row[center - n];
                Complex other = opposite[center + n] + columns._parity * opposite[center - n];
                double share = rowShare * columns.ShareOf(n) * (n == 0 ? 0.5 : 1);
                sums[c] += factor * (share * (same + rows._parity * other));
            }
        }
    }
}
