using System.Numerics;
using static BarbuleOptics.Multilayer.StableFunctions;

namespace BarbuleOptics.Multilayer;

/// <summary>The waves in a thick slab between the films and a half-space, averaged over one full turn of the round-trip phase.</summary>
/// <remarks>
/// Down wave D and up wave U at the upper face; X = exp(i phase) of the round trip, g = exp(-2x'') its decay, which stays fixed.
/// U = r_b g X D with r_b the reflection at the lower face, and D = t + r' U, with t what the films let in and r' their
/// reflection seen from the slab. So D = t/(1 - q X) with q = r' r_b g, and as a geometric series
/// mean |D|^2 = |t|^2/(1 - |q|^2), mean |D|^2 X = conj(q) mean |D|^2, mean U conj(t) = 0.
/// The last says that the waves that enter the films from above and from below add their powers.
/// Over the depth the power lost needs the integrals of |down|^2 + |up|^2 = |D|^2 (1 - g)(1 + |r_b|^2 g)/(2k'') and of
/// 2 Re(conj(down) up) = |D|^2 g Im(r_b (X - 1))/k'.
/// </remarks>
internal readonly struct SlabAverage
{
    /// <summary>The averages for one slab and the films above it.</summary>
    /// <param name="slab">The slab, which has fringes.</param>
    /// <param name="films">The films seen from the slab.</param>
    /// <param name="entered">|t|^2.</param>
    public SlabAverage(in Slab slab, in Entrance films, double entered)
    {
        Complex eta = slab.Medium.Admittance;
        Complex sum = eta + slab.Behind.Admittance;
        Complex faceReflection = (eta - slab.Behind.Admittance) / sum;
        double faceReflected = Norm(faceReflection);
        (double kept, double faded) = Decay(2 * slab.Medium.Depth.Imaginary * slab.Thickness);
        Complex q = films.Reflection * faceReflection * kept;

        // 1 - |q|^2 as a sum of what each pass takes away, so that a wave almost shut in keeps its digits.
        Complex own = Complex.Conjugate(eta) * slab.Behind.Admittance;
        double leftByFace = faded * (1 + kept) + kept * kept * 4 * own.Real / Norm(sum);
        double taken = films.NotReflected + films.Reflected * leftByFace;
        double down = taken > 0 ? entered / taken : 0; // where nothing gets out, nothing gets in
        Up = down * faceReflected * kept * kept;
        Behind = down * kept * 4 * Norm(eta) / Norm(sum);

        double decay = 2 * slab.Medium.Depth.Imaginary;
        double depth = decay == 0 ? slab.Thickness : faded / decay;
        double direct = depth * (1 + faceReflected * kept);
        double cross = kept * (faceReflection * (Complex.Conjugate(q) - 1)).Imaginary / slab.Medium.Depth.Real;
        Lost = down * (slab.Medium.PhiLoss * (direct + cross) + slab.Medium.PsiLoss * Norm(eta) * (direct - cross));
    }

    /// <summary>Mean |U|^2.</summary>
    public double Up { get; }

    /// <summary>Mean |phi|^2 at the face of the half-space.</summary>
    public double Behind { get; }

    /// <summary>Mean power lost in the slab, where phi is down + up and psi is eta (down - up).</summary>
    public double Lost { get; }
}
