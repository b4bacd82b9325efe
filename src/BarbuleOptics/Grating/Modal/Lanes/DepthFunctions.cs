using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Grating.Modal.Lanes;

/// <summary>What fields do over a depth in which nothing changes, without eigenvalues.</summary>
/// <remarks>
/// Fields obey Z u'' = K u. With s^2 = Z^-1 K h^2 the flux at one plane is C u = (Z/h) s coth(s) u where the field is zero at a depth h, and
/// T u = (Z/h) s tanh(s) u where its slope is; D = C - T = (Z/h) 2 s/sinh(2 s). For a small h both come from their continued
/// fraction in B = s^2, C = (945 + 420 B + 15 B^2)/(945 + 105 B + B^2) and T = B/C, split into partial fractions, so that each needs a symmetric inverse.
/// For twice the depth C' = C - D/2 and D' = D C'^-1 D/4, which is Newton's step towards the root of T C = K Z^-1 Z: functions that fade fast,
/// of which the fraction knows little, come out right. Errors of C and T for s up to 0.4 are below 1e-11; there poles of the fraction are far.
/// </remarks>
internal static class DepthFunctions
{
    /// <summary>Largest phase over the depth that the fraction is taken at.</summary>
    public const double Reach = 0.4;

    private const double RootOfC = 85.11756575434786; // sqrt(105^2 - 4 945)
    private const double RootOfT = 23.065125189341593; // sqrt(28^2 - 4 63)

    /// <summary>Poles of C and of T in -B, and their parts.</summary>
    private static readonly (double Pole, double Part)[] OfC = [PartOfC((105 - RootOfC) / 2), PartOfC((105 + RootOfC) / 2)];
    private static readonly (double Pole, double Part)[] OfT = [PartOfT((28 - RootOfT) / 2), PartOfT((28 + RootOfT) / 2)];

    /// <summary>Doubles of scratch for n functions: a system of 2 n columns, a result, and what elimination needs.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static int ScratchOf<TLanes>(int n)
        where TLanes : struct, ILanes<TLanes>
        => 3 * n * n * ComplexLanes<TLanes>.Stride + SymmetricLanes.ScratchOf<TLanes>(n);

    /// <summary>Finds C and D for a depth.</summary>
    /// <param name="k">K times the square of the depth divided by 2^<paramref name="doublings"/>; n rows of n elements.</param>
    /// <param name="z">Z, or nothing where it is the unit matrix.</param>
    /// <param name="isUnit">Whether it is.</param>
    /// <param name="n">Number of functions.</param>
    /// <param name="thinNm">The depth divided by 2^<paramref name="doublings"/>, in nm.</param>
    /// <param name="doublings">How often it is doubled.</param>
    /// <param name="c">Receives C, of which the upper triangle counts.</param>
    /// <param name="d">Receives D.</param>
    /// <param name="scratch">Of <see cref="ScratchOf"/>.</param>
    /// <param name="record">Receives what the fields inside follow from; null where they are not asked for.</param>
    /// <param name="interval">Number of the interval in the record.</param>
    /// <returns>Square of the largest multiplier.</returns>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static TLanes Find<TLanes>(
        ref double k, ref double z, bool isUnit, int n, double thinNm, int doublings, ref double c, ref double d, ref double scratch, SlabRecord? record, int interval)
        where TLanes : struct, ILanes<TLanes>
    {
        int size = ComplexLanes<TLanes>.Stride, count = n * n;
        ref double result = ref Unsafe.Add(ref scratch, 2 * count * size);
        ref double rest = ref Unsafe.Add(ref scratch, 3 * count * size);
        double inverse = 1 / thinNm;
        TLanes growth = TLanes.Broadcast(0);
        LaneSums.Set<TLanes>(ref c, ref z, 15 * inverse, ref z, 0, count);
        for (int part = 0; part < 2; part++)
        {
            growth = TLanes.Max(growth, Fraction<TLanes>(ref k, ref z, isUnit, n, OfC[part].Pole, ref scratch, ref result, ref rest));
            LaneSums.Add<TLanes>(ref c, ref result, OfC[part].Part * inverse, count);
        }
        // D = C - T.
        double constant = OfT[0].Part / OfT[0].Pole + OfT[1].Part / OfT[1].Pole;
        LaneSums.Set<TLanes>(ref d, ref k, -inverse / 15, ref z, constant * inverse, count);
        LaneSums.Add<TLanes>(ref d, ref c, 1, count);
        for (int part = 0; part < 2; part++)
        {
            growth = TLanes.Max(growth, Fraction<TLanes>(ref k, ref z, isUnit, n, OfT[part].Pole, ref scratch, ref result, ref rest));
            LaneSums.Add<TLanes>(ref d, ref result, -OfT[part].Part * inverse, count);
        }
        if (record is not null)
        {
            LaneSums.Set<TLanes>(ref record.Piece(interval), ref c, 1, ref d, -0.5, count);
            LaneSums.Set<TLanes>(ref record.Link(interval), ref d, 0.5, ref d, 0, count);
        }
        for (int i = 0; i < doublings; i++)
        {
            LaneSums.Add<TLanes>(ref c, ref d, -0.5, count);
            LaneSums.SetLeft<TLanes>(ref scratch, n, 2 * n, ref c, 1, ref c, 0);
            LaneSums.SetRight<TLanes>(ref scratch, n, n, ref d, 0.5);
            growth = TLanes.Max(growth, SymmetricLanes.Eliminate<TLanes>(ref scratch, n, n, false, ref d, ref rest));
            if (record is not null)
                SymmetricLanes.Keep<TLanes>(ref scratch, n, n, ref rest, ref record.Level(interval, i + 1));
        }
        return growth;
    }

    // Z (K h^2 + q Z)^-1 Z.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static TLanes Fraction<TLanes>(ref double k, ref double z, bool isUnit, int n, double pole, ref double system, ref double result, ref double rest)
        where TLanes : struct, ILanes<TLanes>
    {
        LaneSums.SetLeft<TLanes>(ref system, n, 2 * n, ref k, 1, ref z, pole);
        if (isUnit)
            LaneSums.SetRightIdentity<TLanes>(ref system, n);
        else
            LaneSums.SetRight<TLanes>(ref system, n, n, ref z, 1);
        return SymmetricLanes.Eliminate<TLanes>(ref system, n, n, isUnit, ref result, ref rest);
    }

    private static (double, double) PartOfC(double pole)
    {
        double b = -pole;
        return (pole, (945 + 420 * b + 15 * b * b) / (105 + 2 * b));
    }

    private static (double, double) PartOfT(double pole)
    {
        double b = -pole;
        return (pole, b * (945 + 105 * b + b * b) / (420 + 30 * b));
    }
}
