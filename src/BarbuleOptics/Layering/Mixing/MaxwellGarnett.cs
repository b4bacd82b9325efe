using System.Numerics;

namespace BarbuleOptics.Layering.Mixing;

/// <summary>Two-dimensional Maxwell Garnett: cylinders in the matrix, (e - eh)/(e + eh) = sum f a; along the rods sum f e.</summary>
/// <remarks>a = (ei - eh)/(ei + eh) for a solid cylinder (Maxwell Garnett 1904; two dimensions: Rayleigh 1892); for a hollow one
/// the polarizability of a coated cylinder with the shell and core areas that this body has in the cut
/// (Bohren and Huffman 1983, section 5.4, the cylinder in place of the sphere; from memory).</remarks>
public sealed class MaxwellGarnett : IMixingRule
{
    /// <inheritdoc/>
    public string Name => "maxwell-garnett";

    /// <inheritdoc/>
    public string Description => "two-dimensional Maxwell Garnett, every body a cylinder, a hollow one a coated cylinder; along the rods the mean permittivity";

    /// <inheritdoc/>
    public DiagonalPermittivity Mix(SectionCut cut, ReadOnlySpan<Complex> permittivities, double wavelengthNm)
    {
        Complex host = permittivities[cut.Background];
        Complex sum = Complex.Zero;
        foreach (CutBody body in cut.Bodies)
            sum += (body.ShellShare + body.CoreShare) * Polarizability(body, permittivities, host);
        Complex inPlane = PassiveRoot.Passive(host * (1 + sum) / (1 - sum));
        return new(inPlane, Averages.Permittivity(cut, permittivities), inPlane);
    }

    private static Complex Polarizability(CutBody body, ReadOnlySpan<Complex> permittivities, Complex host)
    {
        Complex shell = permittivities[body.Material];
        double area = body.ShellShare + body.CoreShare;
        if (body.CoreShare <= 0 || area <= 0)
            return (shell - host) / (shell + host);
        Complex core = permittivities[body.CoreMaterial];
        double share = body.CoreShare / area;
        Complex above = (shell - host) * (core + shell) + share * (shell + host) * (core - shell);
        Complex below = (shell + host) * (core + shell) + share * (shell - host) * (core - shell);
        return above / below;
    }
}
