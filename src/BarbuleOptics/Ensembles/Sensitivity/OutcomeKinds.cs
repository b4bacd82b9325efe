using BarbuleOptics.Ensembles.Draws;

namespace BarbuleOptics.Ensembles.Sensitivity;

/// <summary>The outcomes whose variance is shared out.</summary>
internal static class OutcomeKinds
{
    /// <summary>Peak, hue and chroma.</summary>
    public static IReadOnlyList<OutcomeKind> All { get; } =
        [new("peak_nm", OutcomeReader.Peak, false), new("h_deg", OutcomeReader.Hue, true), new("C", OutcomeReader.Chroma, false)];
}
