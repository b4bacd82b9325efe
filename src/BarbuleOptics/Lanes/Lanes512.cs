using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;
using System.Runtime.Intrinsics.X86;

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
    public static Lanes512 SubtractProduct(Lanes512 left, Lanes512 right, Lanes512 addend) => new(
        Avx512F.IsSupported ? Avx512F.FusedMultiplyAddNegated(left._vector, right._vector, addend._vector) : Vector512.MultiplyAddEstimate(-left._vector, right._vector, addend._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes512 Sqrt(Lanes512 value) => new(Vector512.Sqrt(value._vector));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static (Lanes512 Root, Lanes512 Inverse) RootAndInverse(Lanes512 value)
    {
        if (!Avx512F.IsSupported)
        {
            Vector512<double> plain = Vector512.Sqrt(value._vector);
            return (new(plain), new(Vector512<double>.One / plain));
        }
        // From 14 bits twice by y (1 + e/2 + 3 e e/8) with e = 1 - value y y, the second time without the last term; then the root by what is left of it.
        Vector512<double> half = Vector512.Create(0.5), inverse = Avx512F.ReciprocalSqrt14(value._vector);
        Vector512<double> error = Avx512F.FusedMultiplyAddNegated(inverse * inverse, value._vector, Vector512<double>.One);
        inverse = Vector512.FusedMultiplyAdd(inverse * error, Vector512.FusedMultiplyAdd(error, Vector512.Create(0.375), half), inverse);
        Vector512<double> root = value._vector * inverse;
        error = Avx512F.FusedMultiplyAddNegated(root, inverse, Vector512<double>.One);
        inverse = Vector512.FusedMultiplyAdd(inverse * error, half, inverse);
        Vector512<double> rest = Avx512F.FusedMultiplyAddNegated(root, root, value._vector);
        return (new(Vector512.FusedMultiplyAdd(half * inverse, rest, root)), new(inverse));
    }

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
    public static ComplexLanes<Lanes512> Turn(Lanes512 rate, Lanes512 length)
    {
        if (!Avx512F.IsSupported)
        {
            ComplexLanes<Lanes256> lower = Lanes256.Turn(new(rate._vector.GetLower()), new(length._vector.GetLower()));
            ComplexLanes<Lanes256> upper = Lanes256.Turn(new(rate._vector.GetUpper()), new(length._vector.GetUpper()));
            return new(Join(lower.Real, upper.Real), Join(lower.Imaginary, upper.Imaginary));
        }
        Vector512<double> magic = Vector512.Create(1.5 * (1L << 48));
        Vector512<double> shifted = Vector512.FusedMultiplyAdd(rate._vector, length._vector, magic);
        Lanes512 rest = new(Vector512.FusedMultiplyAdd(rate._vector, length._vector, magic - shifted));
        Lanes512 square = rest * rest;
        Vector512<double> sine = TurnSeries.ShortSine(rest, square)._vector, cosine = TurnSeries.ShortCosine(square)._vector;
        Vector512<double> stepCosine = Avx512F.PermuteVar8x64x2(
            Vector512.Create(1, 0.9238795325112867, 0.7071067811865476, 0.3826834323650898, 0, -0.3826834323650898, -0.7071067811865476, -0.9238795325112867),
            shifted.AsInt64(),
            Vector512.Create(-1, -0.9238795325112867, -0.7071067811865476, -0.3826834323650898, 0, 0.3826834323650898, 0.7071067811865476, 0.9238795325112867));
        Vector512<double> stepSine = Avx512F.PermuteVar8x64x2(
            Vector512.Create(0, 0.3826834323650898, 0.7071067811865476, 0.9238795325112867, 1, 0.9238795325112867, 0.7071067811865476, 0.3826834323650898),
            shifted.AsInt64(),
            Vector512.Create(0, -0.3826834323650898, -0.7071067811865476, -0.9238795325112867, -1, -0.9238795325112867, -0.7071067811865476, -0.3826834323650898));
        return new(
            new(Avx512F.FusedMultiplyAddNegated(stepSine, sine, stepCosine * cosine)),
            new(Vector512.FusedMultiplyAdd(stepCosine, sine, stepSine * cosine)));
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes512 PowerOfTwo(Lanes512 rate, Lanes512 length)
    {
        if (!Avx512F.IsSupported)
        {
            return Join(
                Lanes256.PowerOfTwo(new(rate._vector.GetLower()), new(length._vector.GetLower())),
                Lanes256.PowerOfTwo(new(rate._vector.GetUpper()), new(length._vector.GetUpper())));
        }
        Vector512<double> magic = Vector512.Create(1.5 * (1L << 48));
        Vector512<double> shifted = Vector512.FusedMultiplyAdd(rate._vector, length._vector, magic);
        Vector512<double> whole = shifted - magic;
        Lanes512 rest = new(Avx512F.FusedMultiplySubtract(rate._vector, length._vector, whole));
        Vector512<double> step = Avx512F.PermuteVar8x64x2(
            Vector512.Create(1, 1.0442737824274138, 1.0905077326652577, 1.1387886347566916, 1.189207115002721, 1.241857812073484, 1.2968395546510096, 1.3542555469368927),
            shifted.AsInt64(),
            Vector512.Create(1.4142135623730951, 1.4768261459394993, 1.5422108254079407, 1.6104903319492543, 1.681792830507429, 1.7562521603732995, 1.8340080864093424, 1.9152065613971474));
        // Scaling rounds the power down to a whole number; its sixteenths stand in the table.
        return new(Avx512F.Scale(step * TurnSeries.ShortPower(rest)._vector, whole));
    }

    private static Lanes512 Join(Lanes256 lower, Lanes256 upper) => new(Vector512.Create(lower.Vector, upper.Vector));

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
