using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace BarbuleOptics.Grating;

/// <summary>A small dense complex matrix, row by row in one array; made once and refilled, so that hot loops allocate nothing.</summary>
/// <remarks>No method allows its result to be one of its operands unless it says so.</remarks>
internal sealed class ComplexMatrix
{
    private readonly Complex[] _elements;

    /// <summary>A matrix of zeros.</summary>
    public ComplexMatrix(int rows, int columns)
    {
        Rows = rows;
        Columns = columns;
        _elements = new Complex[rows * columns];
    }

    /// <summary>Number of rows.</summary>
    public int Rows { get; }

    /// <summary>Number of columns.</summary>
    public int Columns { get; }

    /// <summary>All elements, row after row.</summary>
    public Span<Complex> Elements => _elements;

    /// <summary>One element.</summary>
    public ref Complex this[int row, int column] => ref _elements[row * Columns + column];

    /// <summary>One row.</summary>
    public Span<Complex> Row(int row) => _elements.AsSpan(row * Columns, Columns);

    /// <summary>Sets every element to zero.</summary>
    public void Clear() => Array.Clear(_elements);

    /// <summary>Makes this the unit matrix.</summary>
    public void SetIdentity()
    {
        Clear();
        for (int i = 0; i < Rows; i++)
            this[i, i] = Complex.One;
    }

    /// <summary>Copies <paramref name="source"/>, of the same shape.</summary>
    public void CopyFrom(ComplexMatrix source) => source._elements.CopyTo(_elements.AsSpan());

    /// <summary>Adds <paramref name="term"/>, of the same shape.</summary>
    public void Add(ComplexMatrix term)
    {
        for (int i = 0; i < _elements.Length; i++)
            _elements[i] += term._elements[i];
    }

    /// <summary>Subtracts <paramref name="term"/>, of the same shape.</summary>
    public void Subtract(ComplexMatrix term)
    {
        for (int i = 0; i < _elements.Length; i++)
            _elements[i] -= term._elements[i];
    }

    /// <summary>Sets this to <paramref name="left"/> times <paramref name="right"/>.</summary>
    public void SetProduct(ComplexMatrix left, ComplexMatrix right)
    {
        Clear();
        AddProduct(left, right);
    }

    /// <summary>Adds <paramref name="left"/> times <paramref name="right"/>.</summary>
    public void AddProduct(ComplexMatrix left, ComplexMatrix right)
    {
        for (int row = 0; row < left.Rows; row++)
        {
            Span<Complex> sum = Row(row);
            ReadOnlySpan<Complex> factors = left.Row(row);
            int inner = 0;
            for (; inner + 4 <= factors.Length; inner += 4)
            {
                SubtractScaled(
                    sum, -factors[inner], right.Row(inner), -factors[inner + 1], right.Row(inner + 1),
                    -factors[inner + 2], right.Row(inner + 2), -factors[inner + 3], right.Row(inner + 3));
            }
            for (; inner < factors.Length; inner++)
                AddScaled(sum, factors[inner], right.Row(inner));
        }
    }

    /// <summary>Writes this times <paramref name="vector"/> into <paramref name="result"/>.</summary>
    public void Apply(ReadOnlySpan<Complex> vector, Span<Complex> result)
    {
        for (int row = 0; row < Rows; row++)
        {
            ReadOnlySpan<Complex> factors = Row(row);
            Complex sum = Complex.Zero;
            for (int column = 0; column < factors.Length; column++)
                sum += factors[column] * vector[column];
            result[row] = sum;
        }
    }

    /// <summary>Subtracts <paramref name="factor"/> times <paramref name="row"/> from <paramref name="target"/>.</summary>
    internal static void SubtractScaled(Span<Complex> target, Complex factor, ReadOnlySpan<Complex> row) => AddScaled(target, -factor, row);

    /// <summary>Subtracts four rows, each times its factor, from <paramref name="target"/>, whose length they have.</summary>
    internal static void SubtractScaled(
        Span<Complex> target, Complex factor0, ReadOnlySpan<Complex> row0, Complex factor1, ReadOnlySpan<Complex> row1,
        Complex factor2, ReadOnlySpan<Complex> row2, Complex factor3, ReadOnlySpan<Complex> row3)
    {
        int i = 0;
        if (Vector256.IsHardwareAccelerated && Math.Min(Math.Min(row0.Length, row1.Length), Math.Min(row2.Length, row3.Length)) >= target.Length)
        {
            (Vector256<double> re0, Vector256<double> im0) = Negated(factor0);
            (Vector256<double> re1, Vector256<double> im1) = Negated(factor1);
            (Vector256<double> re2, Vector256<double> im2) = Negated(factor2);
            (Vector256<double> re3, Vector256<double> im3) = Negated(factor3);
            for (; i <= target.Length - 2; i += 2)
            {
                Vector256<double> sum = At(target, i);
                sum = AddTimes(re0, im0, At(row0, i), sum);
                sum = AddTimes(re1, im1, At(row1, i), sum);
                sum = AddTimes(re2, im2, At(row2, i), sum);
                sum = AddTimes(re3, im3, At(row3, i), sum);
                sum.StoreUnsafe(ref Unsafe.As<Complex, double>(ref MemoryMarshal.GetReference(target)), (nuint)(2 * i));
            }
        }
        for (; i < target.Length; i++)
            target[i] -= factor0 * row0[i] + factor1 * row1[i] + (factor2 * row2[i] + factor3 * row3[i]);
    }

    /// <summary>Adds a real <paramref name="factor"/> times <paramref name="row"/> to <paramref name="target"/>.</summary>
    internal static void AddScaled(Span<Complex> target, double factor, ReadOnlySpan<Complex> row)
    {
        Span<double> sums = MemoryMarshal.Cast<Complex, double>(target);
        ReadOnlySpan<double> values = MemoryMarshal.Cast<Complex, double>(row);
        int i = 0;
        for (; i <= values.Length - Vector<double>.Count; i += Vector<double>.Count)
            (new Vector<double>(sums[i..]) + factor * new Vector<double>(values[i..])).CopyTo(sums[i..]);
        for (; i < values.Length; i++)
            sums[i] += factor * values[i];
    }

    // Complex numbers lie as (re, im) pairs; two fit one vector: target + re * row + im * (-imaginary, real) of row.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void AddScaled(Span<Complex> target, Complex factor, ReadOnlySpan<Complex> row)
    {
        int i = 0;
        if (Vector256.IsHardwareAccelerated && target.Length >= row.Length)
        {
            (Vector256<double> real, Vector256<double> imaginary) = Negated(-factor);
            for (; i <= row.Length - 2; i += 2)
            {
                AddTimes(real, imaginary, At(row, i), At(target, i))
                    .StoreUnsafe(ref Unsafe.As<Complex, double>(ref MemoryMarshal.GetReference(target)), (nuint)(2 * i));
            }
        }
        double re = factor.Real, im = factor.Imaginary;
        for (; i < row.Length; i++)
        {
            Complex value = row[i];
            target[i] = new Complex(
                target[i].Real + (re * value.Real - im * value.Imaginary), target[i].Imaginary + (re * value.Imaginary + im * value.Real));
        }
    }

    private static Vector256<double> At(ReadOnlySpan<Complex> row, int i)
        => Vector256.LoadUnsafe(ref Unsafe.As<Complex, double>(ref MemoryMarshal.GetReference(row)), (nuint)(2 * i));

    private static (Vector256<double> Real, Vector256<double> Imaginary) Negated(Complex factor)
        => (Vector256.Create(-factor.Real), Vector256.Create(factor.Imaginary, -factor.Imaginary, factor.Imaginary, -factor.Imaginary));

    private static Vector256<double> AddTimes(Vector256<double> real, Vector256<double> imaginary, Vector256<double> value, Vector256<double> sum)
    {
        Vector256<double> turned = Vector256.Shuffle(value, Vector256.Create(1L, 0, 3, 2));
        return Vector256.MultiplyAddEstimate(real, value, Vector256.MultiplyAddEstimate(imaginary, turned, sum));
    }
}
