using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

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
    public static Lanes128 SubtractProduct(Lanes128 left, Lanes128 right, Lanes128 addend) => new(Vector128.MultiplyAddEstimate(-left._vector, right._vector, addend._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes128 Sqrt(Lanes128 value) => new(Vector128.Sqrt(value._vector));

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
    public static Lanes128 LessThan(Lanes128 left, Lanes128 right) => new(Vector128.LessThan(left._vector, right._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes128 Select(Lanes128 mask, Lanes128 whereSet, Lanes128 elsewhere) => new(Vector128.ConditionalSelect(mask._vector, whereSet._vector, elsewhere._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static bool Any(Lanes128 mask) => Vector128.AnyWhereAllBitsSet(mask._vector);
}
