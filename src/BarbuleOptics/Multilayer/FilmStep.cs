using System.Numerics;
using static BarbuleOptics.Multilayer.StableFunctions;

namespace BarbuleOptics.Multilayer;

/// <summary>What one film does to the fields, as two equal halves.</summary>
/// <remarks>
/// With h = exp(i kz d), |h| at most 1, half a film takes (phi, psi) at its lower face to its upper face, times exp(i kz d/2), by
/// ((1 + h)/2, (1 - h)/(2 eta); eta (1 - h)/2, (1 + h)/2). No factor grows, and (1 - h)/eta stays accurate to kz = 0, where
/// splitting the field into a wave each way would fail. About the middle of the film the field is an even part, phi there, and
/// an odd part, psi there; products of the two vanish on integration, so that every power below is a sum of
/// two positive terms and nothing cancels, at a guided resonance either.
/// Power that enters through the faces and does not leave (Poynting):
/// ((eta' (1 - |h|^2) + 2 eta'' Im h) |phi|^2 + (eta' (1 - |h|^2) - 2 eta'' Im h) |psi/eta|^2)/2.
/// Power lost inside, with x = kz d, a = (1 - exp(-2x''))/(2x''), b = exp(-x'') sin(x')/x':
/// k0 d/2 (PhiLoss ((a + b)|phi|^2 + (a - b)|psi/eta|^2) + PsiLoss ((a + b)|psi|^2 + (a - b)|eta phi|^2)).
/// The two are equal; the first carries the reflectance, the second is the absorptance, and that they agree is tested.
/// </remarks>
internal readonly struct FilmStep
{
    public FilmStep(in MediumWave medium, double thickness)
    {
        // x = kz d: thickness is k0 d.
        double turn = medium.Depth.Real * thickness;
        double decay = medium.Depth.Imaginary * thickness;
        (double kept, double faded) = Decay(decay);
        (double sine, double cosine) = Math.SinCos(0.5 * turn);
        double swing = 2 * kept * sine * cosine; // Im h
        var change = new Complex(faded + 2 * kept * sine * sine, -swing); // 1 - h
        double spent = faded * (1 + kept); // 1 - |h|^2

        Kept = kept * kept;
        Same = 1 - 0.5 * change;
        PhiToPsi = 0.5 * change * medium.Admittance;
        if (medium.Admittance == Complex.Zero)
        {
            PsiToPhi = new Complex(0, -0.5 * thickness) * medium.Ratio;
            PsiEntering = thickness * medium.Ratio.Imaginary;
        }
        else
        {
            PsiToPhi = 0.5 * change * medium.InverseAdmittance;
            (PhiEntering, PsiEntering) = Entering(medium.Admittance, spent, swing);
        }
        if (medium.IsLossy)
            (PhiLost, PsiLost) = Lost(medium, thickness, turn, decay, kept, spent, swing);
    }

    /// <summary>|h|^2, the factor by which every power below the film shrinks in the scale of the fields above it.</summary>
    public double Kept { get; }

    /// <summary>(1 + h)/2, phi to phi and psi to psi.</summary>
    public Complex Same { get; }

    /// <summary>eta (1 - h)/2.</summary>
    public Complex PhiToPsi { get; }

    /// <summary>(1 - h)/(2 eta).</summary>
    public Complex PsiToPhi { get; }

    /// <summary>Power entering for a unit |phi|^2 in the middle.</summary>
    public double PhiEntering { get; }

    /// <summary>Power entering for a unit |psi|^2 in the middle.</summary>
    public double PsiEntering { get; }

    /// <summary>Power lost inside for a unit |phi|^2 in the middle.</summary>
    public double PhiLost { get; }

    /// <summary>Power lost inside for a unit |psi|^2 in the middle.</summary>
    public double PsiLost { get; }

    // Neither is negative but for the last digit of a difference.
    private static (double Phi, double Psi) Entering(Complex eta, double spent, double swing)
    {
        double traveling = 0.5 * eta.Real * spent;
        double standing = eta.Imaginary * swing;
        return (Math.Max(0, traveling + standing), Math.Max(0, traveling - standing) / Norm(eta));
    }

    private static (double Phi, double Psi) Lost(
        in MediumWave medium, double thickness, double turn, double decay, double kept, double spent, double swing)
    {
        double a = decay == 0 ? 1 : spent / (2 * decay);
        double b = turn == 0 ? kept : swing / turn;
        double size = turn * turn + decay * decay;
        double etaSquared = Norm(medium.Admittance);
        double odd, oddOverEta;
        if (size < 1)
        {
            double gap = kept * SincGap(turn, decay);
            odd = gap * size * etaSquared;
            oddOverEta = gap * thickness * thickness * Norm(medium.Ratio);
        }
        else
        {
            odd = (a - b) * etaSquared;
            oddOverEta = (a - b) / etaSquared;
        }
        double half = 0.5 * thickness;
        return (half * (medium.PhiLoss * (a + b) + medium.PsiLoss * odd), half * (medium.PhiLoss * oddOverEta + medium.PsiLoss * (a + b)));
    }
}
