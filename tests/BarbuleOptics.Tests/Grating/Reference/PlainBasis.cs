using System.Numerics;
using MathNet.Numerics.LinearAlgebra;

namespace BarbuleOptics.Tests.Grating.Reference;

/// <summary>The plane waves kept and the equations of the tangential fields E = (Ex, Ey), H = (Hx, Hy) in a slice.</summary>
/// <remarks>
/// Lengths in units of 1/k0, H times the vacuum impedance, exp(i (K x + kappa y) - i w t). With curl E = i H, curl H = -i e E,
/// dE/dz = i P H, dH/dz = i Q E:
///   dEx/dz = i [ kappa K e^-1 Hx + (1 - K e^-1 K) Hy ]      dEy/dz = i [ (kappa^2 e^-1 - 1) Hx - kappa e^-1 K Hy ]
///   dHx/dz = i [ (K^2 - e) Ey - kappa K Ex ]                dHy/dz = i [ kappa K Ey + (a - kappa^2) Ex ]
/// where e is the Toeplitz matrix of the permittivity and a the inverse of that of its reciprocal: e Ex is continuous across vertical
/// faces and Ex jumps (inverse rule: Li 1996, J. Opt. Soc. Am. A 13:1870, 10.1364/JOSAA.13.001870). With kappa = 0 the pairs (Ey, Hx)
/// and (Ex, Hy) separate, and only one is kept.
/// </remarks>
internal sealed class PlainBasis
{
    public PlainBasis(PlainGrating grating, PlainLight light, int harmonics, bool keepBoth)
    {
        int count = 2 * harmonics + 1;
        Kappa = grating.SurroundIndex * light.Sine * light.Along;
        K = [.. Enumerable.Range(-harmonics, count).Select(n => grating.SurroundIndex * light.Sine * light.Across + n * light.WavelengthNm / grating.PeriodNm)];
        HasX = keepBoth || Kappa != 0 || light.IsP;
        HasY = keepBoth || Kappa != 0 || !light.IsP;
    }

    /// <summary>Wave vectors across the rods over k0, one an order.</summary>
    public double[] K { get; }

    /// <summary>Wave vector along the rods over k0.</summary>
    public double Kappa { get; }

    /// <summary>Whether Ex and Hy are kept.</summary>
    public bool HasX { get; }

    /// <summary>Whether Ey and Hx are kept.</summary>
    public bool HasY { get; }

    /// <summary>Wave vector in depth over k0, Im >= 0, never zero.</summary>
    public Complex Depth(Complex permittivity, int index)
    {
        Complex root = ForwardRoot(permittivity - K[index] * K[index] - Kappa * Kappa);
        return Complex.Abs(root) < 1e-9 ? 1e-9 : root;
    }

    /// <summary>The root of a wave that decays or moves downward; a hair below the real axis is rounding.</summary>
    public static Complex ForwardRoot(Complex square)
    {
        Complex root = Complex.Sqrt(square);
        return root.Imaginary < -1e-10 * root.Magnitude ? -root : root;
    }

    /// <summary>P and Q of a slice.</summary>
    public (Matrix<Complex> P, Matrix<Complex> Q) Equations(PlainSlice slice)
    {
        int count = K.Length;
        Matrix<Complex> one = Matrix<Complex>.Build.DenseIdentity(count);
        Matrix<Complex> k = Matrix<Complex>.Build.DenseOfDiagonalArray([.. K.Select(value => (Complex)value)]);
        Matrix<Complex> e = Toeplitz(slice, value => value), inverse = e.Inverse();
        Matrix<Complex> a = Toeplitz(slice, value => 1 / value).Inverse();
        Matrix<Complex> xy = one - k * inverse * k, qxx = a - Kappa * Kappa * one;
        Matrix<Complex> yx = Kappa * Kappa * inverse - one, qyy = k * k - e;
        if (!HasY)
            return (xy, qxx);
        if (!HasX)
            return (yx, qyy);
        // Unknowns (Ex, Ey) and (Hx, Hy): the rows of P give Ex', Ey', those of Q give Hx', Hy'.
        return (Join(Kappa * k * inverse, xy, yx, -Kappa * inverse * k), Join(-Kappa * k, qyy, qxx, Kappa * k));
    }

    /// <summary>Element <paramref name="index"/> of the vector that holds Ex (x) or Ey, Hy (x) or Hx where one pair is kept.</summary>
    public int Place(bool isX, int index) => HasX && HasY && !isX ? index + K.Length : index;

    private Matrix<Complex> Toeplitz(PlainSlice slice, Func<Complex, Complex> function)
    {
        int count = K.Length;
        Complex[] coefficients = [.. Enumerable.Range(1 - count, 2 * count - 1).Select(m => slice.Fourier(m, function))];
        return Matrix<Complex>.Build.Dense(count, count, (row, column) => coefficients[row - column + count - 1]);
    }

    private static Matrix<Complex> Join(Matrix<Complex> a, Matrix<Complex> b, Matrix<Complex> c, Matrix<Complex> d)
        => Matrix<Complex>.Build.DenseOfMatrixArray(new[,] { { a, b }, { c, d } });
}
