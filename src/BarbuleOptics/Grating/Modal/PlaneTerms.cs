using System.Numerics;

namespace BarbuleOptics.Grating.Modal;

/// <summary>What plane waves leaving into a medium, and homogeneous layers, add to the equations of a sector.</summary>
internal static class PlaneTerms
{
    /// <summary>Above this |kz h| exponentials serve, below it sine and cosine, which keep their digits near zero.</summary>
    private const double LargePhase = 1;

    /// <summary>Adds the terms of outgoing waves at the top or the bottom plane.</summary>
    public static void AddOutgoing(ModalWaves waves, in ModalSector sector, Complex permittivity, bool isTop, ComplexMatrix system)
    {
        (Complex electric, Complex magnetic) = waves.FluxFactors(permittivity);
        for (int row = 0; row < sector.Size; row++)
        {
            (int harmonic, bool isElectric) = Unknown(sector, row);
            system[row, row] += -Complex.ImaginaryOne * waves.KzIn(permittivity, harmonic) * (isElectric ? electric : sector.MagneticSign * magnetic);
        }
        AddCross(waves, sector, magnetic, isTop ? 1 : -1, system, 0);
    }

    /// <summary>Right side of a unit amplitude that falls on a plane, of one unknown.</summary>
    public static Complex Incoming(ModalWaves waves, in ModalSector sector, Complex permittivity, int harmonic, bool isElectric)
    {
        (Complex electric, Complex magnetic) = waves.FluxFactors(permittivity);
        return new Complex(0, -2) * waves.KzIn(permittivity, harmonic) * (isElectric ? electric : sector.MagneticSign * magnetic);
    }

    /// <summary>Sets the Dirichlet-to-Neumann matrix of a layer of one medium: a kz (cot kz h, -1 / sin kz h).</summary>
    /// <remarks>Real kz h must stay below pi, where the matrix has its first pole.</remarks>
    public static void SetLayer(ModalWaves waves, in ModalSector sector, Complex permittivity, double heightNm, ComplexMatrix condensed)
    {
        condensed.Clear();
        int size = sector.Size;
        (Complex electric, Complex magnetic) = waves.FluxFactors(permittivity);
        for (int row = 0; row < size; row++)
        {
            (int harmonic, bool isElectric) = Unknown(sector, row);
            Complex factor = isElectric ? electric : sector.MagneticSign * magnetic;
            (Complex same, Complex other) = CotAndInverseSine(waves.KzIn(permittivity, harmonic), heightNm);
            condensed[row, row] = condensed[size + row, size + row] = factor * same;
            condensed[row, size + row] = condensed[size + row, row] = -factor * other;
        }
        AddCross(waves, sector, magnetic, -1, condensed, 0);
        AddCross(waves, sector, magnetic, 1, condensed, size);
    }

    /// <summary>Harmonic and field of an unknown of a sector.</summary>
    public static (int Harmonic, bool IsElectric) Unknown(in ModalSector sector, int unknown)
        => unknown < sector.Electric.Count
            ? (sector.Electric.HarmonicOf(unknown), true)
            : (sector.Magnetic.HarmonicOf(unknown - sector.Electric.Count), false);

    // F_E holds c dH/dx and F_H holds -c dE/dx, c = alpha/(e - alpha^2); the equations of H are taken negative.
    private static void AddCross(ModalWaves waves, in ModalSector sector, Complex magnetic, double sign, ComplexMatrix system, int first)
    {
        if (waves.Alpha == 0)
            return;
        for (int e = 0; e < sector.Electric.Count; e++)
        {
            int harmonic = sector.Electric.HarmonicOf(e), h = sector.Magnetic.CombinationOf(harmonic);
            if (h < 0)
                continue;
            int column = sector.Electric.Count + h;
            Complex term = new Complex(0, sign * waves.Alpha * waves.Kx[harmonic + waves.Harmonics]) * magnetic;
            system[first + e, first + column] += term;
            system[first + column, first + e] += term;
        }
    }

    private static (Complex Same, Complex Other) CotAndInverseSine(Complex kz, double heightNm)
    {
        Complex phase = kz * heightNm;
        if (Complex.Abs(phase) < LargePhase)
        {
            Complex inverse = kz / Complex.Sin(phase);
            return (inverse * Complex.Cos(phase), inverse);
        }
        // cot x = -i (1 + g^2)/(1 - g^2), 1/sin x = -2 i g/(1 - g^2) with g = exp(i x), which never grows.
        Complex g = Complex.Exp(Complex.ImaginaryOne * phase), scale = -Complex.ImaginaryOne * kz / (1 - g * g);
        return (scale * (1 + g * g), scale * 2 * g);
    }
}
