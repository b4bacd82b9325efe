using System.Numerics;
using static BarbuleOptics.Multilayer.StableFunctions;

namespace BarbuleOptics.Multilayer;

/// <summary>What a wave of unit |phi|^2 meets where it enters a stack whose fields at the entrance are known up to a factor.</summary>
/// <remarks>The admittance met is Y = (P + iW)/|phi|^2, or 1/Y = (P - iW)/|psi|^2 where that is the better known one, with P the
/// flux carried beside the fields and W their reactive power. r = (eta - Y)/(eta + Y). For a real eta the numerator's
/// modulus cannot exceed the denominator's, not even by rounding, since P is never negative.</remarks>
internal readonly struct Entrance
{
    public Entrance(in TangentialField field, Complex eta)
    {
        double etaSquared = Norm(eta);
        double phi = field.PhiSquared;
        double psi = field.PsiSquared;
        bool byAdmittance = etaSquared * phi >= psi;
        Complex own = byAdmittance ? eta * phi : eta * new Complex(field.Flux, -field.Reactive);
        Complex met = byAdmittance ? new Complex(field.Flux, field.Reactive) : psi;
        Complex sum = own + met;
        double norm = Norm(sum);
        Reflection = (own - met) / sum;
        Reflected = Norm(own - met) / norm;
        NotReflected = 4 * (own.Real * met.Real + own.Imaginary * met.Imaginary) / norm;
        Unit = 4 * etaSquared * (byAdmittance ? phi : psi) / norm;
    }

    /// <summary>r, of phi.</summary>
    public Complex Reflection { get; }

    /// <summary>|r|^2.</summary>
    public double Reflected { get; }

    /// <summary>1 - |r|^2, accurate where it is small.</summary>
    public double NotReflected { get; }

    /// <summary>Factor that takes the powers found in the scale of the fields to an incident wave of unit |phi|^2.</summary>
    public double Unit { get; }
}
