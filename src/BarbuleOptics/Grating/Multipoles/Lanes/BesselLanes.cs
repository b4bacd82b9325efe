using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Grating.Multipoles.Lanes;

/// <summary>Bessel functions J_m and Hankel functions H_m of the first kind for several complex arguments at once, m = 0, 1, ..., unscaled.</summary>
/// <remarks>
/// J by Miller's backward recurrence, normalized with exp(-iz) = J_0 + 2 sum (-i)^m J_m, whose terms do not cancel for Im z >= 0; Y_0 and Y_1 by Neumann's
/// series, H upward from them. <see cref="CylinderFunctions"/> is the readable form, with its sources; agreement with it is tested.
/// For moderate arguments only, see <see cref="Covers"/>: Neumann's series loses exp(2 Im z) units in the last place.
/// </remarks>
internal static class BesselLanes
{
    /// <summary>Largest |z| for which the functions were tested.</summary>
    public const double MostArgument = 12;

    /// <summary>Largest Im z: three digits are lost there.</summary>
    public const double MostDecay = 3;

    private const double EulerGamma = 0.57721566490153286061;

    /// <summary>Whether all arguments lie where the functions are right to 1e-12 of |J_m| + |H_m|.</summary>
    public static bool Covers<TLanes>(ComplexLanes<TLanes> z)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes tooLarge = TLanes.LessThan(TLanes.Broadcast(MostArgument * MostArgument), z.Norm);
        TLanes tooLossy = TLanes.LessThan(TLanes.Broadcast(MostDecay), z.Imaginary);
        return !TLanes.Any(tooLarge) && !TLanes.Any(tooLossy);
    }

    /// <summary>Fills J_0 to J_most and H_0 to H_most.</summary>
    /// <param name="z">Arguments; none of them 0.</param>
    /// <param name="size">The largest |z| over the lanes, or a little more.</param>
    /// <param name="most">Largest order, 1 at least.</param>
    /// <param name="j">Receives most + 1 complex values.</param>
    /// <param name="h">The same for H; a null reference where only J is wanted.</param>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void Fill<TLanes>(ComplexLanes<TLanes> z, double size, int most, ref double j, ref double h)
        where TLanes : struct, ILanes<TLanes>
    {
        int stride = ComplexLanes<TLanes>.Stride;
        ComplexLanes<TLanes> inverse = z.Reciprocal();
        ComplexLanes<TLanes> twice = inverse + inverse;
        // Beyond this order J is below 1e-17, so that the normalization misses nothing.
        int start = Math.Max(most + 9, (int)(size + 4 + 12 * Math.Cbrt(size)));
        ComplexLanes<TLanes> above = ComplexLanes<TLanes>.Broadcast(0), value = ComplexLanes<TLanes>.Broadcast(1e-100);
        // Sums of J over m mod 4, whose turns by (-i)^m are applied at the end, and those of Neumann's series of Y_0 and Y_1.
        ComplexLanes<TLanes> evenTotal = above, oddTotal = above, even = above, odd = above;
        for (int m = start; m > 0; m--)
        {
            if (m <= most)
                ComplexLanes<TLanes>.Store(value, ref Unsafe.Add(ref j, m * stride));
            double sign = (m >> 1) % 2 == 0 ? 1 : -1;
            int k = m >> 1;
            TLanes turn = TLanes.Broadcast(sign);
            if (m % 2 == 0)
            {
                evenTotal += turn * value;
                even += TLanes.Broadcast(sign / k) * value;
            }
            else
            {
                oddTotal += turn * value;
                if (m > 1)
                    odd += TLanes.Broadcast(sign * m / (k * (k + 1.0))) * value;
            }
            (above, value) = (value, TLanes.Broadcast(m) * (twice * value) - above);
        }

        // exp(-iz) = J_0 + 2 (sum of even m of (-1)^(m/2) J_m - i sum of odd m of (-1)^((m-1)/2) J_m).
        ComplexLanes<TLanes> total = value + TLanes.Broadcast(2) * (evenTotal - oddTotal.TimesI);
        ComplexLanes<TLanes> scale = (-z).ExpI() * total.Reciprocal();
        ComplexLanes<TLanes> j0 = value * scale;
        ComplexLanes<TLanes>.Store(j0, ref j);
        for (int m = 1; m <= most; m++)
        {
            ref double at = ref Unsafe.Add(ref j, m * stride);
            ComplexLanes<TLanes>.Store(ComplexLanes<TLanes>.Load(ref at) * scale, ref at);
        }

        if (Unsafe.IsNullRef(ref h))
            return;
        ComplexLanes<TLanes> j1 = ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref j, stride));
        ComplexLanes<TLanes> logarithm = new(
            TLanes.Broadcast(0.5) * TLanes.Log(z.Norm) + TLanes.Broadcast(EulerGamma - 0.69314718055994530942), Argument(z));
        TLanes twoOverPi = TLanes.Broadcast(2 / Math.PI);
        ComplexLanes<TLanes> y0 = twoOverPi * (logarithm * j0 - TLanes.Broadcast(2) * (even * scale));
        ComplexLanes<TLanes> y1 = twoOverPi * ((logarithm - ComplexLanes<TLanes>.Broadcast(1)) * j1 - j0 * inverse - odd * scale);
        ComplexLanes<TLanes> below = j0 + y0.TimesI, next = j1 + y1.TimesI;
        ComplexLanes<TLanes>.Store(below, ref h);
        ComplexLanes<TLanes>.Store(next, ref Unsafe.Add(ref h, stride));
        for (int m = 1; m < most; m++)
        {
            (below, next) = (next, TLanes.Broadcast(m) * (twice * next) - below);
            ComplexLanes<TLanes>.Store(next, ref Unsafe.Add(ref h, (m + 1) * stride));
        }
    }

    // The angle of z from the real axis, 0 to pi/2, by asin-free means: atan of the ratio through its half angles.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static TLanes Argument<TLanes>(ComplexLanes<TLanes> z)
        where TLanes : struct, ILanes<TLanes>
    {
        // tan(a/4) by halving the angle twice, |.| < 0.2 for angles up to pi/2 and a bit; then the series of atan.
        TLanes one = TLanes.Broadcast(1);
        TLanes t = z.Imaginary / (TLanes.Sqrt(z.Norm) + z.Real);
        t = t / (one + TLanes.Sqrt(TLanes.MultiplyAdd(t, t, one)));
        t = t / (one + TLanes.Sqrt(TLanes.MultiplyAdd(t, t, one)));
        TLanes square = t * t;
        TLanes sum = TLanes.Broadcast(1.0 / 23);
        for (int n = 21; n >= 1; n -= 2)
            sum = TLanes.SubtractProduct(square, sum, TLanes.Broadcast(1.0 / n));
        return TLanes.Broadcast(8) * (t * sum);
    }
}
