using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace BarbuleOptics.Lanes;

/// <summary>Eight numbers in a vector of 512 bits.</summary>
internal readonly struct Lanes512(Vector512<double> vector) : ILanes<Lanes512>
{
    private readonly Vector512<double> _vector = vector;

    /// <inheritdoc/>
    public static int Count => Vector512<double>.Count;

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes512 Broadcast(double value) => new(Vector512.Create(value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes512 Load(ref readonly double source) => new(Vector512.LoadUnsafe(in source));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Store(Lanes512 value, ref double destination) => value._vector.StoreUnsafe(ref destination);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes512 operator +(Lanes512 left, Lanes512 right) => new(left._vector + right._vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes512 operator -(Lanes512 left, Lanes512 right) => new(left._vector - right._vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes512 operator *(Lanes512 left, Lanes512 right) => new(left._vector * right._vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes512 operator /(Lanes512 left, Lanes512 right) => new(left._vector / right._vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes512 operator -(Lanes512 value) => new(-value._vector);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes512 MultiplyAdd(Lanes512 left, Lanes512 right, Lanes512 addend) => new(Vector512.MultiplyAddEstimate(left._vector, right._vector, addend._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes512 SubtractProduct(Lanes512 left, Lanes512 right, Lanes512 addend) => new(Vector512.MultiplyAddEstimate(-left._vector, right._vector, addend._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes512 Sqrt(Lanes512 value) => new(Vector512.Sqrt(value._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes512 Abs(Lanes512 value) => new(Vector512.Abs(value._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes512 Min(Lanes512 left, Lanes512 right) => new(Vector512.MinNative(left._vector, right._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes512 Max(Lanes512 left, Lanes512 right) => new(Vector512.MaxNative(left._vector, right._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes512 Round(Lanes512 value) => new(Vector512.Round(value._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes512 Exp(Lanes512 value) => new(Vector512.Exp(value._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes512 Log(Lanes512 value) => new(Vector512.Log(value._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static (Lanes512 Sine, Lanes512 Cosine) SinCos(Lanes512 angle)
    {
        (Vector512<double> sine, Vector512<double> cosine) = Vector512.SinCos(angle._vector);
        return (new(sine), new(cosine));
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes512 LessThan(Lanes512 left, Lanes512 right) => new(Vector512.LessThan(left._vector, right._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes512 Select(Lanes512 mask, Lanes512 whereSet, Lanes512 elsewhere) => new(Vector512.ConditionalSelect(mask._vector, whereSet._vector, elsewhere._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static bool Any(Lanes512 mask) => Vector512.AnyWhereAllBitsSet(mask._vector);
}
