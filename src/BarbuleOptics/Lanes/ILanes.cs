namespace BarbuleOptics.Lanes;

/// <summary>Several double-precision numbers side by side, one a lane; a kernel written over it runs at any vector width.</summary>
/// <remarks>
/// Each operation acts lane by lane. A mask is a value whose lanes are all ones or all zeros in their bits, as comparisons make them and
/// <see cref="Select"/> takes them. Kernels are generic methods over an implementing structure, which the compiler turns into
/// straight vector code for each width; nothing is virtual or boxed.
/// </remarks>
/// <typeparam name="TSelf">The implementing structure.</typeparam>
internal interface ILanes<TSelf>
    where TSelf : struct, ILanes<TSelf>
{
    /// <summary>Number of lanes.</summary>
    static abstract int Count { get; }

    /// <summary>The same number in each lane.</summary>
    static abstract TSelf Broadcast(double value);

    /// <summary>Reads <see cref="Count"/> numbers that begin at <paramref name="source"/>, which need no alignment.</summary>
    static abstract TSelf Load(ref readonly double source);

    /// <summary>Writes <see cref="Count"/> numbers that begin at <paramref name="destination"/>.</summary>
    static abstract void Store(TSelf value, ref double destination);

    /// <summary>Sum.</summary>
    static abstract TSelf operator +(TSelf left, TSelf right);

    /// <summary>Difference.</summary>
    static abstract TSelf operator -(TSelf left, TSelf right);

    /// <summary>Product.</summary>
    static abstract TSelf operator *(TSelf left, TSelf right);

    /// <summary>Quotient; costs as much as many products.</summary>
    static abstract TSelf operator /(TSelf left, TSelf right);

    /// <summary>Negative.</summary>
    static abstract TSelf operator -(TSelf value);

    /// <summary><paramref name="left"/> <paramref name="right"/> + <paramref name="addend"/>, rounded once where the processor can.</summary>
    static abstract TSelf MultiplyAdd(TSelf left, TSelf right, TSelf addend);

    /// <summary><paramref name="addend"/> - <paramref name="left"/> <paramref name="right"/>, rounded once where the processor can.</summary>
    static abstract TSelf SubtractProduct(TSelf left, TSelf right, TSelf addend);

    /// <summary>Square root.</summary>
    static abstract TSelf Sqrt(TSelf value);

    /// <summary>The square root and its inverse, within 1 unit in the last place, for values from 1e-300 to 1e300; at 512 bits far cheaper than
    /// <see cref="Sqrt"/> and a quotient.</summary>
    static abstract (TSelf Root, TSelf Inverse) RootAndInverse(TSelf value);

    /// <summary>Absolute value.</summary>
    static abstract TSelf Abs(TSelf value);

    /// <summary>The smaller of two.</summary>
    static abstract TSelf Min(TSelf left, TSelf right);

    /// <summary>The larger of two.</summary>
    static abstract TSelf Max(TSelf left, TSelf right);

    /// <summary>The nearest whole number, ties to even.</summary>
    static abstract TSelf Round(TSelf value);

    /// <summary>exp(value), within 2 units in the last place.</summary>
    static abstract TSelf Exp(TSelf value);

    /// <summary>Natural logarithm, within 2 units in the last place.</summary>
    static abstract TSelf Log(TSelf value);

    /// <summary>Sine and cosine of an angle in radians, within 2 units in the last place for angles up to 1e5.</summary>
    static abstract (TSelf Sine, TSelf Cosine) SinCos(TSelf angle);

    /// <summary>exp(2 pi i <paramref name="rate"/> <paramref name="length"/>) within 2 units in the last place of 1 and what the
    /// rounding of the rate makes of it; for products up to 1e12.</summary>
    /// <remarks>The product's nearest sixteenth (512 bits) or quarter of a turn is taken off by adding and subtracting a number whose last digit is that
    /// step, the rest, exact by fused multiplication, goes through <see cref="TurnSeries"/>.</remarks>
    static abstract ComplexLanes<TSelf> Turn(TSelf rate, TSelf length);

    /// <summary>2^(<paramref name="rate"/> <paramref name="length"/>) within 2 units in the last place and what the rounding of the rate makes of it; for
    /// products from -1e12 to 1000; below -1000 at most 2^-1000.</summary>
    static abstract TSelf PowerOfTwo(TSelf rate, TSelf length);

    /// <summary>Mask of the lanes where <paramref name="left"/> is below <paramref name="right"/>.</summary>
    static abstract TSelf LessThan(TSelf left, TSelf right);

    /// <summary>Lane by lane <paramref name="whereSet"/> where the mask is set and <paramref name="elsewhere"/> where it is not.</summary>
    static abstract TSelf Select(TSelf mask, TSelf whereSet, TSelf elsewhere);

    /// <summary>Whether the mask is set in any lane.</summary>
    static abstract bool Any(TSelf mask);
}
