using BarbuleOptics.Quantities;

namespace BarbuleOptics.Multilayer;

/// <summary>Checks of a call that are the same for every solver.</summary>
internal static class SolverRequestCheck
{
    /// <summary>Throws when the block, the direction or the polarization cannot be answered.</summary>
    /// <param name="request">The request.</param>
    /// <param name="wavelengths">Number of wavelengths that the structure has.</param>
    /// <param name="structure">What is solved, for the message: "stack" or "section".</param>
    public static void Check(in SolverRequest request, int wavelengths, string structure)
    {
        if (request.First < 0 || request.Count < 0 || request.First > wavelengths - request.Count)
            throw new ArgumentOutOfRangeException(nameof(request), FormattableString.Invariant(
                $"Wavelengths {request.First} to {(long)request.First + request.Count - 1} are not all among the {wavelengths} of the {structure}."));
        if (!(request.Incidence.Degrees is >= 0 and < 90))
            throw new ArgumentOutOfRangeException(
                nameof(request), request.Incidence.Degrees, "The angle of incidence must be 0 to below 90 degrees.");
        if (request.Polarization is not (Polarizations.S or Polarizations.P or Polarizations.Unpolarized))
            throw new ArgumentException(
                FormattableString.Invariant($"The polarization must be S, P or both, not {request.Polarization}."), nameof(request));
    }

    /// <summary>Throws when a span that every solver is asked to fill has the wrong length.</summary>
    public static void CheckPowers(in SolverRequest request, in SolverResponse response)
    {
        Guard.SameLength(request.Count, response.Reflectance.Length, nameof(response));
        if ((request.Outputs & SolverOutputs.Transmittance) != 0)
            Guard.SameLength(request.Count, response.Transmittance.Length, nameof(response));
        if ((request.Outputs & SolverOutputs.Absorptance) != 0)
            Guard.SameLength(request.Count, response.Absorptance.Length, nameof(response));
    }
}
