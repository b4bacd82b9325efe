using System.Numerics;
using BarbuleOptics.Layering;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Multilayer;

/// <summary>Checks of a call on a film solver, the same for every one of them.</summary>
internal static class FilmRequestCheck
{
    // Squares of what lies between stay finite and above zero.
    private const double LeastPermittivity = 1e-100;
    private const double MostPermittivity = 1e100;

    /// <summary>Throws when the call cannot be answered.</summary>
    public static void Check(FilmStack stack, in SolverRequest request, FilmWorkspace workspace, in SolverResponse response)
    {
        ArgumentNullException.ThrowIfNull(stack);
        ArgumentNullException.ThrowIfNull(workspace);
        SolverRequestCheck.Check(request, stack.WavelengthsNm.Length, "stack");
        if (!workspace.Holds(stack))
            throw new ArgumentException("The workspace was made for a smaller stack.", nameof(workspace));
        CheckResponse(stack, request, response);
        CheckMedia(stack, request);
    }

    private static void CheckResponse(FilmStack stack, in SolverRequest request, in SolverResponse response)
    {
        SolverRequestCheck.CheckPowers(request, response);
        if (!response.FilmAbsorptance.IsEmpty)
            Guard.SameLength(checked(stack.FilmCount * request.Count), response.FilmAbsorptance.Length, nameof(response));
    }

    // A medium that was never filled is zero.
    private static void CheckMedia(FilmStack stack, in SolverRequest request)
    {
        for (int wavelength = request.First; wavelength < request.First + request.Count; wavelength++)
        {
            foreach (int medium in stack.MediumOfFilm)
            {
                DiagonalPermittivity value = stack.Media.Get(medium, wavelength);
                if (!(IsUsable(value.X) && IsUsable(value.Y) && IsUsable(value.Z)))
                    throw new ArgumentException(Unusable(FormattableString.Invariant($"medium {medium}"), wavelength), nameof(stack));
            }
            if (!IsUsable(stack.Backing[wavelength]))
                throw new ArgumentException(Unusable("the backing", wavelength), nameof(stack));
            if (stack.Back is IncoherentBack back && !IsUsable(back.Behind[wavelength]))
                throw new ArgumentException(Unusable("what lies behind the backing", wavelength), nameof(stack));
        }
    }

    private static bool IsUsable(Complex value)
        => Math.Max(Math.Abs(value.Real), Math.Abs(value.Imaginary)) is >= LeastPermittivity and <= MostPermittivity;

    private static string Unusable(string what, int wavelength)
        => FormattableString.Invariant($"The permittivity of {what} at wavelength {wavelength} is zero, not finite or beyond 1e-100 to 1e100.");
}
