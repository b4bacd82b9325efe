using System.Numerics;
using static BarbuleOptics.Multilayer.StableFunctions;

namespace BarbuleOptics.Multilayer;

/// <summary>The tangential fields at one face, up to a common factor, and the power flux away from the light beside them.</summary>
/// <remarks>The flux is carried by itself as a sum of positive terms. Re(conj(phi) psi) would give it too, but in a
/// guided resonance that is a small difference of large reactive powers, and rounding would create or destroy power.</remarks>
internal struct TangentialField
{
    // Between these the squares of squares that follow neither overflow nor lose digits.
    private const double Least = 1e-60;
    private const double Most = 1e60;

    private Complex _phi;
    private Complex _psi;

    /// <summary>The outgoing wave in a half-space, at its face, with phi = 1.</summary>
    public TangentialField(Complex admittance)
    {
        _phi = Complex.One;
        _psi = admittance;
        Flux = admittance.Real;
    }

    /// <summary>Power flux away from the light, 0 or above.</summary>
    public double Flux { get; private set; }

    /// <summary>Power lost in the film last passed, in the present scale.</summary>
    public double Lost { get; private set; }

    /// <summary>Factor that takes a power below the film last passed into the present scale.</summary>
    public double Scale { get; private set; }

    /// <summary>|phi|^2.</summary>
    public readonly double PhiSquared => Norm(_phi);

    /// <summary>|psi|^2.</summary>
    public readonly double PsiSquared => Norm(_psi);

    /// <summary>Im(conj(phi) psi).</summary>
    public readonly double Reactive => _phi.Real * _psi.Imaginary - _phi.Imaginary * _psi.Real;

    /// <summary>Moves from the far face of a film to the near one.</summary>
    public void Pass(in FilmStep film)
    {
        Half(film);
        (double phi, double psi) = (PhiSquared, PsiSquared);
        Half(film);
        Flux = film.Kept * Flux + (film.PhiEntering * phi + film.PsiEntering * psi);
        Lost = film.PhiLost * phi + film.PsiLost * psi;
        Scale = film.Kept;
        double size = PhiSquared + PsiSquared;
        if (!(size > Least && size < Most))
            Rescale(size);
    }

    private void Half(in FilmStep film)
        => (_phi, _psi) = (film.Same * _phi + film.PsiToPhi * _psi, film.PhiToPsi * _phi + film.Same * _psi);

    // By a power of two, which is exact.
    private void Rescale(double size)
    {
        double factor = Math.ScaleB(1, -Math.ILogB(size) / 2);
        _phi *= factor;
        _psi *= factor;
        Flux *= factor * factor;
        Lost *= factor * factor;
        Scale *= factor * factor;
    }
}
