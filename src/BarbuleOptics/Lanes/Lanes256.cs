using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace BarbuleOptics.Lanes;

/// <summary>Four numbers in a vector of 256 bits.</summary>
internal readonly struct Lanes256(Vector256<double> vector) : ILanes<Lanes256>
{
    private readonly Vector256<double> _vector = vector;

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
    public static Lanes256 SubtractProduct(Lanes256 left, Lanes256 right, Lanes256 addend) => new(Vector256.MultiplyAddEstimate(-left._vector, right._vector, addend._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes256 Sqrt(Lanes256 value) => new(Vector256.Sqrt(value._vector));

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
    public static Lanes256 LessThan(Lanes256 left, Lanes256 right) => new(Vector256.LessThan(left._vector, right._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes256 Select(Lanes256 mask, Lanes256 whereSet, Lanes256 elsewhere) => new(Vector256.ConditionalSelect(mask._vector, whereSet._vector, elsewhere._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static bool Any(Lanes256 mask) => Vector256.AnyWhereAllBitsSet(mask._vector);
}
