using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Multilayer.Kernels;

/// <summary>The constants of a medium at a vector of wavelengths in one polarization, in memory; see <see cref="MediumWave"/>.</summary>
internal static class FieldMedium
{
    /// <summary>Vectors that a medium takes.</summary>
    public const int Values = 15;

    public const int Depth = 0, Admittance = 2, Inverse = 4, Ratio = 6, PhiLoss = 8, PsiLoss = 9, Norm = 10, InverseNorm = 11, RatioNorm = 12, InverseDepth = 13;

    /// <summary>Fills a medium's place.</summary>
    /// <returns>Whether it takes up power at any of the wavelengths.</returns>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static bool Fill<TLanes>(in LightLanes<TLanes> light, bool isP, in ComplexLanes<TLanes> x, in ComplexLanes<TLanes> y, in ComplexLanes<TLanes> z, ref double place)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes zero = TLanes.Broadcast(0), one = TLanes.Broadcast(1);
        ComplexLanes<TLanes> depth, admittance, ratio;
        TLanes phiLoss, psiLoss;
        if (isP)
        {
            (depth, admittance, phiLoss) = light.WaveP(x, z);
            (ratio, psiLoss) = (x, x.Imaginary);
        }
        else
        {
            depth = admittance = light.DepthS(y);
            (ratio, phiLoss, psiLoss) = (ComplexLanes<TLanes>.Broadcast(1), y.Imaginary, zero);
        }
        TLanes norm = admittance.Norm, inverseNorm = one / norm;
        Store(depth, ref place, Depth);
        Store(admittance, ref place, Admittance);
        Store(inverseNorm * admittance.Conjugate, ref place, Inverse);
        Store(ratio, ref place, Ratio);
        Store(phiLoss, ref place, PhiLoss);
        Store(psiLoss, ref place, PsiLoss);
        Store(norm, ref place, Norm);
        Store(inverseNorm, ref place, InverseNorm);
        Store(ratio.Norm, ref place, RatioNorm);
        Store(one / depth.Real, ref place, InverseDepth);
        Store(one / depth.Imaginary, ref place, InverseDepth + 1);
        return TLanes.Any(TLanes.LessThan(zero, TLanes.Max(phiLoss, psiLoss)));
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
