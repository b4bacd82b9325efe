using System.Numerics;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Layering;

/// <summary>The end of the backing, so far away that its thickness is averaged over at least one fringe.</summary>
public sealed class IncoherentBack
{
    private readonly Complex[] _behind;

    /// <summary>A backing of <paramref name="thickness"/> (0 or above) in front of a half-space.</summary>
    /// <param name="thickness">Thickness of the backing.</param>
    /// <param name="behind">Isotropic permittivity behind it, imaginary part 0 or above; one for each wavelength of the stack.</param>
    /// <exception cref="ArgumentOutOfRangeException">The thickness or an imaginary part is below zero.</exception>
    public IncoherentBack(Length thickness, ReadOnlySpan<Complex> behind)
    {
        ThicknessNm = Guard.NotNegative(thickness.Nanometres, nameof(thickness));
        foreach (Complex permittivity in behind)
            Guard.NotNegative(permittivity.Imaginary, nameof(behind));
        _behind = behind.ToArray();
    }

    /// <summary>Thickness of the backing, in nm.</summary>
    public double ThicknessNm { get; }

    /// <summary>Permittivity behind it, at each wavelength.</summary>
    public ReadOnlySpan<Complex> Behind => _behind;
}
