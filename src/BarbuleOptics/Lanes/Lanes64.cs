using System.Runtime.CompilerServices;

namespace BarbuleOptics.Lanes;

/// <summary>One number: the same kernels without vectors.</summary>
internal readonly struct Lanes64(double value) : ILanes<Lanes64>
{
    private readonly double _value = value;

    /// <inheritdoc/>
    public static int Count => 1;

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes64 Broadcast(double value) => new(value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes64 Load(ref readonly double source) => new(source);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Store(Lanes64 value, ref double destination) => destination = value._value;

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes64 operator +(Lanes64 left, Lanes64 right) => new(left._value + right._value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes64 operator -(Lanes64 left, Lanes64 right) => new(left._value - right._value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes64 operator *(Lanes64 left, Lanes64 right) => new(left._value * right._value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes64 operator /(Lanes64 left, Lanes64 right) => new(left._value / right._value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes64 operator -(Lanes64 value) => new(-value._value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes64 MultiplyAdd(Lanes64 left, Lanes64 right, Lanes64 addend) => new(double.MultiplyAddEstimate(left._value, right._value, addend._value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes64 SubtractProduct(Lanes64 left, Lanes64 right, Lanes64 addend) => new(double.MultiplyAddEstimate(-left._value, right._value, addend._value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes64 Sqrt(Lanes64 value) => new(Math.Sqrt(value._value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static (Lanes64 Root, Lanes64 Inverse) RootAndInverse(Lanes64 value)
    {
        double root = Math.Sqrt(value._value);
        return (new(root), new(1 / root));
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes64 Abs(Lanes64 value) => new(Math.Abs(value._value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes64 Min(Lanes64 left, Lanes64 right) => left._value < right._value ? left : right;

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes64 Max(Lanes64 left, Lanes64 right) => left._value > right._value ? left : right;

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes64 Round(Lanes64 value) => new(Math.Round(value._value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes64 Exp(Lanes64 value) => new(Math.Exp(value._value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes64 Log(Lanes64 value) => new(Math.Log(value._value));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static (Lanes64 Sine, Lanes64 Cosine) SinCos(Lanes64 angle) => (new(Math.Sin(angle._value)), new(Math.Cos(angle._value)));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ComplexLanes<Lanes64> Turn(Lanes64 rate, Lanes64 length)
    {
        double rest = double.MultiplyAddEstimate(rate._value, length._value, -Math.Round(rate._value * length._value));
        (double sine, double cosine) = double.SinCosPi(2 * rest);
        return new(new(cosine), new(sine));
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes64 PowerOfTwo(Lanes64 rate, Lanes64 length) => new(double.Exp2(Math.Max(rate._value * length._value, -1000)));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes64 LessThan(Lanes64 left, Lanes64 right) => new(BitConverter.Int64BitsToDouble(left._value < right._value ? -1 : 0));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes64 Select(Lanes64 mask, Lanes64 whereSet, Lanes64 elsewhere) => Any(mask) ? whereSet : elsewhere;

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static bool Any(Lanes64 mask) => BitConverter.DoubleToInt64Bits(mask._value) != 0;
}
