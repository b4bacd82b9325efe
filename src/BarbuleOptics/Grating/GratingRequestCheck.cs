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
        SolverRequestCheck.Check(request, structure.WavelengthsNm.Length, "section");
        CheckResponse(structure, request, response);
    }

    private static void CheckResponse(SectionPermittivities structure, in SolverRequest request, in SolverResponse response)
    {
        SolverRequestCheck.CheckPowers(request, response);
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
