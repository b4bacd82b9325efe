using System.Runtime.CompilerServices;

namespace BarbuleOptics.Lanes;

/// <summary>The short polynomials behind <see cref="ILanes{TSelf}.Turn"/> and <see cref="ILanes{TSelf}.PowerOfTwo"/>.</summary>
/// <remarks>sin(2 pi r) = r S(r r), cos(2 pi r) = 1 + r r C(r r) and 2^r = 1 + r E(r), each interpolated at Chebyshev nodes of its range with 40
/// digits and rounded. Largest error against 40 digits: 2e-16 for the shorter cosine, 3e-17 for all others.</remarks>
internal static class TurnSeries
{
    /// <summary>sin(2 pi r) for |r| up to 1/32.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static TLanes ShortSine<TLanes>(TLanes rest, TLanes square)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes sum = TLanes.Broadcast(42.02185658616179);
        sum = TLanes.MultiplyAdd(sum, square, TLanes.Broadcast(-76.70582827985477));
        sum = TLanes.MultiplyAdd(sum, square, TLanes.Broadcast(81.6052492650987));
        sum = TLanes.MultiplyAdd(sum, square, TLanes.Broadcast(-41.34170224039842));
        return rest * TLanes.MultiplyAdd(sum, square, TLanes.Broadcast(6.283185307179586));
    }

    /// <summary>cos(2 pi r) for |r| up to 1/32.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static TLanes ShortCosine<TLanes>(TLanes square)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes sum = TLanes.Broadcast(60.19304831175746);
        sum = TLanes.MultiplyAdd(sum, square, TLanes.Broadcast(-85.45678572069784));
        sum = TLanes.MultiplyAdd(sum, square, TLanes.Broadcast(64.93939401651899));
        sum = TLanes.MultiplyAdd(sum, square, TLanes.Broadcast(-19.73920880217853));
        return TLanes.MultiplyAdd(sum, square, TLanes.Broadcast(1));
    }

    /// <summary>2^r for |r| up to 1/32.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static TLanes ShortPower<TLanes>(TLanes rest)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes sum = TLanes.Broadcast(0.00015403723980749256);
        sum = TLanes.MultiplyAdd(sum, rest, TLanes.Broadcast(0.0013333781576784268));
        sum = TLanes.MultiplyAdd(sum, rest, TLanes.Broadcast(0.009618129106919537));
        sum = TLanes.MultiplyAdd(sum, rest, TLanes.Broadcast(0.0555041086566393));
        sum = TLanes.MultiplyAdd(sum, rest, TLanes.Broadcast(0.24022650695910075));
        sum = TLanes.MultiplyAdd(sum, rest, TLanes.Broadcast(0.6931471805599457));
        return TLanes.MultiplyAdd(sum, rest, TLanes.Broadcast(1));
    }

    /// <summary>sin(2 pi r) for |r| up to 1/8.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static TLanes Sine<TLanes>(TLanes rest, TLanes square)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes sum = TLanes.Broadcast(3.7808689593022957);
        sum = TLanes.MultiplyAdd(sum, square, TLanes.Broadcast(-15.093804209987114));
        sum = TLanes.MultiplyAdd(sum, square, TLanes.Broadcast(42.058685020160894));
        sum = TLanes.MultiplyAdd(sum, square, TLanes.Broadcast(-76.70585970427454));
        sum = TLanes.MultiplyAdd(sum, square, TLanes.Broadcast(81.60524927594804));
        sum = TLanes.MultiplyAdd(sum, square, TLanes.Broadcast(-41.341702240399634));
        return rest * TLanes.MultiplyAdd(sum, square, TLanes.Broadcast(6.283185307179586));
    }

    /// <summary>cos(2 pi r) for |r| up to 1/8.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static TLanes Cosine<TLanes>(TLanes square)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes sum = TLanes.Broadcast(-1.6990343940660637);
        sum = TLanes.MultiplyAdd(sum, square, TLanes.Broadcast(7.903206911569678));
        sum = TLanes.MultiplyAdd(sum, square, TLanes.Broadcast(-26.426253275854723));
        sum = TLanes.MultiplyAdd(sum, square, TLanes.Broadcast(60.24464135270201));
        sum = TLanes.MultiplyAdd(sum, square, TLanes.Broadcast(-85.4568172066438));
        sum = TLanes.MultiplyAdd(sum, square, TLanes.Broadcast(64.93939402266824));
        sum = TLanes.MultiplyAdd(sum, square, TLanes.Broadcast(-19.739208802178716));
        return TLanes.MultiplyAdd(sum, square, TLanes.Broadcast(1));
    }

    /// <summary>2^r for |r| up to 1/2.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static TLanes Power<TLanes>(TLanes rest)
        where TLanes : struct, ILanes<TLanes>
    {
        // Even and odd powers by themselves: two chains of half the length.
        TLanes square = rest * rest;
        TLanes even = TLanes.Broadcast(7.072585949269223e-09);
        even = TLanes.MultiplyAdd(even, square, TLanes.Broadcast(1.321544258792169e-06));
        even = TLanes.MultiplyAdd(even, square, TLanes.Broadcast(0.0001540353044173605));
        even = TLanes.MultiplyAdd(even, square, TLanes.Broadcast(0.009618129107606888));
        even = TLanes.MultiplyAdd(even, square, TLanes.Broadcast(0.24022650695910097));
        even = TLanes.MultiplyAdd(even, square, TLanes.Broadcast(1));
        TLanes odd = TLanes.Broadcast(4.4549605981865186e-10);
        odd = TLanes.MultiplyAdd(odd, square, TLanes.Broadcast(1.0178062445845774e-07));
        odd = TLanes.MultiplyAdd(odd, square, TLanes.Broadcast(1.525273382983612e-05));
        odd = TLanes.MultiplyAdd(odd, square, TLanes.Broadcast(0.0013333558146416936));
        odd = TLanes.MultiplyAdd(odd, square, TLanes.Broadcast(0.0555041086648216));
        odd = TLanes.MultiplyAdd(odd, square, TLanes.Broadcast(0.6931471805599453));
        return TLanes.MultiplyAdd(odd, rest, even);
    }
}
