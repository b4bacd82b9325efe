using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;
using System.Runtime.Intrinsics.X86;

namespace BarbuleOptics.Lanes;

/// <summary>Four numbers in a vector of 256 bits.</summary>
internal readonly struct Lanes256(Vector256<double> vector) : ILanes<Lanes256>
{
    private readonly Vector256<double> _vector = vector;

    /// <summary>The numbers.</summary>
    public Vector256<double> Vector
    {
        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        get => _vector;
    }

    /// <inheritdoc/>
    public static int Count => Vector256<double>.Count;

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes256 Broadcast(double value) => new(Vector256.Create(value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes256 Load(ref readonly double source) => new(Vector256.LoadUnsafe(in source));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Store(Lanes256 value, ref double destination) => value._vector.StoreUnsafe(ref destination);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes256 operator +(Lanes256 left, Lanes256 right) => new(left._vector + right._vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes256 operator -(Lanes256 left, Lanes256 right) => new(left._vector - right._vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes256 operator *(Lanes256 left, Lanes256 right) => new(left._vector * right._vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes256 operator /(Lanes256 left, Lanes256 right) => new(left._vector / right._vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes256 operator -(Lanes256 value) => new(-value._vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes256 MultiplyAdd(Lanes256 left, Lanes256 right, Lanes256 addend) => new(Vector256.MultiplyAddEstimate(left._vector, right._vector, addend._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes256 SubtractProduct(Lanes256 left, Lanes256 right, Lanes256 addend) => new(
        Fma.IsSupported ? Fma.MultiplyAddNegated(left._vector, right._vector, addend._vector) : Vector256.MultiplyAddEstimate(-left._vector, right._vector, addend._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes256 Sqrt(Lanes256 value) => new(Vector256.Sqrt(value._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static (Lanes256 Root, Lanes256 Inverse) RootAndInverse(Lanes256 value)
    {
        Vector256<double> root = Vector256.Sqrt(value._vector);
        return (new(root), new(Vector256<double>.One / root));
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes256 Abs(Lanes256 value) => new(Vector256.Abs(value._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes256 Min(Lanes256 left, Lanes256 right) => new(Vector256.MinNative(left._vector, right._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes256 Max(Lanes256 left, Lanes256 right) => new(Vector256.MaxNative(left._vector, right._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes256 Round(Lanes256 value) => new(Vector256.Round(value._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes256 Exp(Lanes256 value) => new(Vector256.Exp(value._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes256 Log(Lanes256 value) => new(Vector256.Log(value._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static (Lanes256 Sine, Lanes256 Cosine) SinCos(Lanes256 angle)
    {
        (Vector256<double> sine, Vector256<double> cosine) = Vector256.SinCos(angle._vector);
        return (new(sine), new(cosine));
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ComplexLanes<Lanes256> Turn(Lanes256 rate, Lanes256 length)
    {
        Vector256<double> magic = Vector256.Create(1.5 * (1L << 50));
        Vector256<double> shifted = Vector256.MultiplyAddEstimate(rate._vector, length._vector, magic);
        Lanes256 rest = new(Vector256.MultiplyAddEstimate(rate._vector, length._vector, magic - shifted));
        Lanes256 square = rest * rest;
        Vector256<double> sine = TurnSeries.Sine(rest, square)._vector, cosine = TurnSeries.Cosine(square)._vector;
        // Odd quarters exchange the two; the cosine is below zero in quarters 1 and 2, the sine in 2 and 3.
        Vector256<long> quarter = shifted.AsInt64(), sign = Vector256.Create(long.MinValue);
        Vector256<double> even = Vector256.Equals(quarter & Vector256<long>.One, Vector256<long>.Zero).AsDouble();
        Vector256<long> cosineSign = Vector256.ShiftLeft(quarter + Vector256<long>.One, 62) & sign, sineSign = Vector256.ShiftLeft(quarter, 62) & sign;
        return new(
            new((Vector256.ConditionalSelect(even, cosine, sine).AsInt64() ^ cosineSign).AsDouble()),
            new((Vector256.ConditionalSelect(even, sine, cosine).AsInt64() ^ sineSign).AsDouble()));
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes256 PowerOfTwo(Lanes256 rate, Lanes256 length)
    {
        Vector256<double> magic = Vector256.Create(1.5 * (1L << 52));
        Vector256<double> shifted = Vector256.MultiplyAddEstimate(rate._vector, length._vector, magic);
        Vector256<double> power = TurnSeries.Power(new Lanes256(Vector256.MultiplyAddEstimate(rate._vector, length._vector, magic - shifted)))._vector;
        // The whole power stands in the low bits of the shifted number, from -1000 on, and goes into the exponent.
        Vector256<double> bounded = Vector256.MaxNative(shifted, Vector256.Create(1.5 * (1L << 52) - 1000));
        return new((power.AsInt64() + Vector256.ShiftLeft(bounded.AsInt64(), 52)).AsDouble());
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes256 LessThan(Lanes256 left, Lanes256 right) => new(Vector256.LessThan(left._vector, right._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes256 Select(Lanes256 mask, Lanes256 whereSet, Lanes256 elsewhere) => new(Vector256.ConditionalSelect(mask._vector, whereSet._vector, elsewhere._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static bool Any(Lanes256 mask) => Vector256.AnyWhereAllBitsSet(mask._vector);
}
