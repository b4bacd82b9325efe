using System.Numerics;
using MathNet.Numerics.LinearAlgebra;
using MathNet.Numerics.LinearAlgebra.Factorization;

namespace BarbuleOptics.Tests.Grating.Reference;

/// <summary>Modes of a slice: E = W (a + b), H = V (a - b), where a grows by exp(i gamma z) downward and b upward.</summary>
internal sealed class PlainModes
{
    private PlainModes(Matrix<Complex> w, Matrix<Complex> v, Complex[] gamma)
    {
        W = w;
        V = v;
        Gamma = gamma;
    }

    public Matrix<Complex> W { get; }

    public Matrix<Complex> V { get; }

    /// <summary>Over k0, Im >= 0 but for rounding.</summary>
    public Complex[] Gamma { get; }

    public static PlainModes Of(PlainSlice slice, PlainBasis basis)
    {
        if (slice.IsHomogeneous)
            return OfFilm(slice.Permittivities[0], basis);
        (Matrix<Complex> p, Matrix<Complex> q) = basis.Equations(slice);
        Evd<Complex> evd = (p * q).Evd(Symmetricity.Asymmetric);
        Complex[] gamma = [.. evd.EigenValues.Select(PlainBasis.ForwardRoot)];
        Matrix<Complex> w = evd.EigenVectors;
        Matrix<Complex> v = q * w;
        v.MapIndexedInplace((_, column, value) => value / gamma[column]);
        return new PlainModes(w, v, gamma);
    }

    /// <summary>Plane waves, numbered by Ex or Ey of each order: H = k x E / k0 with Ez = -(kx Ex + ky Ey)/kz.</summary>
    public static PlainModes OfFilm(Complex permittivity, PlainBasis basis)
    {
        int count = basis.K.Length, size = basis.HasX && basis.HasY ? 2 * count : count;
        Matrix<Complex> v = Matrix<Complex>.Build.Dense(size, size);
        var gamma = new Complex[size];
        for (int i = 0; i < count; i++)
        {
            Complex kz = basis.Depth(permittivity, i);
            double kx = basis.K[i], ky = basis.Kappa;
            if (basis is { HasX: true, HasY: true })
            {
                v[i, i] = -kx * ky / kz;
                v[i, i + count] = -(kz + ky * ky / kz);
                v[i + count, i] = kz + kx * kx / kz;
                v[i + count, i + count] = kx * ky / kz;
                gamma[i] = gamma[i + count] = kz;
            }
            else
            {
                v[i, i] = basis.HasX ? kz + kx * kx / kz : -kz;
                gamma[i] = kz;
            }
        }
        return new PlainModes(Matrix<Complex>.Build.DenseIdentity(size), v, gamma);
    }
}
