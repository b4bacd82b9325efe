using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Grating;

/// <summary>Checks of a call on <see cref="GratingSolver"/>.</summary>
internal static class GratingRequestCheck
{
    /// <summary>Throws when the call cannot be answered.</summary>
    public static void Check(SectionPermittivities structure, in SolverRequest request, GratingWorkspace workspace, in SolverResponse response)
    {
        ArgumentNullException.ThrowIfNull(structure);
        ArgumentNullException.ThrowIfNull(workspace);
        if (!ReferenceEquals(workspace.Section, structure.Section) && workspace.Section != structure.Section)
            throw new ArgumentException("The workspace was made for another section.", nameof(workspace));
        int wavelengths = structure.WavelengthsNm.Length;
        if (request.First < 0 || request.Count < 0 || request.First > wavelengths - request.Count)
            throw new ArgumentOutOfRangeException(nameof(request), FormattableString.Invariant(
                $"Wavelengths {request.First} to {(long)request.First + request.Count - 1} are not all among the {wavelengths} of the section."));
        if (!(request.Incidence.Degrees is >= 0 and < 90))
            throw new ArgumentOutOfRangeException(
                nameof(request), request.Incidence.Degrees, "The angle of incidence must be 0 to below 90 degrees.");
        if (request.Polarization is not (Polarizations.S or Polarizations.P or Polarizations.Unpolarized))
            throw new ArgumentException(
                FormattableString.Invariant($"The polarization must be S, P or both, not {request.Polarization}."), nameof(request));
        CheckResponse(structure, request, response);
    }

    private static void CheckResponse(SectionPermittivities structure, in SolverRequest request, in SolverResponse response)
    {
        Guard.SameLength(request.Count, response.Reflectance.Length, nameof(response));
        if ((request.Outputs & SolverOutputs.Transmittance) != 0)
            Guard.SameLength(request.Count, response.Transmittance.Length, nameof(response));
        if ((request.Outputs & SolverOutputs.Absorptance) != 0)
            Guard.SameLength(request.Count, response.Absorptance.Length, nameof(response));
        if (!response.DiffractedReflectance.IsEmpty)
            Guard.SameLength(request.Count, response.DiffractedReflectance.Length, nameof(response));
        if (!response.ErrorEstimates.IsEmpty)
            Guard.SameLength(request.Count, response.ErrorEstimates.Length, nameof(response));
        if (!response.MaterialAbsorptance.IsEmpty)
            Guard.SameLength(checked(structure.MaterialCount * request.Count), response.MaterialAbsorptance.Length, nameof(response));
        CheckOrders(request.Count, response.ReflectedOrders);
        CheckOrders(request.Count, response.TransmittedOrders);
    }

    private static void CheckOrders(int count, ReadOnlySpan<double> orders)
    {
        if (!orders.IsEmpty && (count == 0 || orders.Length % count != 0 || orders.Length / count % 2 == 0))
            throw new ArgumentException(
                FormattableString.Invariant($"Orders need an odd number of stretches of {count} elements, found {orders.Length}."), nameof(orders));
    }
}
