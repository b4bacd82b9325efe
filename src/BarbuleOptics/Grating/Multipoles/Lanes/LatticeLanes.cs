using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Grating.Multipoles.Lanes;

/// <summary>The sums of <see cref="LatticeSums"/> for one wavelength a lane, by the same split into a convergent sum, inverse powers and
/// Bernoulli polynomials.</summary>
/// <remarks>No order is left out: lanes where one grazes are told by <see cref="LeastDepth"/>, and lose digits like the square of its inverse.
/// Elsewhere right to rounding.</remarks>
internal sealed class LatticeLanes<TLanes>
    where TLanes : struct, ILanes<TLanes>
{
    private const int LeastTerms = 12;
    private const double Negligible = 1e-19;

    private readonly LaneBuffer<TLanes> _sums = new();
    private readonly LaneBuffer<TLanes> _reals = new();
    private readonly TailLanes<TLanes> _tailAbove = new();
    private readonly TailLanes<TLanes> _tailBelow = new();
    private int _top;

    /// <summary>C_p (|k| P/2)^p / p!.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ComplexLanes<TLanes> Sum(int p) => _sums[p];

    /// <summary>Least |kz|^2/|k|^2 of an order.</summary>
    public TLanes LeastDepth { get; private set; }

    /// <summary>Finds the sums.</summary>
    /// <param name="k">Wave number in the matrix, in 1/nm.</param>
    /// <param name="turns">kx0 P/(2 pi).</param>
    /// <param name="periodNm">The period P, in nm.</param>
    /// <param name="largest">Largest |k| of any lane, in 1/nm.</param>
    /// <param name="top">Largest p.</param>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void Set(ComplexLanes<TLanes> k, TLanes turns, double periodNm, double largest, int top)
    {
        _top = top;
        _sums.Reserve(top + 1);
        _reals.Reserve(top + 2);
        _sums.Clear(top + 1);
        TLanes signed = turns - TLanes.Round(turns), fraction = TLanes.Abs(signed);
        TLanes half = TLanes.Broadcast(periodNm / 2) * TLanes.Sqrt(k.Norm);
        double largestHalf = largest * periodNm / 2;
        int terms = Math.Max(LeastTerms, 2 + (int)(12 * largestHalf / (2 * Math.PI)));
        LeastDepth = TLanes.Broadcast(double.MaxValue);
        for (int n = -terms + 1; n < terms; n++)
            AddOrder(k, fraction + TLanes.Broadcast(n), half, n, periodNm, largestHalf);
        LeastDepth /= k.Norm;
        double most = largestHalf / (2 * Math.PI * (terms - 0.5));
        AddTail(_tailAbove, k, TLanes.Broadcast(terms) + fraction, half, periodNm, largestHalf, most, 1);
        AddTail(_tailBelow, k, TLanes.Broadcast(terms) - fraction, half, periodNm, largestHalf, most, -1);
        AddPowers(k, fraction, half, periodNm);
        // The mirror image was summed where that makes the fraction positive.
        TLanes mirrored = TLanes.LessThan(signed, TLanes.Broadcast(0));
        for (int p = 1; p <= top; p += 2)
            _sums[p] = ComplexLanes<TLanes>.Select(mirrored, -_sums[p], _sums[p]);
    }

    // 2 u^p/(P kz), u = (kx + i kz)/k, as k/(|kx| - i kz) up to sign.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void AddOrder(ComplexLanes<TLanes> k, TLanes number, TLanes half, int n, double periodNm, double largestHalf)
    {
        TLanes kx = TLanes.Broadcast(2 * Math.PI / periodNm) * number, size = TLanes.Abs(kx);
        ComplexLanes<TLanes> along = new(size, TLanes.Broadcast(0));
        ComplexLanes<TLanes> kz = ((k - along) * (k + along)).PassiveRoot();
        LeastDepth = TLanes.Min(LeastDepth, kz.Norm);
        ComplexLanes<TLanes> step = half * (k * new ComplexLanes<TLanes>(size + kz.Imaginary, -kz.Real).Reciprocal());
        if (n < 0)
            step = -step;
        ComplexLanes<TLanes> term = TLanes.Broadcast(2 / periodNm) * kz.Reciprocal();
        _sums[0] += term;
        // No |u| is above |k|/|kx|, nor above one where the order travels.
        double near = (n < 0 ? -n - 0.5 : n) * 2 * Math.PI, bound = 1, grows = largestHalf * Math.Min(1, 2 * largestHalf / Math.Max(near, 1e-3));
        if (near < 4 * largestHalf)
            grows = largestHalf;
        for (int p = 1; p <= _top; p++)
        {
            term = TLanes.Broadcast(1.0 / p) * (step * term);
            _sums[p] += term;
            bound *= grows / p;
            if (bound < Negligible)
                break;
        }
    }

    // The two last numbers bound half and x = half/(2 pi start).
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void AddTail(
        TailLanes<TLanes> tail, ComplexLanes<TLanes> k, TLanes start, TLanes half, double periodNm, double largestHalf, double largestX, int side)
    {
        int most = PowersFor(largestX);
        tail.Set(start, most);
        TLanes inverse = TLanes.Broadcast(1) / start;
        ComplexLanes<TLanes> x = TLanes.Broadcast(periodNm / (4 * Math.PI)) * inverse * k, square = x * x;
        // 4 x/(i k P) = 1/(i pi start).
        var leading = new ComplexLanes<TLanes>(TLanes.Broadcast(0), TLanes.Broadcast(-1 / Math.PI) * inverse);
        double bound = 1;
        for (int p = 0; p <= _top; p++)
        {
            if (p > 0)
            {
                leading = TLanes.Broadcast((double)side / p) * half * (x * leading);
                bound *= largestHalf * largestX / p;
                if (bound < Negligible)
                    break;
            }
            ComplexLanes<TLanes> sum = ComplexLanes<TLanes>.Broadcast(0), factor = ComplexLanes<TLanes>.Broadcast(1);
            double share = 1;
            for (int j = 0; p + 1 + 2 * j <= most; j++)
            {
                sum += tail.ScaledSum(p + 1 + 2 * j) * factor;
                double ratio = (p + 2 * j + 1.0) * (p + 2 * j + 2.0) / ((j + 1.0) * (p + j + 1.0));
                factor = TLanes.Broadcast(ratio) * (factor * square);
                share *= ratio * largestX * largestX;
                if (share < 1e-18)
                    break;
            }
            _sums[p] += leading * sum;
        }
    }

    // Terms fall like (4 x^2)^j.
    private int PowersFor(double largestX)
        => Math.Min(TailLanes<TLanes>.MostPower, _top + 3 + 2 * (int)(Math.Log(1e-18) / Math.Log(Math.Min(0.2, 4 * largestX * largestX)) * 1.3));

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void AddPowers(ComplexLanes<TLanes> k, TLanes fraction, TLanes half, double periodNm)
    {
        FillBernoulli(TLanes.Broadcast(2 * Math.PI) * fraction);
        TLanes inverse = TLanes.Broadcast(periodNm / 2) / half;
        ComplexLanes<TLanes> turn = inverse * k.Conjugate, power = ComplexLanes<TLanes>.Broadcast(1), back = (turn * turn).Conjugate;
        // -1 - (2 i/pi) log(k P/(4 pi)).
        TLanes share = TLanes.Broadcast(2 / Math.PI);
        TLanes angle = Angle(k);
        _sums[0] += new ComplexLanes<TLanes>(
            TLanes.MultiplyAdd(share, angle, TLanes.Broadcast(-1)), -share * TLanes.Log(half * TLanes.Broadcast(1 / (2 * Math.PI))));
        TLanes square = half * half, evenShare = TLanes.Broadcast(2), scale = TLanes.Broadcast(1 / Math.PI);
        for (int p = 1; p <= _top; p++)
        {
            power *= turn;
            evenShare *= half * TLanes.Broadcast(1.0 / p);
            ComplexLanes<TLanes> sum = ComplexLanes<TLanes>.Broadcast(0), phase = power;
            TLanes factor = TLanes.Broadcast(1.0 / p);
            for (int j = 0; 2 * j < p; j++)
            {
                sum += factor * _reals.Real(p - 2 * j) * phase;
                factor *= square * TLanes.Broadcast(-1 / ((j + 1.0) * Math.Max(1, p - 1 - j)));
                phase *= back;
            }
            if (p % 2 == 0)
                sum += new ComplexLanes<TLanes>(evenShare * TLanes.Broadcast((p % 4 == 0 ? 1.0 : -1.0) / p), TLanes.Broadcast(0));
            _sums[p] += scale * sum.TimesI;
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static TLanes Angle(ComplexLanes<TLanes> k)
    {
        if (!TLanes.Any(TLanes.LessThan(TLanes.Broadcast(0), k.Imaginary)))
            return TLanes.Broadcast(0);
        Span<double> parts = stackalloc double[2 * TLanes.Count];
        ComplexLanes<TLanes>.Store(k, ref parts[0]);
        for (int lane = 0; lane < TLanes.Count; lane++)
            parts[lane] = Math.Atan2(parts[lane + TLanes.Count], parts[lane]);
        return TLanes.Load(in parts[0]);
    }

    // (2 pi)^n B_n(x)/n!.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void FillBernoulli(TLanes angle)
    {
        TLanes power = TLanes.Broadcast(1);
        for (int n = 0; n <= _top; n++)
        {
            if (n > 0)
                power *= angle * TLanes.Broadcast(1.0 / n);
            _reals.SetReal(n, power);
        }
        for (int n = _top; n >= 1; n--)
        {
            TLanes sum = TLanes.SubtractProduct(TLanes.Broadcast(Math.PI), _reals.Real(n - 1), _reals.Real(n));
            for (int k = 2; k <= n; k += 2)
                sum = TLanes.MultiplyAdd(TLanes.Broadcast(LatticeSums.EvenBernoulli(k)), _reals.Real(n - k), sum);
            _reals.SetReal(n, sum);
        }
    }
}
