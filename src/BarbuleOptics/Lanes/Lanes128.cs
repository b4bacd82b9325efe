using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;
using System.Runtime.Intrinsics.X86;

namespace BarbuleOptics.Lanes;

/// <summary>Two numbers in a vector of 128 bits.</summary>
internal readonly struct Lanes128(Vector128<double> vector) : ILanes<Lanes128>
{
    private readonly Vector128<double> _vector = vector;

    /// <inheritdoc/>
    public static int Count => Vector128<double>.Count;

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes128 Broadcast(double value) => new(Vector128.Create(value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes128 Load(ref readonly double source) => new(Vector128.LoadUnsafe(in source));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Store(Lanes128 value, ref double destination) => value._vector.StoreUnsafe(ref destination);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes128 operator +(Lanes128 left, Lanes128 right) => new(left._vector + right._vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes128 operator -(Lanes128 left, Lanes128 right) => new(left._vector - right._vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes128 operator *(Lanes128 left, Lanes128 right) => new(left._vector * right._vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes128 operator /(Lanes128 left, Lanes128 right) => new(left._vector / right._vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes128 operator -(Lanes128 value) => new(-value._vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes128 MultiplyAdd(Lanes128 left, Lanes128 right, Lanes128 addend) => new(Vector128.MultiplyAddEstimate(left._vector, right._vector, addend._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes128 SubtractProduct(Lanes128 left, Lanes128 right, Lanes128 addend) => new(
        Fma.IsSupported ? Fma.MultiplyAddNegated(left._vector, right._vector, addend._vector) : Vector128.MultiplyAddEstimate(-left._vector, right._vector, addend._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes128 Sqrt(Lanes128 value) => new(Vector128.Sqrt(value._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static (Lanes128 Root, Lanes128 Inverse) RootAndInverse(Lanes128 value)
    {
        Vector128<double> root = Vector128.Sqrt(value._vector);
        return (new(root), new(Vector128<double>.One / root));
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes128 Abs(Lanes128 value) => new(Vector128.Abs(value._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes128 Min(Lanes128 left, Lanes128 right) => new(Vector128.MinNative(left._vector, right._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes128 Max(Lanes128 left, Lanes128 right) => new(Vector128.MaxNative(left._vector, right._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes128 Round(Lanes128 value) => new(Vector128.Round(value._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes128 Exp(Lanes128 value) => new(Vector128.Exp(value._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes128 Log(Lanes128 value) => new(Vector128.Log(value._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static (Lanes128 Sine, Lanes128 Cosine) SinCos(Lanes128 angle)
    {
        (Vector128<double> sine, Vector128<double> cosine) = Vector128.SinCos(angle._vector);
        return (new(sine), new(cosine));
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ComplexLanes<Lanes128> Turn(Lanes128 rate, Lanes128 length)
    {
        Vector128<double> magic = Vector128.Create(1.5 * (1L << 50));
        Vector128<double> shifted = Vector128.MultiplyAddEstimate(rate._vector, length._vector, magic);
        Lanes128 rest = new(Vector128.MultiplyAddEstimate(rate._vector, length._vector, magic - shifted));
        Lanes128 square = rest * rest;
        Vector128<double> sine = TurnSeries.Sine(rest, square)._vector, cosine = TurnSeries.Cosine(square)._vector;
        // Odd quarters exchange the two; the cosine is below zero in quarters 1 and 2, the sine in 2 and 3.
        Vector128<long> quarter = shifted.AsInt64(), sign = Vector128.Create(long.MinValue);
        Vector128<double> even = Vector128.Equals(quarter & Vector128<long>.One, Vector128<long>.Zero).AsDouble();
        Vector128<long> cosineSign = Vector128.ShiftLeft(quarter + Vector128<long>.One, 62) & sign, sineSign = Vector128.ShiftLeft(quarter, 62) & sign;
        return new(
            new((Vector128.ConditionalSelect(even, cosine, sine).AsInt64() ^ cosineSign).AsDouble()),
            new((Vector128.ConditionalSelect(even, sine, cosine).AsInt64() ^ sineSign).AsDouble()));
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes128 PowerOfTwo(Lanes128 rate, Lanes128 length)
    {
        Vector128<double> magic = Vector128.Create(1.5 * (1L << 52));
        Vector128<double> shifted = Vector128.MultiplyAddEstimate(rate._vector, length._vector, magic);
        Vector128<double> power = TurnSeries.Power(new Lanes128(Vector128.MultiplyAddEstimate(rate._vector, length._vector, magic - shifted)))._vector;
        // The whole power stands in the low bits of the shifted number, from -1000 on, and goes into the exponent.
        Vector128<double> bounded = Vector128.MaxNative(shifted, Vector128.Create(1.5 * (1L << 52) - 1000));
        return new((power.AsInt64() + Vector128.ShiftLeft(bounded.AsInt64(), 52)).AsDouble());
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes128 LessThan(Lanes128 left, Lanes128 right) => new(Vector128.LessThan(left._vector, right._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes128 Select(Lanes128 mask, Lanes128 whereSet, Lanes128 elsewhere) => new(Vector128.ConditionalSelect(mask._vector, whereSet._vector, elsewhere._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static bool Any(Lanes128 mask) => Vector128.AnyWhereAllBitsSet(mask._vector);
}
