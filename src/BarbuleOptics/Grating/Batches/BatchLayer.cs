namespace BarbuleOptics.Grating.Batches;

/// <summary>A homogeneous layer, with the move along the surface between what lies on either side.</summary>
/// <param name="Medium">Number of its medium.</param>
/// <param name="ThicknessNm">Its thickness, in nm.</param>
/// <param name="ShiftNm">Sideways place that phases are counted from below it, less that above, in nm.</param>
internal readonly record struct BatchLayer(int Medium, double ThicknessNm, double ShiftNm)
{
    /// <summary>Difference that is taken for rounding, in nm.</summary>
    private const double RoundingNm = 1e-11;

    /// <summary>Whether another layer differs by rounding alone.</summary>
    public bool IsSame(BatchLayer other) => Medium == other.Medium && Math.Abs(ThicknessNm - other.ThicknessNm) <= RoundingNm
        && Math.Abs(ShiftNm - other.ShiftNm) <= RoundingNm;
}
