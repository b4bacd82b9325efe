using System.Numerics;

namespace BarbuleOptics.Grating.Modal;

/// <summary>The operators of one depth over the harmonics -N..N: what the fields' gradients are multiplied by.</summary>
/// <remarks>
/// With alpha = ky/k0 and the fields' combination d = (alpha dE/dx - dH/dz, alpha dE/dz + dH/dx) the weak form is
/// int [grad v_E . grad E - k0^2 v_E e E + d_v . eta d - k0^2 v_H H], where eta stands for 1/(e - alpha^2); (i/k0) eta d is the
/// electric field across the rods. Across a wall the component of eta d along it is continuous, and the component of d along
/// its normal is so but for what multiplies 1/e alone. By the rules for Fourier products (L. Li, J. Opt. Soc. Am. A 13, 1870, 1996)
/// d along the wall meets Q = ([e] - alpha^2)^-1, d along the normal meets W = ([1/e]^-1 - alpha^2)^-1. In x and z:
/// eta_xx = Q + D n_x^2, eta_zz = W - D n_x^2, eta_xz = D n_x n_z with D = W - Q, each product taken symmetrically.
/// At alpha = 0: Q = [e]^-1, W = [1/e].
/// </remarks>
internal sealed class CutOperators
{
    /// <summary>Operators over 2 N + 1 harmonics.</summary>
    public CutOperators(int harmonics)
    {
        int count = 2 * harmonics + 1;
        Permittivity = new Complex[2 * count - 1];
        Xx = new ComplexMatrix(count, count);
        Zz = new ComplexMatrix(count, count);
        Xz = new ComplexMatrix(count, count);
    }

    /// <summary>Fourier coefficients -2N..2N of the permittivity.</summary>
    public Complex[] Permittivity { get; }

    /// <summary>eta_xx.</summary>
    public ComplexMatrix Xx { get; }

    /// <summary>eta_zz.</summary>
    public ComplexMatrix Zz { get; }

    /// <summary>eta_xz, the same as eta_zx.</summary>
    public ComplexMatrix Xz { get; }
}
