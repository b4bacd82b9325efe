using MathNet.Numerics.LinearAlgebra;

namespace BarbuleOptics.Color;

/// <summary>A 3 by 3 matrix that maps one set of tristimulus-like values to another.</summary>
internal sealed class Matrix3
{
    private readonly double[,] _m;

    /// <param name="rows">3 by 3; not copied, so give it away.</param>
    public Matrix3(double[,] rows) => _m = rows;

    public Matrix3 Inverse() => new(Matrix<double>.Build.DenseOfArray(_m).Inverse().ToArray());

    public (double First, double Second, double Third) Times(double a, double b, double c) => (
        _m[0, 0] * a + _m[0, 1] * b + _m[0, 2] * c,
        _m[1, 0] * a + _m[1, 1] * b + _m[1, 2] * c,
        _m[2, 0] * a + _m[2, 1] * b + _m[2, 2] * c);
}
