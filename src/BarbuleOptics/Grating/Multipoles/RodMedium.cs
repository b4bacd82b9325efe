using System.Numerics;

namespace BarbuleOptics.Grating.Multipoles;

/// <summary>A medium as the multipoles of a rod see it: coefficients of the radial fluxes of the fields along the rods.</summary>
/// <remarks>
/// For Ey = e cos(m theta), Hy = h sin(m theta) the continuous fluxes are r f_E = A r de/dr - C m h (along cos) and
/// r f_H = B r dh/dr - C m e (along sin), with A = k0^2 e/q, B = k0^2/q, C = k0 ky/q, q = k0^2 e - ky^2; sine and cosine exchanged
/// turns the sign of C. The power through a circle is the mean of Im(conj(e) r f_E + conj(h) r f_H), see <see cref="GratingWaves"/>.
/// </remarks>
internal readonly record struct RodMedium(Complex A, Complex B, Complex C)
{
    /// <summary>The medium with wave number <paramref name="k"/> across the rods.</summary>
    public static RodMedium Of(GratingWaves waves, Complex permittivity, Complex k)
    {
        Complex q = k * k;
        double k0 = waves.K0;
        return waves.Ky == 0
            ? new RodMedium(Complex.One, 1 / permittivity, Complex.Zero)
            : new RodMedium(k0 * k0 * permittivity / q, k0 * k0 / q, k0 * waves.Ky / q);
    }

    /// <summary>Fluxes r f of fields <paramref name="value"/> (both alike) with r d/dr of them <paramref name="slope"/>.</summary>
    public FieldPair Flux(int m, Complex value, Complex slope)
    {
        Complex across = -m * (C * value);
        return new FieldPair(A * slope, across, across, B * slope);
    }
}
