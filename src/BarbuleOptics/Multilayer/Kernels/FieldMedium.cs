using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Multilayer.Kernels;

/// <summary>The constants of a medium at a vector of wavelengths in one polarization, in memory; see <see cref="MediumWave"/>.</summary>
internal static class FieldMedium
{
    /// <summary>Vectors that a medium takes.</summary>
    public const int Values = 13;

    public const int Depth = 0, Admittance = 2, Inverse = 4, Ratio = 6, PhiLoss = 8, PsiLoss = 9, Norm = 10, InverseNorm = 11, RatioNorm = 12;

    /// <summary>Fills a medium's place, in s.</summary>
    /// <returns>Whether it takes up power at any of the wavelengths.</returns>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static bool FillS<TLanes>(in LightLanes<TLanes> light, in ComplexLanes<TLanes> y, ref double place)
        where TLanes : struct, ILanes<TLanes>
    {
        ComplexLanes<TLanes> depth = light.DepthS(y);
        return Fill(depth, depth, depth.Reciprocal(), ComplexLanes<TLanes>.Broadcast(1), y.Imaginary, TLanes.Broadcast(0), ref place);
    }

    /// <summary>Fills a medium's place, in p.</summary>
    /// <returns>Whether it takes up power at any of the wavelengths.</returns>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static bool FillP<TLanes>(in LightLanes<TLanes> light, in ComplexLanes<TLanes> x, in ComplexLanes<TLanes> z, ref double place)
        where TLanes : struct, ILanes<TLanes>
    {
        (ComplexLanes<TLanes> depth, ComplexLanes<TLanes> admittance, ComplexLanes<TLanes> inverse, TLanes phiLoss) = light.WaveP(x, z);
        return Fill(depth, admittance, inverse, x, phiLoss, x.Imaginary, ref place);
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static bool Fill<TLanes>(
        in ComplexLanes<TLanes> depth, in ComplexLanes<TLanes> admittance, in ComplexLanes<TLanes> inverse, in ComplexLanes<TLanes> ratio,
        TLanes phiLoss, TLanes psiLoss, ref double place)
        where TLanes : struct, ILanes<TLanes>
    {
        Store(depth, ref place, Depth);
        Store(admittance, ref place, Admittance);
        Store(inverse, ref place, Inverse);
        Store(ratio, ref place, Ratio);
        Store(phiLoss, ref place, PhiLoss);
        Store(psiLoss, ref place, PsiLoss);
        Store(admittance.Norm, ref place, Norm);
        Store(inverse.Norm, ref place, InverseNorm);
        Store(ratio.Norm, ref place, RatioNorm);
        return TLanes.Any(TLanes.LessThan(TLanes.Broadcast(0), TLanes.Max(phiLoss, psiLoss)));
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Store<TLanes>(in ComplexLanes<TLanes> value, ref double place, int at)
        where TLanes : struct, ILanes<TLanes>
        => ComplexLanes<TLanes>.Store(value, ref Unsafe.Add(ref place, at * TLanes.Count));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Store<TLanes>(TLanes value, ref double place, int at)
        where TLanes : struct, ILanes<TLanes>
        => TLanes.Store(value, ref Unsafe.Add(ref place, at * TLanes.Count));
}
