using System.Numerics;
using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Grating.Multipoles.Lanes;

/// <summary>Bessel and Hankel functions of one complex argument a lane, on the scale of <see cref="CylinderFunctions"/> and by the same
/// recurrences.</summary>
/// <remarks>Lanes whose argument is too large or too imaginary for Neumann's series take their H_0 and H_1 from the scalar code.
/// Relative error below 1e-13 for |z| up to 100.</remarks>
internal sealed class CylinderLanes<TLanes>
    where TLanes : struct, ILanes<TLanes>
{
    private const double EulerGamma = 0.57721566490153286061;
    private const double MostSeriesHalf = 4;
    private const double MostSeriesImaginary = 1;

    private readonly CylinderFunctions _scalar = new();
    private readonly LaneBuffer<TLanes> _j = new();
    private readonly LaneBuffer<TLanes> _zj = new();
    private readonly LaneBuffer<TLanes> _h = new();
    private readonly LaneBuffer<TLanes> _zh = new();
    private readonly LaneBuffer<TLanes> _parts = new();

    public CylinderLanes() => _parts.Reserve(3);

    /// <summary>Orders that the recurrence is begun for: tables of equal room agree to the last digit.</summary>
    public static int RoomFor(int most) => (most | 15) + 1;

    /// <summary>J_m(z) m!/s^m exp(-Im z).</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ComplexLanes<TLanes> J(int m) => _j[m];

    /// <summary>z J_m'(z) on that scale.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ComplexLanes<TLanes> JSlope(int m) => _zj[m];

    /// <summary>H_m(z) s^m/m! exp(Im z).</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ComplexLanes<TLanes> H(int m) => _h[m];

    /// <summary>z H_m'(z) on that scale.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ComplexLanes<TLanes> HSlope(int m) => _zh[m];

    /// <summary>Fills the functions for orders 0 to <paramref name="most"/>; H only where it is asked for.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void Set(ComplexLanes<TLanes> z, int most, bool hasOutgoing)
    {
        _j.Reserve(most + 2);
        _zj.Reserve(most + 2);
        TLanes size = TLanes.Sqrt(z.Norm), s = TLanes.Broadcast(0.5) * size;
        (ComplexLanes<TLanes> even, ComplexLanes<TLanes> odd) = FillRegular(z, size, most);
        if (!hasOutgoing)
            return;
        _h.Reserve(most + 2);
        _zh.Reserve(most + 2);
        StartFromSeries(z, s, even, odd);
        ReplaceUnfit(z, s);
        FillUpward(z, s, most);
    }

    // Backward recurrence, normalized by exp(-iz); returns the sums of Neumann's series of Y_0 and Y_1.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private (ComplexLanes<TLanes> Even, ComplexLanes<TLanes> Odd) FillRegular(ComplexLanes<TLanes> z, TLanes size, int most)
    {
        TLanes s = TLanes.Broadcast(0.5) * size, square = s * s;
        ComplexLanes<TLanes> turn = TLanes.Broadcast(1) / size * z.Conjugate;
        double largest = Largest(size);
        int start = Math.Max(RoomFor(most) + 9, (int)(largest + 4 + 12 * Math.Cbrt(largest)));
        ComplexLanes<TLanes> above = ComplexLanes<TLanes>.Broadcast(0), value = ComplexLanes<TLanes>.Broadcast(1e-30);
        ComplexLanes<TLanes> total = above, even = above, odd = above;
        for (int m = start; m >= 0; m--)
        {
            TLanes step = s * TLanes.Broadcast(1.0 / (m + 1));
            total = new(TLanes.MultiplyAdd(total.Imaginary, step, value.Real), TLanes.SubtractProduct(total.Real, step, value.Imaginary));
            double sign = (m >> 1) % 2 == 0 ? 1 : -1, k = m >> 1;
            even = step * even;
            odd = step * odd;
            if (m % 2 == 0 && m > 0)
                even += TLanes.Broadcast(sign / k) * value;
            else if (m > 1)
                odd += TLanes.Broadcast(sign * m / (k * (k + 1))) * value;
            if (m <= most + 1)
                _j[m] = value;
            if (m > 0)
                (above, value) = (value, turn * value - square * TLanes.Broadcast(1 / (m * (m + 1.0))) * above);
        }
        ComplexLanes<TLanes> phase = new ComplexLanes<TLanes>(-z.Real, TLanes.Broadcast(0)).ExpI();
        ComplexLanes<TLanes> scale = phase * (TLanes.Broadcast(2) * total - _j[0]).Reciprocal();
        for (int m = 0; m <= most + 1; m++)
            _j[m] = scale * _j[m];
        for (int m = 0; m <= most; m++)
            _zj[m] = TLanes.Broadcast(m) * _j[m] - s * TLanes.Broadcast(1.0 / (m + 1)) * (z * _j[m + 1]);
        return (scale * even, scale * odd);
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void StartFromSeries(ComplexLanes<TLanes> z, TLanes s, ComplexLanes<TLanes> even, ComplexLanes<TLanes> odd)
    {
        TLanes share = TLanes.Broadcast(2 / Math.PI);
        var logarithm = new ComplexLanes<TLanes>(TLanes.Log(s) + TLanes.Broadcast(EulerGamma), Angle(z));
        ComplexLanes<TLanes> j0 = _j[0], j1 = s * _j[1];
        ComplexLanes<TLanes> y0 = share * (logarithm * j0 - TLanes.Broadcast(2) * even);
        ComplexLanes<TLanes> y1 = share * ((logarithm - ComplexLanes<TLanes>.Broadcast(1)) * j1 - j0 * z.Reciprocal() - odd);
        TLanes scale = TLanes.Exp(TLanes.Broadcast(2) * z.Imaginary);
        _h[0] = scale * (j0 + y0.TimesI);
        _h[1] = scale * s * (j1 + y1.TimesI);
    }

    /// <summary>Argument of a complex number, 0 to pi; lane by lane, for few are needed.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private TLanes Angle(ComplexLanes<TLanes> z)
    {
        _parts[0] = z;
        ref double first = ref _parts.At(0);
        for (int lane = 0; lane < TLanes.Count; lane++)
            Unsafe.Add(ref first, lane) = Math.Atan2(Unsafe.Add(ref first, lane + TLanes.Count), Unsafe.Add(ref first, lane));
        return TLanes.Load(in first);
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private double Largest(TLanes values)
    {
        _parts.SetReal(0, values);
        double largest = 0;
        for (int lane = 0; lane < TLanes.Count; lane++)
            largest = Math.Max(largest, Unsafe.Add(ref _parts.RealAt(0), lane));
        // What is not a number ends in nothing finite; any number of terms will do.
        return Math.Min(largest, 1000) is double finite and >= 0 ? finite : 0;
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void ReplaceUnfit(ComplexLanes<TLanes> z, TLanes s)
    {
        TLanes fit = TLanes.Max(s * TLanes.Broadcast(1 / MostSeriesHalf), z.Imaginary * TLanes.Broadcast(1 / MostSeriesImaginary));
        if (!TLanes.Any(TLanes.LessThan(TLanes.Broadcast(1), fit)))
            return;
        _parts[0] = z;
        _parts.SetReal(2, fit);
        for (int lane = 0; lane < TLanes.Count; lane++)
        {
            if (!(Unsafe.Add(ref _parts.RealAt(2), lane) > 1))
                continue;
            _scalar.Set(new Complex(Unsafe.Add(ref _parts.RealAt(0), lane), Unsafe.Add(ref _parts.RealAt(1), lane)), 1);
            for (int m = 0; m < 2; m++)
            {
                Unsafe.Add(ref _h.At(m), lane) = _scalar.H[m].Real;
                Unsafe.Add(ref _h.At(m), lane + TLanes.Count) = _scalar.H[m].Imaginary;
            }
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void FillUpward(ComplexLanes<TLanes> z, TLanes s, int most)
    {
        TLanes inverse = TLanes.Broadcast(1) / s, square = s * s;
        ComplexLanes<TLanes> turn = TLanes.Broadcast(0.5) * inverse * z.Conjugate;
        for (int m = 1; m < most; m++)
            _h[m + 1] = TLanes.Broadcast(m / (m + 1.0)) * (turn * _h[m]) - square * TLanes.Broadcast(1 / (m * (m + 1.0))) * _h[m - 1];
        _zh[0] = -(inverse * (z * _h[1]));
        for (int m = 1; m <= most; m++)
            _zh[m] = s * TLanes.Broadcast(1.0 / m) * (z * _h[m - 1]) - TLanes.Broadcast(m) * _h[m];
    }
}
