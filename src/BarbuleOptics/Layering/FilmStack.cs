using System.Numerics;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Layering;

/// <summary>Films between two half-spaces, with the permittivities of their media against wavelength.</summary>
/// <remarks>Films are listed from the side the light comes from and name a medium by its number, so that identical rows
/// share one set of constants. Immutable but for <see cref="Media"/>, which its maker fills before the first solution.</remarks>
public sealed class FilmStack
{
    private readonly double[] _wavelengthsNm;
    private readonly int[] _mediumOfFilm;
    private readonly double[] _thicknessesNm;
    private readonly double[] _surroundIndex;
    private readonly Complex[] _backing;

    /// <summary>A stack on a half-space.</summary>
    /// <param name="wavelengthsNm">Vacuum wavelengths, each above zero; length L.</param>
    /// <param name="media">Permittivities, for L wavelengths.</param>
    /// <param name="mediumOfFilm">Medium of each film, outermost first; length F, may be empty.</param>
    /// <param name="thicknessesNm">Thickness of each film, 0 or above; length F.</param>
    /// <param name="surroundIndex">Real index where the light comes from, above zero; length L.</param>
    /// <param name="backing">Isotropic permittivity under the last film, imaginary part 0 or above; length L.</param>
    /// <param name="back">Where the backing ends and is averaged over thickness; null for a half-space.</param>
    /// <exception cref="ArgumentException">Lengths do not fit, or a value lies outside its range.</exception>
    public FilmStack(
        ReadOnlySpan<double> wavelengthsNm, OpticalComponents media, ReadOnlySpan<int> mediumOfFilm, ReadOnlySpan<double> thicknessesNm,
        ReadOnlySpan<double> surroundIndex, ReadOnlySpan<Complex> backing, IncoherentBack? back = null)
    {
        ArgumentNullException.ThrowIfNull(media);
        Guard.SameLength(media.WavelengthCount, wavelengthsNm.Length, nameof(wavelengthsNm));
        Guard.SameLength(mediumOfFilm.Length, thicknessesNm.Length, nameof(thicknessesNm));
        Guard.SameLength(wavelengthsNm.Length, surroundIndex.Length, nameof(surroundIndex));
        Guard.SameLength(wavelengthsNm.Length, backing.Length, nameof(backing));
        foreach (double wavelength in wavelengthsNm)
            Guard.Positive(wavelength, nameof(wavelengthsNm));
        foreach (double thickness in thicknessesNm)
            Guard.NotNegative(thickness, nameof(thicknessesNm));
        foreach (double index in surroundIndex)
            Guard.Positive(index, nameof(surroundIndex));
        foreach (int medium in mediumOfFilm)
            ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual((uint)medium, (uint)media.MediumCount, nameof(mediumOfFilm));
        foreach (Complex permittivity in backing)
            Guard.NotNegative(permittivity.Imaginary, nameof(backing));
        if (back is not null)
            Guard.SameLength(wavelengthsNm.Length, back.Behind.Length, nameof(back));
        Media = media;
        Back = back;
        _wavelengthsNm = wavelengthsNm.ToArray();
        _mediumOfFilm = mediumOfFilm.ToArray();
        _thicknessesNm = thicknessesNm.ToArray();
        _surroundIndex = surroundIndex.ToArray();
        _backing = backing.ToArray();
    }

    private FilmStack(FilmStack other, double[] thicknessesNm)
    {
        (Media, Back, _wavelengthsNm, _mediumOfFilm) = (other.Media, other.Back, other._wavelengthsNm, other._mediumOfFilm);
        (_surroundIndex, _backing, _thicknessesNm) = (other._surroundIndex, other._backing, thicknessesNm);
    }

    /// <summary>Number of films.</summary>
    public int FilmCount => _thicknessesNm.Length;

    /// <summary>Permittivities of the media.</summary>
    public OpticalComponents Media { get; }

    /// <summary>Where the backing ends; null for a half-space.</summary>
    public IncoherentBack? Back { get; }

    /// <summary>Vacuum wavelengths, in nm.</summary>
    public ReadOnlySpan<double> WavelengthsNm => _wavelengthsNm;

    /// <summary>Medium of each film.</summary>
    public ReadOnlySpan<int> MediumOfFilm => _mediumOfFilm;

    /// <summary>Thickness of each film, in nm.</summary>
    public ReadOnlySpan<double> ThicknessesNm => _thicknessesNm;

    /// <summary>Real index where the light comes from, at each wavelength.</summary>
    public ReadOnlySpan<double> SurroundIndex => _surroundIndex;

    /// <summary>Permittivity under the last film, at each wavelength.</summary>
    public ReadOnlySpan<Complex> Backing => _backing;

    /// <summary>The same films with other thicknesses; everything else is shared.</summary>
    /// <param name="thicknessesNm">Thickness of each film, 0 or above.</param>
    /// <exception cref="ArgumentException">Their number is not that of the films, or one lies outside its range.</exception>
    public FilmStack WithThicknesses(ReadOnlySpan<double> thicknessesNm)
    {
        Guard.SameLength(FilmCount, thicknessesNm.Length, nameof(thicknessesNm));
        foreach (double thickness in thicknessesNm)
            Guard.NotNegative(thickness, nameof(thicknessesNm));
        return new FilmStack(this, thicknessesNm.ToArray());
    }

    /// <summary>Whether two stacks have the same constants of media, surround and backing at the same wavelengths, whatever their films.</summary>
    internal bool SharesConstantsWith(FilmStack other)
        => ReferenceEquals(Media, other.Media) && ReferenceEquals(Back, other.Back) && Same(WavelengthsNm, other.WavelengthsNm)
           && Same(SurroundIndex, other.SurroundIndex) && Same(Backing, other.Backing);

    private static bool Same<T>(ReadOnlySpan<T> one, ReadOnlySpan<T> other)
        where T : IEquatable<T>
        => one == other || one.SequenceEqual(other);
}
