namespace BarbuleOptics.Grating.Joining;

/// <summary>An element in its place.</summary>
/// <param name="Kind">Its kind.</param>
/// <param name="KindNumber">Number of its kind.</param>
/// <param name="TopNm">Depth of its upper plane, in nm.</param>
/// <param name="CenterNm">Depth of its middle, in nm; of the line of centers for rods.</param>
/// <param name="ShiftNm">Its sideways place, in nm.</param>
/// <param name="BodiesTopNm">Depth of the top of its bodies, in nm: above the upper plane where that cuts them.</param>
/// <param name="BodiesBottomNm">Depth of their bottom, in nm.</param>
internal sealed record PlannedElement(
    ElementKind Kind, int KindNumber, double TopNm, double CenterNm, double ShiftNm, double BodiesTopNm, double BodiesBottomNm)
{
    /// <summary>Depth of its lower plane, in nm.</summary>
    public double BottomNm => TopNm + Kind.HeightNm;
}
