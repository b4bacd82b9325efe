using System.Numerics;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Multilayer;

/// <summary>One stack at one wavelength, direction and polarization.</summary>
internal static class FilmRecursion
{
    /// <summary>The power balance; the loss of each film is left in <see cref="FilmWorkspace.Lost"/>.</summary>
    public static PowerBalance Solve(FilmStack stack, int wavelength, in PlaneWave light, FilmWorkspace work)
    {
        for (int medium = 0; medium < stack.Media.MediumCount; medium++)
            work.Media[medium] = MediumWave.Of(stack.Media.Get(medium, wavelength), light);
        double k0 = 2 * Math.PI / stack.WavelengthsNm[wavelength];
        MediumWave backing = Isotropic(stack.Backing[wavelength], light);
        if (stack.Back is not IncoherentBack back)
            return OnHalfSpace(stack, k0, light, backing, work);

        var slab = new Slab(backing, Isotropic(back.Behind[wavelength], light), k0 * back.ThicknessNm);
        return slab.HasFringes ? OnAveragedSlab(stack, k0, light, slab, work) : OnSlab(stack, k0, light, slab, work);
    }

    private static MediumWave Isotropic(Complex permittivity, in PlaneWave light)
        => MediumWave.Of(DiagonalPermittivity.Isotropic(permittivity), light);

    private static PowerBalance OnHalfSpace(FilmStack stack, double k0, in PlaneWave light, in MediumWave backing, FilmWorkspace work)
    {
        work.Down.Start(backing.Admittance);
        Climb(stack, k0, work);
        return FromAbove(stack, light, backing, work, out _);
    }

    private static PowerBalance OnSlab(FilmStack stack, double k0, in PlaneWave light, in Slab slab, FilmWorkspace work)
    {
        work.Down.Start(slab.Behind.Admittance);
        work.Down.Through(new FilmStep(slab.Medium, slab.Thickness));
        Climb(stack, k0, work);
        PowerBalance power = FromAbove(stack, light, slab.Behind, work, out _);
        return new PowerBalance(power.Reflected, power.Transmitted, power.Lost + work.Down.Lost[0]);
    }

    private static PowerBalance OnAveragedSlab(FilmStack stack, double k0, in PlaneWave light, in Slab slab, FilmWorkspace work)
    {
        work.Down.Start(slab.Medium.Admittance);
        Climb(stack, k0, work);
        PowerBalance down = FromAbove(stack, light, slab.Medium, work, out double entered);

        // Light from the slab, with the films in reverse: it ends in the surround.
        FilmPass pass = work.Up;
        pass.Start(light.SurroundAdmittance);
        for (int film = 0; film < stack.FilmCount; film++)
            pass.Through(Step(stack, film, k0, work));
        var below = new Entrance(pass.Field, slab.Medium.Admittance);
        var average = new SlabAverage(slab, below, entered);
        double left = light.SurroundAdmittance * pass.Complete(below.Unit * average.Up);
        double lost = down.Lost + average.Lost;
        for (int film = 0; film < stack.FilmCount; film++)
        {
            work.Lost[film] += pass.Lost[film];
            lost += pass.Lost[film];
        }
        return new PowerBalance(down.Reflected + left, slab.Behind.Admittance.Real * average.Behind, lost);
    }

    // From the last film to the first.
    private static void Climb(FilmStack stack, double k0, FilmWorkspace work)
    {
        for (int film = stack.FilmCount - 1; film >= 0; film--)
            work.Down.Through(Step(stack, film, k0, work));
    }

    private static FilmStep Step(FilmStack stack, int film, double k0, FilmWorkspace work)
        => new(work.Media[stack.MediumOfFilm[film]], k0 * stack.ThicknessesNm[film]);

    /// <summary>Ends the passage at the surround.</summary>
    /// <param name="stack">The films.</param>
    /// <param name="light">The incident wave.</param>
    /// <param name="far">Where the passage started.</param>
    /// <param name="work">Holds the passage.</param>
    /// <param name="entered">|phi|^2 where the passage started.</param>
    private static PowerBalance FromAbove(FilmStack stack, in PlaneWave light, in MediumWave far, FilmWorkspace work, out double entered)
    {
        var entrance = new Entrance(work.Down.Field, light.SurroundAdmittance);
        entered = work.Down.Complete(entrance.Unit / light.SurroundAdmittance);
        ReadOnlySpan<double> passed = work.Down.Lost;
        double lost = 0;
        for (int film = 0; film < stack.FilmCount; film++)
        {
            // The last passed is the first film; a slab, if any, was passed first.
            work.Lost[film] = passed[^(film + 1)];
            lost += work.Lost[film];
        }
        return new PowerBalance(entrance.Reflected, far.Admittance.Real * entered, lost);
    }
}
