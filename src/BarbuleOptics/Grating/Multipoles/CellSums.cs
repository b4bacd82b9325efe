using System.Numerics;

namespace BarbuleOptics.Grating.Multipoles;

/// <summary>Lattice sums between rods in different places of one cell, whose places are multiples of P/b along x.</summary>
/// <remarks>
/// What the rods in one place send to one that lies r P/b further is, formally, the sum over all orders n of
/// 2 T_p(kx_n/k)/(P kz_n) exp(2 pi i n r/b), kx0's share of the phase taken out of the amplitudes. The orders n = q + b n' of one q are those of a
/// row of period P/b in waves kx0 + 2 pi q/P, whose sums C^q count each with weight b and leave the rod itself out; over the q that
/// cancels for r not 0: C = (1/b) sum of exp(2 pi i q r/b) C^q, exact. r/b is reduced first and r = 0 taken from the period P itself:
/// sums of a shorter period than the rods' distance grow faster with p and would cancel. Grazing orders are those of the whole period.
/// </remarks>
internal sealed class CellSums
{
    private readonly LatticeSums _whole;
    private readonly int _parts;
    private readonly LatticeSums[]?[] _rows;
    private readonly Complex[][] _sums;
    private readonly GratingWaves _waves = new();

    /// <summary>Sums for some differences of place.</summary>
    /// <param name="whole">The sums of the whole period.</param>
    /// <param name="parts">Parts of the period, b.</param>
    /// <param name="places">The places, in parts of the period.</param>
    public CellSums(LatticeSums whole, int parts, IReadOnlyList<int> places)
    {
        (_whole, _parts) = (whole, parts);
        _rows = new LatticeSums[parts + 1][];
        _sums = [.. Enumerable.Repeat(Array.Empty<Complex>(), parts)];
        foreach (int one in places)
        {
            foreach (int other in places)
            {
                int reduced = PartsOf(one - other);
                if (reduced > 1)
                    _rows[reduced] ??= [.. Enumerable.Range(0, reduced).Select(_ => new LatticeSums())];
            }
        }
    }

    /// <summary>exp(2 pi i numerator/denominator).</summary>
    public static Complex Turn(int numerator, int denominator)
    {
        int rest = Modulo(numerator, denominator);
        if (rest == 0)
            return Complex.One;
        if (2 * rest == denominator)
            return -Complex.One;
        (double sine, double cosine) = Math.SinCos(2 * Math.PI * rest / denominator);
        return new Complex(cosine, sine);
    }

    /// <summary>Parts of the period that sums of a difference of place are counted in: b after reduction.</summary>
    public int PartsOf(int difference)
    {
        int rest = Modulo(difference, _parts), parts = _parts;
        while (rest != 0)
            (parts, rest) = (rest, parts % rest);
        return _parts / parts;
    }

    /// <summary>The sums C_p (|k| P'/2)^p/p! for one difference of place, with P' the period divided by <see cref="PartsOf"/>.</summary>
    public ReadOnlySpan<Complex> Of(int difference)
        => PartsOf(difference) == 1 ? _whole.Sums : _sums[Modulo(difference, _parts)];

    /// <summary>Makes the sums 0 to <paramref name="top"/> ready; those of the whole period are already.</summary>
    public void Prepare(GratingWaves waves, int top)
    {
        for (int parts = 2; parts <= _parts; parts++)
        {
            if (_rows[parts] is LatticeSums[] rows)
                Prepare(waves, rows, top);
        }
        for (int difference = 1; difference < _parts; difference++)
        {
            if (_rows[PartsOf(difference)] is LatticeSums[] rows)
                Combine(rows, difference, top);
        }
    }

    private void Prepare(GratingWaves waves, LatticeSums[] rows, int top)
    {
        Span<int> grazing = stackalloc int[LatticeSums.MostGrazing];
        for (int q = 0; q < rows.Length; q++)
        {
            int count = 0;
            foreach (int order in _whole.GrazingOrders)
            {
                if (Modulo(order - q, rows.Length) == 0)
                    grazing[count++] = (order - q) / rows.Length;
            }
            _waves.Set(waves.WavelengthNm, waves.KxOf(q), waves.Ky, waves.PeriodNm / rows.Length, waves.Permittivities, 0, waves.Field);
            rows[q].Prepare(_waves, top, grazing[..count]);
        }
    }

    private void Combine(LatticeSums[] rows, int difference, int top)
    {
        if (_sums[difference].Length <= top)
            _sums[difference] = new Complex[top + 1];
        Span<Complex> sums = _sums[difference].AsSpan(0, top + 1);
        sums.Clear();
        int reduced = difference / (_parts / rows.Length);
        for (int q = 0; q < rows.Length; q++)
            ComplexMatrix.SubtractScaled(sums, -Turn(q * reduced, rows.Length) / rows.Length, rows[q].Sums[..(top + 1)]);
    }

    private static int Modulo(int number, int divisor) => (number % divisor + divisor) % divisor;
}
