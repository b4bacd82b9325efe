using BarbuleOptics.Layering;

namespace BarbuleOptics.Multilayer;

/// <summary>Scratch memory of the film solver; serves every stack with at most as many films and media as the one it was made for.</summary>
/// <remarks>Not to be shared between threads.</remarks>
public sealed class FilmWorkspace
{
    internal FilmWorkspace(int filmCount, int mediumCount)
    {
        // One more: a coherent slab behind the films is a film.
        Down = new FilmPass(filmCount + 1);
        Up = new FilmPass(filmCount + 1);
        Media = new MediumWave[mediumCount];
        Lost = new double[filmCount];
    }

    /// <summary>Solution for light from above.</summary>
    internal FilmPass Down { get; }

    /// <summary>Solution for light from below.</summary>
    internal FilmPass Up { get; }

    /// <summary>Media of the films at the wavelength at hand.</summary>
    internal MediumWave[] Media { get; }

    /// <summary>Power lost in each film at the wavelength at hand.</summary>
    internal double[] Lost { get; }

    internal bool Holds(FilmStack stack) => stack.FilmCount <= Lost.Length && stack.Media.MediumCount <= Media.Length;
}
