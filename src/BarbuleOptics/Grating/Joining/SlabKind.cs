using BarbuleOptics.Grating.Modal;
using BarbuleOptics.Grating.Multipoles;
using BarbuleOptics.Layering;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Grating.Joining;

/// <summary>Any bodies between two planes.</summary>
/// <param name="PeriodNm">The period, in nm.</param>
/// <param name="HeightNm">Distance between the planes, in nm.</param>
/// <param name="IsCut">Whether the planes cut through bodies.</param>
/// <param name="Bodies">The bodies, placed below the upper plane.</param>
internal sealed record SlabKind(double PeriodNm, double HeightNm, bool IsCut, ValueList<PlacedOutline> Bodies)
    : ElementKind(PeriodNm, HeightNm, IsCut)
{
    /// <inheritdoc/>
    public override IGratingElement Create(SharedAnswers shared, LatticeSums sums) => new ModalSlab(Bodies, HeightNm, PeriodNm);
}
