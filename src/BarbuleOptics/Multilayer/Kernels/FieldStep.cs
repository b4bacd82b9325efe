using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Multilayer.Kernels;

/// <summary>What a film does to the fields at a vector of wavelengths, in memory; the formulas stand in <see cref="FilmStep"/>.</summary>
internal static class FieldStep
{
    /// <summary>Vectors that a film takes.</summary>
    public const int Values = 11;

    public const int Kept = 0, Same = 1, PhiToPsi = 3, PsiToPhi = 5, PhiEntering = 7, PsiEntering = 8, PhiLost = 9, PsiLost = 10;

    /// <summary>Phases above this, in radians, are taken by the sine and cosine that the reference solver takes, so that both round alike.</summary>
    private const double MostTurn = 64;

    // 1/(2 n + 1)!
    private static ReadOnlySpan<double> InverseFactorials =>
        [1.0 / 6, 1.0 / 120, 1.0 / 5040, 1.0 / 362880, 1.0 / 39916800, 1.0 / 6227020800, 1.0 / 1307674368000, 1.0 / 355687428096000];

    /// <summary>Fills a film's place.</summary>
    /// <param name="medium">Its medium, filled by <see cref="FieldMedium"/>.</param>
    /// <param name="isLossy">Whether the medium takes up power.</param>
    /// <param name="thickness">k0 d.</param>
    /// <param name="inverseThickness">1/(k0 d).</param>
    /// <param name="place">Where to write.</param>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void Fill<TLanes>(ref double medium, bool isLossy, TLanes thickness, TLanes inverseThickness, ref double place)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes zero = TLanes.Broadcast(0), one = TLanes.Broadcast(1), half = TLanes.Broadcast(0.5), two = TLanes.Broadcast(2);
        TLanes turn = Read<TLanes>(ref medium, FieldMedium.Depth) * thickness, decay = Read<TLanes>(ref medium, FieldMedium.Depth + 1) * thickness;
        (TLanes kept, TLanes faded) = Decay(decay);
        (TLanes sine, TLanes cosine) = HalfTurn(turn);
        TLanes swing = two * kept * sine * cosine;
        var change = new ComplexLanes<TLanes>(half * TLanes.MultiplyAdd(two * kept * sine, sine, faded), -half * swing);
        TLanes spent = faded * (one + kept);
        ComplexLanes<TLanes> admittance = ReadComplex<TLanes>(ref medium, FieldMedium.Admittance);
        TLanes traveling = half * admittance.Real * spent, standing = admittance.Imaginary * swing;

        Write(kept * kept, ref place, Kept);
        Write(new ComplexLanes<TLanes>(one, zero) - change, ref place, Same);
        Write(change * admittance, ref place, PhiToPsi);
        Write(change * ReadComplex<TLanes>(ref medium, FieldMedium.Inverse), ref place, PsiToPhi);
        Write(TLanes.Max(zero, traveling + standing), ref place, PhiEntering);
        Write(TLanes.Max(zero, traveling - standing) * Read<TLanes>(ref medium, FieldMedium.InverseNorm), ref place, PsiEntering);
        if (!isLossy)
        {
            Write(zero, ref place, PhiLost);
            Write(zero, ref place, PsiLost);
            return;
        }
        TLanes a = half * spent * Read<TLanes>(ref medium, FieldMedium.InverseDepth + 1) * inverseThickness;
        a = TLanes.Select(TLanes.LessThan(zero, decay), a, one);
        TLanes b = swing * Read<TLanes>(ref medium, FieldMedium.InverseDepth) * inverseThickness;
        b = TLanes.Select(TLanes.LessThan(zero, TLanes.Abs(turn)), b, kept);
        TLanes norm = Read<TLanes>(ref medium, FieldMedium.Norm), size = TLanes.MultiplyAdd(turn, turn, decay * decay);
        TLanes odd = (a - b) * norm, oddOverAdmittance = (a - b) * Read<TLanes>(ref medium, FieldMedium.InverseNorm);
        TLanes isThin = TLanes.LessThan(size, one);
        if (TLanes.Any(isThin))
        {
            TLanes gap = kept * SincGap(turn * turn, decay * decay);
            odd = TLanes.Select(isThin, gap * size * norm, odd);
            oddOverAdmittance = TLanes.Select(isThin, gap * thickness * thickness * Read<TLanes>(ref medium, FieldMedium.RatioNorm), oddOverAdmittance);
        }
        TLanes phiLoss = half * thickness * Read<TLanes>(ref medium, FieldMedium.PhiLoss), psiLoss = half * thickness * Read<TLanes>(ref medium, FieldMedium.PsiLoss);
        Write(TLanes.MultiplyAdd(phiLoss, a + b, psiLoss * odd), ref place, PhiLost);
        Write(TLanes.MultiplyAdd(phiLoss, oddOverAdmittance, psiLoss * (a + b)), ref place, PsiLost);
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static (TLanes Sine, TLanes Cosine) HalfTurn<TLanes>(TLanes turn)
        where TLanes : struct, ILanes<TLanes>
    {
        if (TLanes.Any(TLanes.LessThan(TLanes.Broadcast(MostTurn), TLanes.Abs(turn))))
            return TLanes.SinCos(TLanes.Broadcast(0.5) * turn);
        ComplexLanes<TLanes> half = TLanes.Turn(turn, TLanes.Broadcast(0.25 / Math.PI));
        return (half.Imaginary, half.Real);
    }

    // exp(-x) and 1 - exp(-x), each to its own last digits: below 1/2 the second is x times a polynomial (Chebyshev nodes, error below 1e-16 of it).
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static (TLanes Kept, TLanes Faded) Decay<TLanes>(TLanes x)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes zero = TLanes.Broadcast(0), one = TLanes.Broadcast(1);
        if (!TLanes.Any(TLanes.LessThan(zero, x)))
            return (one, zero);
        TLanes sum = TLanes.Broadcast(-2.1985703840083692e-07);
        sum = TLanes.MultiplyAdd(sum, x, TLanes.Broadcast(2.6988592921217972e-06));
        sum = TLanes.MultiplyAdd(sum, x, TLanes.Broadcast(-2.4768788096264572e-05));
        sum = TLanes.MultiplyAdd(sum, x, TLanes.Broadcast(0.0001984011727676172));
        sum = TLanes.MultiplyAdd(sum, x, TLanes.Broadcast(-0.0013888863717021528));
        sum = TLanes.MultiplyAdd(sum, x, TLanes.Broadcast(0.008333332997835102));
        sum = TLanes.MultiplyAdd(sum, x, TLanes.Broadcast(-0.041666666640941714));
        sum = TLanes.MultiplyAdd(sum, x, TLanes.Broadcast(0.16666666666566382));
        sum = TLanes.MultiplyAdd(sum, x, TLanes.Broadcast(-0.49999999999998485));
        sum = TLanes.MultiplyAdd(sum, x, TLanes.Broadcast(1));
        TLanes faded = x * sum, kept = one - faded;
        TLanes isLong = TLanes.LessThan(TLanes.Broadcast(0.5), x);
        if (!TLanes.Any(isLong))
            return (kept, faded);
        TLanes exponential = TLanes.Exp(-x);
        return (TLanes.Select(isLong, exponential, kept), TLanes.Select(isLong, one - exponential, faded));
    }

    // See StableFunctions.SincGap.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static TLanes SincGap<TLanes>(TLanes uSquared, TLanes vSquared)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes sum = vSquared - uSquared, product = uSquared * vSquared, previous = TLanes.Broadcast(0), current = TLanes.Broadcast(1);
        TLanes total = TLanes.Broadcast(InverseFactorials[0]);
        for (int n = 1; n < InverseFactorials.Length; n++)
        {
            (previous, current) = (current, TLanes.MultiplyAdd(sum, current, product * previous));
            total = TLanes.MultiplyAdd(current, TLanes.Broadcast(InverseFactorials[n]), total);
        }
        return total;
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static TLanes Read<TLanes>(ref double place, int at)
        where TLanes : struct, ILanes<TLanes>
        => TLanes.Load(in Unsafe.Add(ref place, at * TLanes.Count));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static ComplexLanes<TLanes> ReadComplex<TLanes>(ref double place, int at)
        where TLanes : struct, ILanes<TLanes>
        => ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref place, at * TLanes.Count));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Write<TLanes>(TLanes value, ref double place, int at)
        where TLanes : struct, ILanes<TLanes>
        => TLanes.Store(value, ref Unsafe.Add(ref place, at * TLanes.Count));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Write<TLanes>(in ComplexLanes<TLanes> value, ref double place, int at)
        where TLanes : struct, ILanes<TLanes>
        => ComplexLanes<TLanes>.Store(value, ref Unsafe.Add(ref place, at * TLanes.Count));
}
