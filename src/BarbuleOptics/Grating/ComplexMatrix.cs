using System.Numerics;
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
            for (int inner = 0; inner < factors.Length; inner++)
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

    // Complex numbers lie as (re, im) pairs; two fit one vector: target + re * row + im * (-imaginary, real) of row.
    private static void AddScaled(Span<Complex> target, Complex factor, ReadOnlySpan<Complex> row)
    {
        Span<double> sums = MemoryMarshal.Cast<Complex, double>(target);
        ReadOnlySpan<double> values = MemoryMarshal.Cast<Complex, double>(row);
        double re = factor.Real, im = factor.Imaginary;
        int i = 0;
        if (Vector256.IsHardwareAccelerated)
        {
            Vector256<double> real = Vector256.Create(re), imaginary = Vector256.Create(-im, im, -im, im);
            for (; i + Vector256<double>.Count <= values.Length; i += Vector256<double>.Count)
            {
                Vector256<double> value = Vector256.Create(values[i..]);
                Vector256<double> turned = Vector256.Shuffle(value, Vector256.Create(1L, 0, 3, 2));
                (Vector256.Create<double>(sums[i..]) + (real * value + imaginary * turned)).CopyTo(sums[i..]);
            }
        }
        for (; i < values.Length; i += 2)
        {
            double valueRe = values[i], valueIm = values[i + 1];
            sums[i] += re * valueRe - im * valueIm;
            sums[i + 1] += re * valueIm + im * valueRe;
        }
    }
}
