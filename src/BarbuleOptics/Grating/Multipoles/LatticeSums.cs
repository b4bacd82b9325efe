using System.Numerics;

namespace BarbuleOptics.Grating.Multipoles;

/// <summary>Lattice sums of a row: what all other rods of the row send to one. They depend on the wave number across the rods, on the
/// direction and on the period, not on the rods or the polarization, and are kept until one of these changes.</summary>
/// <remarks>
/// With beta = kx0 P, S_p = sum over j >= 1 of H_p(k j P) (exp(-i beta j) + (-1)^p exp(i beta j)), and C_p = i^p S_p is, formally, the sum over
/// all plane-wave orders of 2 T_p(kx/k)/(P kz), T_p the Chebyshev polynomial. T_p(t)/sqrt(t^2 - 1) = u^p/sqrt(t^2 - 1) + U_(p-1)(t) with
/// u = t - sqrt(t^2 - 1) splits it into a convergent sum and one of powers, whose value is a Bernoulli polynomial of beta/(2 pi).
/// No term cancels another of larger size, so the result is right to rounding for any real or complex k and any period.
/// Source: Twersky, Arch. Rational Mech. Anal. 8 (1961) 323; Linton, SIAM Rev. 52 (2010) 630 (both from memory; derived anew).
/// The terms beyond a number of orders are summed as inverse powers (<see cref="LatticeTail"/>).
/// Orders that graze the row, kz much smaller than k, are left out of the sums and listed: their share 2 T_p/(P kz) grows without
/// bound and has rank one, so the row treats their amplitudes as unknowns of their own.
/// </remarks>
internal sealed class LatticeSums
{
    /// <summary>|kz|/|k| below which an order is left out of the sums.</summary>
    private const double Grazing = 0.05;

    /// <summary>Most orders left out.</summary>
    public const int MostGrazing = 2;

    /// <summary>Least number of orders added one by one on either side.</summary>
    private const int LeastTerms = 12;

    private readonly LatticeTail _tailAbove = new();
    private readonly LatticeTail _tailBelow = new();
    private readonly int[] _grazingOrders = new int[MostGrazing];
    private Complex[] _sums = [];
    private double[] _bernoulli = [];
    private double _k0 = double.NaN, _kx0, _periodNm;
    private Complex _across;
    private int _top = -1;
    private int _grazingCount;

    /// <summary>Wave number across the rods in the matrix, in 1/nm; Im >= 0, never zero.</summary>
    public Complex K { get; private set; }

    /// <summary>C_p (|k| P/2)^p / p! without the grazing orders, p = 0, 1, ...</summary>
    public ReadOnlySpan<Complex> Sums => _sums;

    /// <summary>The orders left out of the sums.</summary>
    public ReadOnlySpan<int> GrazingOrders => _grazingOrders.AsSpan(0, _grazingCount);

    /// <summary>The wave number across the rods in a medium, in 1/nm, kept from zero.</summary>
    public static Complex WaveNumber(GratingWaves waves, Complex permittivity)
    {
        Complex across = waves.AcrossSquared(permittivity);
        double least = 1e-10 * waves.K0 * waves.K0;
        if (Math.Abs(across.Real) + Math.Abs(across.Imaginary) < least)
            across = least;
        Complex root = Complex.Sqrt(across);
        return root.Imaginary < 0 || (root.Imaginary == 0 && root.Real < 0) ? -root : root;
    }

    /// <summary>Makes the sums 0 to <paramref name="top"/> ready.</summary>
    public void Prepare(GratingWaves waves, int top) => Prepare(waves, top, findsGrazing: true, []);

    /// <summary>Makes the sums 0 to <paramref name="top"/> ready, with the orders to be left out given: they must hold all that graze.</summary>
    public void Prepare(GratingWaves waves, int top, ReadOnlySpan<int> grazingOrders) => Prepare(waves, top, findsGrazing: false, grazingOrders);

    private void Prepare(GratingWaves waves, int top, bool findsGrazing, ReadOnlySpan<int> grazingOrders)
    {
        bool same = _k0 == waves.K0 && _kx0 == waves.Kx0 && _periodNm == waves.PeriodNm && _across == waves.MatrixAcross;
        if (same && top <= _top && (findsGrazing || grazingOrders.SequenceEqual(GrazingOrders)))
            return;
        (_k0, _kx0, _periodNm, _across, _top) = (waves.K0, waves.Kx0, waves.PeriodNm, waves.MatrixAcross, top);
        if (_sums.Length <= top)
        {
            _sums = new Complex[top + 1];
            _bernoulli = new double[top + 1];
        }
        K = WaveNumber(waves, waves.Matrix);
        if (!findsGrazing)
        {
            grazingOrders.CopyTo(_grazingOrders);
            _grazingCount = grazingOrders.Length;
        }
        Sum(waves, findsGrazing);
    }

    private void Sum(GratingWaves waves, bool findsGrazing)
    {
        Array.Clear(_sums);
        double turns = waves.Kx0 * waves.PeriodNm / (2 * Math.PI);
        int shift = (int)Math.Round(turns);
        // The mirror image is summed where that makes the fraction positive; odd sums then change sign.
        int side = turns < shift ? -1 : 1;
        double fraction = Math.Abs(turns - shift);
        double size = Complex.Abs(K);
        int terms = Math.Max(LeastTerms, 2 + (int)(6 * size * waves.PeriodNm / (2 * Math.PI)));
        if (findsGrazing)
            FindGrazing(waves, shift, terms);
        for (int n = -terms + 1; n < terms; n++)
            AddOrder(waves, side * n - shift, n >= 0, side);
        AddTail(_tailAbove, waves.PeriodNm, terms + fraction, 1);
        AddTail(_tailBelow, waves.PeriodNm, terms - fraction, -1);
        AddPowers(waves.PeriodNm, fraction);
        if (side < 0)
        {
            for (int p = 1; p <= _top; p += 2)
                _sums[p] = -_sums[p];
        }
    }

    private void FindGrazing(GratingWaves waves, int shift, int terms)
    {
        _grazingCount = 0;
        double limit = Grazing * Complex.Abs(K);
        for (int n = -terms - shift; n <= terms - shift && _grazingCount < MostGrazing; n++)
        {
            if (Complex.Abs(waves.KzIn(waves.Matrix, n)) < limit)
                _grazingOrders[_grazingCount++] = n;
        }
    }

    // Adds 2 u^p/(P kz), of a grazing order only the part i U_(p-1)/k of u^p/kz = T_p/kz + i U_(p-1)/k.
    private void AddOrder(GratingWaves waves, int order, bool above, int side)
    {
        double kx = side * waves.KxOf(order), half = Complex.Abs(K) * waves.PeriodNm / 2;
        Complex kz = waves.KzIn(waves.Matrix, order);
        if (GrazingOrders.Contains(order))
        {
            AddGrazing(kx / K, half, (above ? 2 : -2) * Complex.ImaginaryOne / (waves.PeriodNm * K));
            return;
        }
        // u = (kx + i kz)/k, written so that nothing cancels for evanescent orders.
        Complex step = half * K / (Math.Abs(kx) - Complex.ImaginaryOne * kz);
        if (!above)
            step = -step;
        Complex term = 2 / (waves.PeriodNm * kz);
        double stop = 1e-19 * Math.Min(1, term.Magnitude);
        for (int p = 0; p <= _top; p++)
        {
            if (p > 0)
                term *= step / p;
            _sums[p] += term;
            if (Math.Abs(term.Real) + Math.Abs(term.Imaginary) < stop)
                break;
        }
    }

    private void AddGrazing(Complex t, double half, Complex weight)
    {
        Complex before = Complex.Zero, value = half * weight;
        for (int p = 1; p <= _top; p++)
        {
            _sums[p] += value;
            (before, value) = (value, 2 * half / (p + 1) * t * value - half * half / (p * (p + 1.0)) * before);
        }
    }

    // u^p/sqrt(t^2 - 1) = sum over j of 2 binomial(p + 2 j, j) (2 t)^-(p + 1 + 2 j), summed over the orders from a on.
    private void AddTail(LatticeTail tail, double periodNm, double start, int side)
    {
        tail.Set(start);
        double half = Complex.Abs(K) * periodNm / 2;
        Complex x = K * periodNm / (4 * Math.PI * start), square = x * x;
        Complex leading = 4 * x / (Complex.ImaginaryOne * K * periodNm);
        for (int p = 0; p <= _top; p++)
        {
            if (p > 0)
                leading *= side * half / p * x;
            if (Math.Abs(leading.Real) + Math.Abs(leading.Imaginary) < 1e-19)
                break;
            Complex sum = Complex.Zero, factor = Complex.One;
            for (int j = 0; p + 1 + 2 * j <= LatticeTail.MostPower; j++)
            {
                sum += tail.ScaledSum(p + 1 + 2 * j) * factor;
                factor *= (p + 2 * j + 1.0) * (p + 2 * j + 2.0) / ((j + 1.0) * (p + j + 1.0)) * square;
                if (Math.Abs(factor.Real) + Math.Abs(factor.Imaginary) < 1e-18)
                    break;
            }
            _sums[p] += leading * sum;
        }
    }

    // What the sums of powers give: (i/pi) sum over j of (-1)^j (p - 1 - j)!/j! (2/(k P))^(p - 2 j) (2 pi)^(p - 2 j) B_(p - 2 j)/(p - 2 j)!,
    // and 2 i^(1 - p)/(pi p) for even p, which the rod's own field leaves.
    private void AddPowers(double periodNm, double fraction)
    {
        FillBernoulli(2 * Math.PI * fraction);
        double half = Complex.Abs(K) * periodNm / 2;
        Complex turn = Complex.Conjugate(K) / Complex.Abs(K), turnPower = Complex.One, back = Complex.One / (turn * turn);
        _sums[0] += -1 - new Complex(0, 2 / Math.PI) * Complex.Log(K * periodNm / (4 * Math.PI));
        double evenShare = 2;
        for (int p = 1; p <= _top; p++)
        {
            turnPower *= turn;
            evenShare *= half / p;
            Complex sum = Complex.Zero, phase = turnPower;
            double factor = 1.0 / p;
            for (int j = 0; 2 * j < p; j++)
            {
                sum += factor * _bernoulli[p - 2 * j] * phase;
                factor *= -half * half / ((j + 1.0) * (p - 1 - j));
                phase *= back;
            }
            if (p % 2 == 0)
                sum += evenShare * (p % 4 == 0 ? 1 : -1) / p;
            _sums[p] += new Complex(-sum.Imaginary / Math.PI, sum.Real / Math.PI);
        }
    }

    // (2 pi)^n B_n(x)/n! = sum over k of (2 pi)^k B_k/k! (2 pi x)^(n - k)/(n - k)!, for 2 pi x from 0 to pi.
    private void FillBernoulli(double angle)
    {
        double power = 1;
        for (int n = 0; n <= _top; n++)
        {
            if (n > 0)
                power *= angle / n;
            _bernoulli[n] = power;
        }
        for (int n = _top; n >= 1; n--)
        {
            double sum = _bernoulli[n] - Math.PI * _bernoulli[n - 1];
            for (int k = 2; k <= n; k += 2)
                sum += EvenBernoulli(k) * _bernoulli[n - k];
            _bernoulli[n] = sum;
        }
    }

    // (2 pi)^k B_k/k! = -2 (-1)^(k/2) zeta(k).
    internal static double EvenBernoulli(int k) => (k % 4 == 0 ? -2 : 2) * (k / 2 < Zeta.Length ? Zeta[k / 2] : 1 + Math.Pow(2, -k));

    // zeta(0), zeta(2), zeta(4), ...
    private static readonly double[] Zeta = MakeZeta();

    private static double[] MakeZeta()
    {
        var zeta = new double[28];
        zeta[1] = Math.PI * Math.PI / 6;
        for (int i = 2; i < zeta.Length; i++)
        {
            for (int n = 60; n >= 1; n--)
                zeta[i] += Math.Pow(n, -2 * i);
        }
        zeta[2] = Math.Pow(Math.PI, 4) / 90;
        zeta[3] = Math.Pow(Math.PI, 6) / 945;
        zeta[4] = Math.Pow(Math.PI, 8) / 9450;
        return zeta;
    }
}
