using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Multilayer.Kernels;

/// <summary>What a film does to the fields at a vector of wavelengths, in memory; the formulas stand in <see cref="FilmStep"/>.</summary>
internal static class FieldStep
{
    /// <summary>Vectors that a film takes.</summary>
    public const int Values = 11;

    public const int Kept = 0, Same = 1, PhiToPsi = 3, PsiToPhi = 5, PhiEntering = 7, PsiEntering = 8, PhiLost = 9, PsiLost = 10;

    // 1/(4 pi) in two parts, the second times 2 pi.
    private const double TurnsOfHalfRadian = 0.07957747154594767, RestOfHalfRadian = -3.0911193037561055e-17;

    // Where |kz d|^2 is below this everywhere, terms from this one on are below 1e-15 of the sum.
    private const double ThinSize = 0.0625;
    private const int ThinTerms = 5;

    // 1/(2 n + 1)!
    private static ReadOnlySpan<double> InverseFactorials =>
        [1.0 / 6, 1.0 / 120, 1.0 / 5040, 1.0 / 362880, 1.0 / 39916800, 1.0 / 6227020800, 1.0 / 1307674368000, 1.0 / 355687428096000];

    /// <summary>Fills a film's place.</summary>
    /// <param name="medium">Its medium, filled by <see cref="FieldMedium"/>.</param>
    /// <param name="isLossy">Whether the medium takes up power.</param>
    /// <param name="thickness">k0 d.</param>
    /// <param name="place">Where to write.</param>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void Fill<TLanes>(ref double medium, bool isLossy, TLanes thickness, ref double place)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes zero = TLanes.Broadcast(0), one = TLanes.Broadcast(1), half = TLanes.Broadcast(0.5), two = TLanes.Broadcast(2);
        TLanes turn = Read<TLanes>(ref medium, FieldMedium.Depth) * thickness, decay = Read<TLanes>(ref medium, FieldMedium.Depth + 1) * thickness;
        (TLanes kept, TLanes faded, TLanes share) = Decay(decay);
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
        // a and b, and the differences that are small where the film is thin: a - b = |h| (sinh(x")/x" - sin(x')/x').
        TLanes norm = Read<TLanes>(ref medium, FieldMedium.Norm), size = TLanes.MultiplyAdd(turn, turn, decay * decay);
        TLanes gap = kept * SincGap(turn * turn, decay * decay, TLanes.Any(TLanes.LessThan(TLanes.Broadcast(ThinSize), size)) ? InverseFactorials.Length : ThinTerms), a = share * half * (one + kept), difference = gap * size;
        TLanes odd = difference * norm, oddOverAdmittance = gap * thickness * thickness * Read<TLanes>(ref medium, FieldMedium.RatioNorm);
        TLanes isThick = TLanes.LessThan(one, size);
        if (TLanes.Any(isThick))
        {
            TLanes thick = a - swing / turn;
            thick = TLanes.Select(TLanes.LessThan(zero, TLanes.Abs(turn)), thick, a - kept);
            difference = TLanes.Select(isThick, thick, difference);
            odd = TLanes.Select(isThick, thick * norm, odd);
            oddOverAdmittance = TLanes.Select(isThick, thick * Read<TLanes>(ref medium, FieldMedium.InverseNorm), oddOverAdmittance);
        }
        TLanes even = a + a - difference;
        TLanes phiLoss = half * thickness * Read<TLanes>(ref medium, FieldMedium.PhiLoss), psiLoss = half * thickness * Read<TLanes>(ref medium, FieldMedium.PsiLoss);
        Write(TLanes.MultiplyAdd(phiLoss, even, psiLoss * odd), ref place, PhiLost);
        Write(TLanes.MultiplyAdd(phiLoss, oddOverAdmittance, psiLoss * even), ref place, PsiLost);
    }

    // Of half the phase; the argument is not rounded on its way to turns, so that a thick film has the phase that the reference gives it.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static (TLanes Sine, TLanes Cosine) HalfTurn<TLanes>(TLanes turn)
        where TLanes : struct, ILanes<TLanes>
    {
        ComplexLanes<TLanes> half = TLanes.Turn(turn, TLanes.Broadcast(TurnsOfHalfRadian));
        TLanes rest = TLanes.Broadcast(RestOfHalfRadian) * turn;
        return (TLanes.MultiplyAdd(rest, half.Real, half.Imaginary), TLanes.SubtractProduct(rest, half.Imaginary, half.Real));
    }

    // exp(-x), 1 - exp(-x) and (1 - exp(-x))/x, each to its own last digits: below 1/2 the last is a polynomial (Chebyshev nodes, error below 1e-16 of it).
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static (TLanes Kept, TLanes Faded, TLanes Share) Decay<TLanes>(TLanes x)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes zero = TLanes.Broadcast(0), one = TLanes.Broadcast(1);
        if (!TLanes.Any(TLanes.LessThan(zero, x)))
            return (one, zero, one);
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
            return (kept, faded, sum);
        TLanes exponential = TLanes.PowerOfTwo(x, TLanes.Broadcast(-1.4426950408889634)), rest = one - exponential;
        return (TLanes.Select(isLong, exponential, kept), TLanes.Select(isLong, rest, faded), TLanes.Select(isLong, rest / x, sum));
    }

    // See StableFunctions.SincGap.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static TLanes SincGap<TLanes>(TLanes uSquared, TLanes vSquared, int terms)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes sum = vSquared - uSquared, product = uSquared * vSquared, previous = TLanes.Broadcast(0), current = TLanes.Broadcast(1);
        TLanes total = TLanes.Broadcast(InverseFactorials[0]);
        for (int n = 1; n < terms; n++)
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
