namespace BarbuleOptics.Grating.Joining;

/// <summary>Neighboring rows of one spacing.</summary>
/// <param name="PeriodNm">The period, in nm.</param>
/// <param name="HasRods">Whether it has rows of round rods.</param>
/// <param name="HasSlabs">Whether it has modal slabs.</param>
/// <param name="HasCuts">Whether the planes of a slab cut through bodies.</param>
/// <param name="NearestNm">Least distance in depth from the centers of a row of rods to the next ones, or twice that to a film's or outer face, in nm.</param>
/// <param name="Overlap">Largest sum of the radii of neighboring rows of rods, divided by the distance of their centers in depth; at least 1.</param>
/// <param name="ClearNm">Least distance in depth from a slab to the next body or face, in nm.</param>
internal readonly record struct PlanGroup(
    double PeriodNm, bool HasRods, bool HasSlabs, bool HasCuts, double NearestNm, double Overlap, double ClearNm)
{
    /// <summary>Without rows so far.</summary>
    public static PlanGroup Empty(double periodNm) => new(periodNm, false, false, false, double.PositiveInfinity, 1, double.PositiveInfinity);
}
