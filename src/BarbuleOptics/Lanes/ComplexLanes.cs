using System.Runtime.CompilerServices;

namespace BarbuleOptics.Lanes;

/// <summary>Complex numbers side by side: real parts in one vector, imaginary parts in another.</summary>
/// <remarks>In memory a value takes 2 x <c>TLanes.Count</c> doubles, real parts first.</remarks>
internal readonly struct ComplexLanes<TLanes>(TLanes real, TLanes imaginary)
    where TLanes : struct, ILanes<TLanes>
{
    /// <summary>Real parts.</summary>
    public readonly TLanes Real = real;

    /// <summary>Imaginary parts.</summary>
    public readonly TLanes Imaginary = imaginary;

    /// <summary>Number of doubles that a value takes in memory.</summary>
    public static int Stride
    {
        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        get => 2 * TLanes.Count;
    }

    /// <summary>The same complex number in each lane.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ComplexLanes<TLanes> Broadcast(double real, double imaginary = 0) => new(TLanes.Broadcast(real), TLanes.Broadcast(imaginary));

    /// <summary>Reads real parts, and imaginary parts behind them.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ComplexLanes<TLanes> Load(ref double source) => new(TLanes.Load(in source), TLanes.Load(in Unsafe.Add(ref source, TLanes.Count)));

    /// <summary>Writes real parts, and imaginary parts behind them.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Store(ComplexLanes<TLanes> value, ref double destination)
    {
        TLanes.Store(value.Real, ref destination);
        TLanes.Store(value.Imaginary, ref Unsafe.Add(ref destination, TLanes.Count));
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ComplexLanes<TLanes> operator +(ComplexLanes<TLanes> left, ComplexLanes<TLanes> right)
        => new(left.Real + right.Real, left.Imaginary + right.Imaginary);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ComplexLanes<TLanes> operator -(ComplexLanes<TLanes> left, ComplexLanes<TLanes> right)
        => new(left.Real - right.Real, left.Imaginary - right.Imaginary);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ComplexLanes<TLanes> operator -(ComplexLanes<TLanes> value) => new(-value.Real, -value.Imaginary);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ComplexLanes<TLanes> operator *(ComplexLanes<TLanes> left, ComplexLanes<TLanes> right)
        => new(
            TLanes.SubtractProduct(left.Imaginary, right.Imaginary, left.Real * right.Real),
            TLanes.MultiplyAdd(left.Imaginary, right.Real, left.Real * right.Imaginary));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ComplexLanes<TLanes> operator *(TLanes left, ComplexLanes<TLanes> right) => new(left * right.Real, left * right.Imaginary);

    /// <summary><paramref name="left"/> <paramref name="right"/> + <paramref name="addend"/>.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ComplexLanes<TLanes> MultiplyAdd(ComplexLanes<TLanes> left, ComplexLanes<TLanes> right, ComplexLanes<TLanes> addend)
        => new(
            TLanes.SubtractProduct(left.Imaginary, right.Imaginary, TLanes.MultiplyAdd(left.Real, right.Real, addend.Real)),
            TLanes.MultiplyAdd(left.Imaginary, right.Real, TLanes.MultiplyAdd(left.Real, right.Imaginary, addend.Imaginary)));

    /// <summary><paramref name="addend"/> - <paramref name="left"/> <paramref name="right"/>.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ComplexLanes<TLanes> SubtractProduct(ComplexLanes<TLanes> left, ComplexLanes<TLanes> right, ComplexLanes<TLanes> addend)
        => new(
            TLanes.MultiplyAdd(left.Imaginary, right.Imaginary, TLanes.SubtractProduct(left.Real, right.Real, addend.Real)),
            TLanes.SubtractProduct(left.Imaginary, right.Real, TLanes.SubtractProduct(left.Real, right.Imaginary, addend.Imaginary)));

    /// <summary>i times this.</summary>
    public ComplexLanes<TLanes> TimesI
    {
        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        get => new(-Imaginary, Real);
    }

    /// <summary>Complex conjugate.</summary>
    public ComplexLanes<TLanes> Conjugate
    {
        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        get => new(Real, -Imaginary);
    }

    /// <summary>Square of the absolute value.</summary>
    public TLanes Norm
    {
        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        get => TLanes.MultiplyAdd(Real, Real, Imaginary * Imaginary);
    }

    /// <summary>1 / this, by one division; the square of the absolute value must be neither 0 nor infinite.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ComplexLanes<TLanes> Reciprocal()
    {
        TLanes scale = TLanes.Broadcast(1) / Norm;
        return new(Real * scale, -Imaginary * scale);
    }

    /// <summary>The square root with an imaginary part of 0 or more: the one that decays or travels on.</summary>
    /// <remarks>The larger of the two parts is found first, sqrt((|z| + |Re z|)/2), and the other from its inverse, so that neither is a difference. Values below 1e-150 count as that.
    /// A value with an imaginary part of 0 or -0 gives a root on the positive real or the positive imaginary axis.</remarks>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ComplexLanes<TLanes> PassiveRoot()
    {
        TLanes half = TLanes.Broadcast(0.5), zero = TLanes.Broadcast(0), least = TLanes.Broadcast(1e-300);
        TLanes modulus = TLanes.RootAndInverse(TLanes.Max(Norm, least)).Root;
        (TLanes large, TLanes inverse) = TLanes.RootAndInverse(TLanes.Max(half * (modulus + TLanes.Abs(Real)), least));
        TLanes small = half * TLanes.Abs(Imaginary) * inverse;
        TLanes negativeReal = TLanes.LessThan(Real, zero);
        TLanes magnitude = TLanes.Select(negativeReal, small, large);
        // With Im z < 0 the root of Im >= 0 has Re <= 0.
        return new(
            TLanes.Select(TLanes.LessThan(Imaginary, zero), -magnitude, magnitude),
            TLanes.Select(negativeReal, large, small));
    }

    /// <summary>exp(i z): a phase by the real part, a decay by the imaginary one.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ComplexLanes<TLanes> ExpI()
    {
        TLanes decay = TLanes.Exp(-Imaginary);
        (TLanes sine, TLanes cosine) = TLanes.SinCos(Real);
        return new(decay * cosine, decay * sine);
    }

    /// <summary>Lane by lane one of two values.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ComplexLanes<TLanes> Select(TLanes mask, ComplexLanes<TLanes> whereSet, ComplexLanes<TLanes> elsewhere)
        => new(TLanes.Select(mask, whereSet.Real, elsewhere.Real), TLanes.Select(mask, whereSet.Imaginary, elsewhere.Imaginary));
}
