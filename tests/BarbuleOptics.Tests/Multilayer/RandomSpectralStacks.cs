using System.Numerics;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Tests.Multilayer;

/// <summary>Seeded stacks as those of <see cref="RandomStacks"/>, at several wavelengths, whose constants change with wavelength.</summary>
internal sealed class RandomSpectralStacks(int seed)
{
    private readonly RandomStacks _stacks = new(seed);

    public (FilmStack Stack, double Degrees) Next(int wavelengths)
    {
        (TestStack at, double degrees) = _stacks.Next();
        var media = new OpticalComponents(at.Films.Count, wavelengths);
        for (int film = 0; film < at.Films.Count; film++)
        {
            DiagonalPermittivity value = at.Films[film].Permittivity;
            for (int w = 0; w < wavelengths; w++)
                media.Set(film, w, new(Changed(value.X, w), Changed(value.Y, w), Changed(value.Z, w)));
        }
        int[] order = [.. Enumerable.Range(0, at.Films.Count)];
        double[] grid = [.. Enumerable.Range(0, wavelengths).Select(w => at.WavelengthNm + 7.5 * w)];
        Complex[] backing = [.. grid.Select((_, w) => Changed(at.Backing, w))];
        double[] surround = [.. grid.Select((_, w) => at.SurroundIndex * (1 + 1e-3 * w))];
        return (new FilmStack(grid, media, order, [.. at.Films.Select(film => film.ThicknessNm)], surround, backing), degrees);
    }

    private static Complex Changed(Complex value, int wavelength) => value * (1 + 5e-3 * wavelength);
}
