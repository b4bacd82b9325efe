using BarbuleOptics.Anatomy;

namespace BarbuleOptics.Ensembles.Spreads;

/// <summary>One place of a structure that takes a length, or a factor that corrects lengths: drawn, or kept.</summary>
/// <param name="Key">The measurement, as on the command line; rows drawn by themselves share one.</param>
/// <param name="Row">The row it belongs to, from 1 on, where rows are drawn by themselves; 0 otherwise.</param>
/// <param name="Length">As measured; of a factor its central value.</param>
/// <param name="Law">How it is drawn; null where it is kept.</param>
internal sealed record DrawSlot(string Key, int Row, MeasuredLength Length, LengthLaw? Law)
{
    /// <summary>Unit of its numbers: "nm", "deg" or empty.</summary>
    public string Unit { get; init; } = "nm";

    /// <summary>The factor or optical constant that it stands for; null for a length.</summary>
    public MeasuredFactor? Factor { get; init; }
}
