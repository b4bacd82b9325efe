using System.Numerics;
using BarbuleOptics.Layering;
using static BarbuleOptics.Multilayer.StableFunctions;

namespace BarbuleOptics.Multilayer;

/// <summary>How one wave travels in one medium: the constants that all films of that medium share.</summary>
/// <remarks>
/// Time factor exp(-i omega t), z into the barbule. The two tangential fields, free of their common factors:
/// s: phi = Ey, psi = -Hx; p: phi = Hy, psi = Ex. Then d(phi)/dz = i k0 m psi, with m = 1 in s and m = ex in p, and a wave
/// that travels or decays towards +z has psi = eta phi.
/// s: kz/k0 = sqrt(ey - K^2) = eta. p: kz/k0 = sqrt(ex) q and eta = q/sqrt(ex), with q = sqrt(1 - K^2/ez); K = kx/k0.
/// Im(1 - K^2/ez) = K^2 Im(ez)/|ez|^2 is never negative, so every root taken lies in the first quadrant: kz has an imaginary
/// part of 0 or above (its real part may be negative, in a metal-like film with another ez), eta a real part of 0 or above,
/// which makes the medium passive by construction.
/// The power flux along z is Re(conj(phi) psi). The power lost in a volume is k0 times the integral of
/// PhiLoss |phi|^2 + PsiLoss |psi|^2, which is Im(ey)|Ey|^2 in s and Im(ex)|Ex|^2 + Im(ez)|Ez|^2 in p, where Ez = -K Hy/ez.
/// </remarks>
internal readonly struct MediumWave
{
    private MediumWave(Complex depth, Complex admittance, Complex ratio, double phiLoss, double psiLoss)
    {
        Depth = depth;
        Admittance = admittance;
        InverseAdmittance = admittance == Complex.Zero ? Complex.Zero : Complex.Conjugate(admittance) / Norm(admittance);
        Ratio = ratio;
        PhiLoss = phiLoss;
        PsiLoss = psiLoss;
    }

    /// <summary>kz/k0.</summary>
    public Complex Depth { get; }

    /// <summary>eta, psi/phi of a wave towards +z.</summary>
    public Complex Admittance { get; }

    /// <summary>1/eta, or 0 where eta is exactly 0.</summary>
    public Complex InverseAdmittance { get; }

    /// <summary>m = (kz/k0)/eta.</summary>
    public Complex Ratio { get; }

    /// <summary>Weight of |phi|^2 in the power lost.</summary>
    public double PhiLoss { get; }

    /// <summary>Weight of |psi|^2 in the power lost.</summary>
    public double PsiLoss { get; }

    /// <summary>Whether the medium takes up power.</summary>
    public bool IsLossy => PhiLoss > 0 || PsiLoss > 0;

    /// <summary>The wave <paramref name="light"/> makes in a medium.</summary>
    public static MediumWave Of(in DiagonalPermittivity medium, in PlaneWave light) => light.IsP ? OfP(medium, light) : OfS(medium, light);

    private static MediumWave OfS(in DiagonalPermittivity medium, in PlaneWave light)
    {
        Complex depth = UpperSqrt(light.MinusLateralSquared(medium.Y.Real), medium.Y.Imaginary);
        return new MediumWave(depth, depth, Complex.One, medium.Y.Imaginary, 0);
    }

    private static MediumWave OfP(in DiagonalPermittivity medium, in PlaneWave light)
    {
        Complex index = UpperSqrt(medium.X.Real, medium.X.Imaginary);
        (double ez, double loss) = (medium.Z.Real, medium.Z.Imaginary);
        double norm = ez * ez + loss * loss;
        double lateralLoss = light.LateralSquared * loss / norm;
        Complex q = UpperSqrt((ez * light.MinusLateralSquared(ez) + loss * loss) / norm, lateralLoss);
        Complex admittance = q * Complex.Conjugate(index) / Norm(index);
        return new MediumWave(index * q, admittance, medium.X, lateralLoss, medium.X.Imaginary);
    }
}
