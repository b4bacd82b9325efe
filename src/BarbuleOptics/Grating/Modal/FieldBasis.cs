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
    /// <param name="rows">Combinations of the rows.</param>
    /// <param name="columns">Combinations of the columns.</param>
    /// <param name="full">The matrix. With even and odd combinations it must lead from one parity to one parity, scaling included.</param>
    /// <param name="factor">What all elements are multiplied by.</param>
    /// <param name="rowScale">What rows of the matrix are multiplied by; empty for 1.</param>
    /// <param name="columnScale">What columns of the matrix are multiplied by; empty for 1.</param>
    /// <param name="target">Receives the sum.</param>
    /// <param name="firstRow">First row of the block.</param>
    /// <param name="firstColumn">First column of the block.</param>
    public static void AddBetween(
        in FieldBasis rows, in FieldBasis columns, ComplexMatrix full, Complex factor, ReadOnlySpan<double> rowScale, ReadOnlySpan<double> columnScale,
        ComplexMatrix target, int firstRow, int firstColumn)
    {
        int center = full.Rows / 2;
        for (int r = 0; r < rows.Count; r++)
        {
            Span<Complex> sums = target.Row(firstRow + r).Slice(firstColumn, columns.Count);
            int m = rows.HarmonicOf(r);
            ReadOnlySpan<Complex> row = full.Row(center + m);
            Complex scaled = rowScale.IsEmpty ? factor : factor * rowScale[center + m];
            if (!rows.HasPairs)
            {
                if (columnScale.IsEmpty)
                    ComplexMatrix.SubtractScaled(sums, -scaled, row);
                for (int c = 0; c < columnScale.Length; c++)
                    sums[c] += scaled * (columnScale[c] * row[c]);
                continue;
            }
            // Both images of the row's harmonic give the same.
            if (m != 0)
                scaled *= 2 * Half;
            int shift = columns._parity > 0 ? 0 : 1;
            for (int c = 0; c < sums.Length; c++)
            {
                int n = c + shift;
                Complex right = row[center + n], left = row[center - n];
                Complex sum = columnScale.IsEmpty ? right + columns._parity * left : columnScale[center + n] * right + columns._parity * columnScale[center - n] * left;
                sums[c] += scaled * (n == 0 ? 0.5 * sum : Half * sum);
            }
        }
    }

    /// <summary>Fills a matrix with a function of x given by its Fourier coefficients, between combinations.</summary>
    public static void FillBetween(in FieldBasis rows, in FieldBasis columns, ReadOnlySpan<Complex> coefficients, ComplexMatrix target)
    {
        int zero = coefficients.Length / 2;
        for (int r = 0; r < rows.Count; r++)
        {
            Span<Complex> elements = target.Row(r);
            int m = rows.HarmonicOf(r);
            double rowShare = m == 0 ? 1 : 2 * rows.ShareOf(m);
            for (int c = 0; c < elements.Length; c++)
            {
                int n = columns.HarmonicOf(c);
                if (!rows.HasPairs)
                {
                    elements[c] = coefficients[zero + m - n];
                    continue;
                }
                // Both images of m give the same, since the function has the parity that leads from columns to rows.
                Complex sum = coefficients[zero + m - n];
                if (n != 0)
                    sum += columns._parity * coefficients[zero + m + n];
                elements[c] = rowShare * columns.ShareOf(n) * sum;
            }
        }
    }

    /// <summary>Joins what an even function does to even and to odd combinations to a matrix over all harmonics.</summary>
    public static void JoinEven(ComplexMatrix even, ComplexMatrix odd, ComplexMatrix full)
    {
        int n = odd.Rows;
        full[n, n] = even[0, 0];
        for (int a = 1; a <= n; a++)
        {
            full[n, n + a] = full[n, n - a] = Half * even[0, a];
            full[n + a, n] = full[n - a, n] = Half * even[a, 0];
            for (int b = 1; b <= n; b++)
            {
                Complex same = even[a, b], other = odd[a - 1, b - 1];
                full[n + a, n + b] = full[n - a, n - b] = 0.5 * (same + other);
                full[n + a, n - b] = full[n - a, n + b] = 0.5 * (same - other);
            }
        }
    }

    /// <summary>Joins factor times what an odd function of x makes of odd combinations, even ones, to a matrix over all harmonics; from
    /// even to odd combinations it does minus the transpose.</summary>
    public static void JoinOdd(ComplexMatrix evenFromOdd, double factor, ComplexMatrix full)
    {
        int n = evenFromOdd.Columns;
        full[n, n] = Complex.Zero;
        for (int a = 1; a <= n; a++)
        {
            Complex middle = factor * Half * evenFromOdd[0, a - 1];
            full[n, n + a] = full[n - a, n] = middle;
            full[n, n - a] = full[n + a, n] = -middle;
            for (int b = 1; b <= n; b++)
            {
                Complex one = evenFromOdd[a, b - 1], other = evenFromOdd[b, a - 1];
                Complex same = 0.5 * factor * (one - other), opposite = 0.5 * factor * (one + other);
                (full[n + a, n + b], full[n - a, n - b]) = (same, -same);
                (full[n + a, n - b], full[n - a, n + b]) = (-opposite, opposite);
            }
        }
    }
}
